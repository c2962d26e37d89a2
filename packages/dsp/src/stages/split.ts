import type { IndexRange } from '../parts/part-types.js';

/** Samples that one part of a long record covers: enough work to be worth a thread, little enough to share it evenly. */
const PART_SAMPLES = 2 ** 21;

/**
 * Divides items that each cover `samplesPerItem` samples into ranges for parts. The division depends on the record alone,
 * never on the number of threads, so that sums are always taken in the same order.
 */
export function splitItems(items: number, samplesPerItem: number): IndexRange[] {
  const most = Math.max(1, Math.floor(PART_SAMPLES / samplesPerItem));
  const parts = Math.ceil(items / most);
  return Array.from({ length: parts }, (_, i) => ({
    from: Math.floor((i * items) / parts),
    to: Math.floor(((i + 1) * items) / parts),
  }));
}
