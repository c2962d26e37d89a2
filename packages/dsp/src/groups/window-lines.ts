import { createKernelWindowLines } from './kernel-window-lines.js';
import { createPlainWindowLines } from './plain-window-lines.js';
import { lineRms, type WindowLinePlan } from './window-shape.js';

export { lineRms, type WindowLinePlan };

/**
 * Plan for the lines k = 0..lineCount−1, spacing f0/N, of a rectangular window of exactly `windowSamples` samples
 * (N cycles; may be fractional) that is taken over `sampleCount` whole samples.
 *
 * The lines are evaluated at their exact frequencies. When the window is not a whole number of
 * samples the lines are no longer orthogonal; the orders up to maxOrder are then fitted by least squares and their
 * leakage is taken out of all lines, which leaves an error only on the (small) rest. For whole-sample windows this is
 * the DFT of IEC 61000-4-7.
 *
 * Runs as compiled WebAssembly where the platform has it; it then differs from the plain transform by less than 1e-12 of
 * the largest line.
 *
 * @param cycles periods per window (N): order h is line N·h
 * @param maxOrder highest order whose leakage is taken out
 * @param lineCount lines wanted, by default up to just below order maxOrder + 1; cut at half the sample rate
 */
export function createWindowLines(
  sampleCount: number,
  windowSamples: number,
  cycles: number,
  maxOrder: number,
  lineCount = cycles * (maxOrder + 1),
): WindowLinePlan {
  const belowHalfRate = Math.min(lineCount, Math.ceil(sampleCount / 2 - 0.25));
  const shape = { sampleCount, windowSamples, cycles, maxOrder, lineCount: belowHalfRate };
  return createKernelWindowLines(shape) ?? createPlainWindowLines(shape);
}
