import { harmonicAngles, highestOrder } from '../harmonics/harmonic-orders.js';
import { frequencyCorrection } from '../model/frequency-correction.js';
import { timedProjections } from '../model/projections.js';
import { createSinusoidSolver, type SinusoidSolution } from '../model/sinusoid-solver.js';

export interface RefinedFrequency {
  frequencyHz: number;
  angles: Float64Array;
  solution: SinusoidSolution;
}

/** A stretch of a record: samples [start, start + length). */
export interface Segment {
  samples: Float64Array;
  sampleRateHz: number;
  start: number;
  length: number;
}

const MAX_STEPS = 20;
/** Share of a spectrum line below which a correction no longer matters. */
const CONVERGED_LINES = 1e-7;

/**
 * Nonlinear least squares for the frequency of a harmonic series: Gauss-Newton on f0 with the linear amplitudes of DC and
 * the orders 1..maxOrder solved exactly at each step. A step that explains less power is halved.
 *
 * @param frequencyHz start value, within about half a line of the segment (divided by the dominant order) of f0
 */
export function refineFrequency(segment: Segment, frequencyHz: number, maxOrder: number): RefinedFrequency {
  const { sampleRateHz, length } = segment;
  const lineHz = sampleRateHz / length;
  let best = fitAt(segment, frequencyHz, maxOrder);
  let stepHz = best.correctionHz;
  for (let i = 0; i < MAX_STEPS && Math.abs(stepHz) > CONVERGED_LINES * lineHz; i++) {
    const next = fitAt(segment, best.frequencyHz + stepHz, maxOrder);
    if (next.solution.explained >= best.solution.explained) {
      best = next;
      stepHz = next.correctionHz;
    } else {
      stepHz /= 2;
    }
  }
  return best;
}

function fitAt(
  { samples, sampleRateHz, start, length }: Segment,
  frequencyHz: number,
  maxOrder: number,
): RefinedFrequency & { correctionHz: number } {
  const count = highestOrder(frequencyHz, sampleRateHz, length, maxOrder);
  const angles = harmonicAngles(frequencyHz, sampleRateHz, count);
  const sums = timedProjections(samples, start, length, angles);
  const solution = createSinusoidSolver(angles, length)(sums);
  const correction = frequencyCorrection(angles, length, sums, solution);
  return { frequencyHz, angles, solution, correctionHz: (correction * sampleRateHz) / (2 * Math.PI) };
}
