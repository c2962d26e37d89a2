import { frequencyCorrection } from '../model/frequency-correction.js';
import { timedProjections } from '../model/projections.js';
import { createSinusoidSolver, type SinusoidSolution } from '../model/sinusoid-solver.js';

/** A stretch of a record: samples [start, start + length). */
export interface Segment {
  samples: Float64Array;
  sampleRateHz: number;
  start: number;
  length: number;
}

export interface RefinedFrequency {
  frequencyHz: number;
  /** Radians per sample of the components, DC first. */
  angles: Float64Array;
  solution: SinusoidSolution;
}

/** Enough for a steady series; one that moves within the segment would not settle with more. */
const MOST_STEPS = 5;
/** Bounds of the measured slope of the correction against the frequency; −1 for a steady series over many cycles. */
const STEEPEST = -20;
const FLATTEST = -0.2;
/** Over many cycles each step squares what is left in lines, so that the error is then far below any noise. */
const TOLERANCE_LINES = 1e-5;

/**
 * Nonlinear least squares for the frequency of a harmonic series: Gauss-Newton on f0 with the linear amplitudes of DC and
 * the given orders solved exactly at each step; from the second step on the slope of the correction is taken from the last
 * two (secant method), since a moving frequency bends it. A step that explains less power is shortened.
 *
 * @param frequencyHz start value, within about half a line of the segment (divided by the dominant order) of f0
 * @param orders of the model, ascending, from 1; all below half the sample rate
 * @param toleranceLines ends with a step below this share of a spectrum line of the segment, or after `mostSteps`
 */
export function refineFrequency(
  segment: Segment,
  frequencyHz: number,
  orders: readonly number[],
  toleranceLines = TOLERANCE_LINES,
  mostSteps = MOST_STEPS,
): RefinedFrequency {
  const withDc = [0, ...orders];
  const lineHz = segment.sampleRateHz / segment.length;
  let best = fitAt(segment, frequencyHz, withDc);
  let stepHz = best.correctionHz;
  for (let i = 0; i < mostSteps && Math.abs(stepHz) > toleranceLines * lineHz; i++) {
    const next = fitAt(segment, best.frequencyHz + stepHz, withDc);
    const slope = (next.correctionHz - best.correctionHz) / stepHz;
    if (next.solution.explained >= best.solution.explained) {
      best = next;
      stepHz = -next.correctionHz / Math.min(FLATTEST, Math.max(STEEPEST, slope));
    } else {
      stepHz /= Math.max(2, -slope);
    }
  }
  // The last small step does not touch the amplitudes, which are those at the centre of the segment.
  const refinedHz = best.frequencyHz + stepHz;
  return { frequencyHz: refinedHz, angles: anglesOf(segment, refinedHz, withDc), solution: best.solution };
}

function fitAt(
  segment: Segment,
  frequencyHz: number,
  orders: readonly number[],
): { frequencyHz: number; solution: SinusoidSolution; correctionHz: number } {
  const { samples, sampleRateHz, start, length } = segment;
  const angles = anglesOf(segment, frequencyHz, orders);
  const sums = timedProjections(samples, start, length, angles);
  const solution = createSinusoidSolver(angles, length)(sums);
  const angle = (2 * Math.PI * frequencyHz) / sampleRateHz;
  const correction = frequencyCorrection(angle, orders, length, sums, solution);
  return { frequencyHz, solution, correctionHz: (correction * sampleRateHz) / (2 * Math.PI) };
}

function anglesOf({ sampleRateHz }: Segment, frequencyHz: number, orders: readonly number[]): Float64Array {
  const angle = (2 * Math.PI * frequencyHz) / sampleRateHz;
  return Float64Array.from(orders, (order) => order * angle);
}
