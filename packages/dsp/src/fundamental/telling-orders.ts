import { harmonicAngles, highestOrder } from '../harmonics/harmonic-orders.js';
import { projections } from '../model/projections.js';
import { createSinusoidSolver } from '../model/sinusoid-solver.js';
import type { Segment } from './refine-frequency.js';

/** Up to this length a refinement with all orders costs next to nothing. */
const SHORT_SAMPLES = 2 ** 13;
/** Samples in the middle of a longer segment from which the orders are judged. */
const JUDGED_SAMPLES = 2 ** 15;
/** Share of a spectrum line by which leaving out an order may move the frequency. */
const ALLOWED_LINES = 1e-6;

/**
 * The orders that have a say in the frequency of a segment. An order of amplitude A that is left out of the fit moves the
 * frequency by about h A/(π K √Σh²A²) lines of a segment of K cycles, since over many cycles the orders hardly see one
 * another; those for which this is less than a millionth of a line are left out.
 */
export function tellingOrders(segment: Segment, frequencyHz: number, maxOrder: number): number[] {
  const { samples, sampleRateHz, start, length } = segment;
  const count = highestOrder(frequencyHz, sampleRateHz, length, maxOrder);
  const all = Array.from({ length: count }, (_, i) => i + 1);
  if (length <= SHORT_SAMPLES) return all;
  const judged = Math.min(length, JUDGED_SAMPLES);
  const angles = harmonicAngles(frequencyHz, sampleRateHz, count);
  const sums = projections(samples, start + Math.floor((length - judged) / 2), judged, angles);
  const { cosine, sine } = createSinusoidSolver(angles, judged)(sums);
  const weight = all.map((order) => order * Math.hypot(cosine[order]!, sine[order]!));
  const cycles = (frequencyHz * length) / sampleRateHz;
  const least = Math.PI * cycles * ALLOWED_LINES * Math.hypot(...weight);
  return all.filter((_, i) => weight[i]! > least);
}
