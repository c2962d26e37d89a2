/** Samples `from` up to but not including `to` of the channel of a part. */
export interface SampleRange {
  from: number;
  to: number;
}

/**
 * A computation over the samples of one channel that asks for them range by range, and so runs over samples in memory as
 * well as over samples that have to be fetched. It keeps no range after it has asked for the next one.
 */
export type Reading<Result> = Generator<SampleRange, Result, Float64Array>;

/**
 * Engineering values `from` up to but not including `to` of the channel with this index; exactly that many. They are only
 * read, so a view of a larger array will do.
 */
export type ReadSamples = (channel: number, from: number, to: number) => Promise<Float64Array> | Float64Array;

/** Samples that are asked for at a time, where the computation leaves it open: 2 MiB. */
export const BLOCK_SAMPLES = 2 ** 18;

/** Runs a computation over samples in memory. `onRange` is told of every range and may throw to stop. */
export function readFromMemory<Result>(
  reading: Reading<Result>,
  samples: Float64Array,
  onRange: (range: SampleRange) => void,
): Result {
  let step = reading.next();
  while (!step.done) {
    const range = step.value;
    onRange(range);
    step = reading.next(samples.subarray(range.from, range.to));
  }
  return step.value;
}

/** Runs a computation over samples that are fetched. `onRange` is told of every range and may throw to stop. */
export async function readFromSource<Result>(
  reading: Reading<Result>,
  read: (from: number, to: number) => Promise<Float64Array> | Float64Array,
  onRange: (range: SampleRange) => void,
): Promise<Result> {
  let step = reading.next();
  while (!step.done) {
    const range = step.value;
    onRange(range);
    const samples = await read(range.from, range.to);
    if (samples.length !== range.to - range.from) {
      throw new RangeError(
        `Asked for samples ${range.from} to ${range.to}, the source gave ${samples.length} of them`,
      );
    }
    step = reading.next(samples);
  }
  return step.value;
}

/**
 * Goes through items that each cover a stretch of samples, in ascending order, and asks for those that touch or overlap
 * together, in ranges of about `BLOCK_SAMPLES`.
 *
 * @param visit takes an item and where in the array its stretch begins
 */
export function* readStretches(
  items: { from: number; to: number },
  stretchOf: (item: number) => SampleRange,
  visit: (item: number, samples: Float64Array, offset: number) => void,
): Reading<void> {
  let item = items.from;
  while (item < items.to) {
    const { from, to: firstTo } = stretchOf(item);
    let to = firstTo;
    let next = item + 1;
    for (; next < items.to; next++) {
      const stretch = stretchOf(next);
      if (stretch.from > to || stretch.to - from > BLOCK_SAMPLES) break;
      to = Math.max(to, stretch.to);
    }
    const samples = yield { from, to };
    for (; item < next; item++) visit(item, samples, stretchOf(item).from - from);
  }
}
