import { highestOrder, harmonicAngles } from '../harmonics/harmonic-orders.js';
import { toFit } from '../model/fit-sinusoids.js';
import { projections } from '../model/projections.js';
import { createSinusoidSolver } from '../model/sinusoid-solver.js';
import type { PhasorSet } from './types.js';

/** Rounding leaves at least this share of the energy of a record unexplained. */
const ROUNDING_SHARE = 1e-18;

/**
 * Phasors of one channel at a given fundamental: least-squares fit of DC and the orders 1..maxOrder to all samples. The
 * total rms adds what the model leaves over (interharmonics, noise), so it also holds for a record of a broken number of
 * cycles.
 *
 * Channels that are to be multiplied with each other must be fitted at the same fundamental.
 *
 * @param fundamentalHz the record should hold at least one cycle of it
 * @param maxOrder orders that do not fit below half the sample rate are left out
 */
export function fitPhasorSet(
  samples: Float64Array,
  sampleRateHz: number,
  fundamentalHz: number,
  maxOrder = 50,
): PhasorSet {
  const count = samples.length;
  const orders = highestOrder(fundamentalHz, sampleRateHz, count, maxOrder);
  const angles = harmonicAngles(fundamentalHz, sampleRateHz, orders);
  const mean = samples.reduce((sum, x) => sum + x, 0) / count;
  const ac = samples.map((x) => x - mean);
  const solution = createSinusoidSolver(angles, count)(projections(ac, 0, count, angles));
  const fit = toFit(solution, angles, count, sampleRateHz);
  const energy = ac.reduce((sum, x) => sum + x * x, 0);
  const residual =
    Math.max(energy - solution.explained, ROUNDING_SHARE * energy) / Math.max(1, count - 2 * orders - 1);
  const dc = fit.dc + mean;
  const rms = fit.components.map((component) => component.rms);
  return {
    dc,
    totalRms: Math.sqrt(rms.reduce((sum, x) => sum + x * x, dc * dc + residual)),
    rms,
    phaseDeg: fit.components.map((component) => component.phaseDeg),
    noiseRms: Math.sqrt(residual / count),
  };
}
