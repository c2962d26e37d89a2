import { foldedFrequency } from '../figures/folded-frequency.js';
import { dirichletSlope } from '../model/dirichlet-slope.js';
import { toFit, type FittedSinusoid } from '../model/fit-sinusoids.js';
import { projections, timedProjections, type TimedProjections } from '../model/projections.js';
import { createSinusoidSolver, type SinusoidSolution } from '../model/sinusoid-solver.js';
import { ordersWithLines } from './orders-with-lines.js';

export interface ToneFit {
  dc: number;
  tone: FittedSinusoid;
  /** Orders 2, 3, … at the frequencies they fold to, as far as they have a line of their own. */
  harmonics: (FittedSinusoid & { order: number })[];
}

const MAX_STEPS = 10;
/** Share of a line of the record by which the frequency of the tone alone is first found. */
const FIRST_LINES = 1e-3;
/** A last correction below this share of a line changes amplitudes by less than 10⁻⁹. */
const FINAL_LINES = 1e-5;

/**
 * Least-squares fit of offset, tone and harmonics with the frequency of the tone among the unknowns (the four-parameter
 * fit of IEEE 1057, extended by harmonics at the frequencies they fold to): Gauss-Newton on the frequency, first for the
 * tone alone, then with all lines.
 *
 * @param fundamentalHz start value, right to about half a line of the record
 */
export function fitTone(
  samples: Float64Array,
  sampleRateHz: number,
  fundamentalHz: number,
  maxOrder: number,
): ToneFit {
  const count = samples.length;
  const lineHz = sampleRateHz / count;
  let frequencyHz = fundamentalHz;
  for (let i = 0; i < MAX_STEPS; i++) {
    const { correctionHz } = fitAt(samples, sampleRateHz, [frequencyHz]);
    frequencyHz += correctionHz;
    if (Math.abs(correctionHz) < FIRST_LINES * lineHz) break;
  }
  const orders = ordersWithLines(frequencyHz, sampleRateHz, count, maxOrder);
  const places = () => orders.map((order) => foldedFrequency(order * frequencyHz, sampleRateHz));
  let fit = fitAt(samples, sampleRateHz, places());
  for (let i = 0; i < MAX_STEPS && Math.abs(fit.correctionHz) > FINAL_LINES * lineHz; i++) {
    frequencyHz += fit.correctionHz;
    fit = fitAt(samples, sampleRateHz, places());
  }
  // The solution holds amplitudes at the centre of the record, which the last small correction does not touch.
  frequencyHz += fit.correctionHz;
  const { dc, components } = toFit(fit.solution, lineAngles(places(), sampleRateHz), count, sampleRateHz);
  const [tone, ...harmonics] = components;
  return { dc, tone: tone!, harmonics: harmonics.map((h, i) => ({ order: orders[i + 1]!, ...h })) };
}

/** Linear fit of offset and lines, and the Gauss-Newton correction of the first of them. */
function fitAt(
  samples: Float64Array,
  sampleRateHz: number,
  frequenciesHz: readonly number[],
): { solution: SinusoidSolution; correctionHz: number } {
  const angles = lineAngles(frequenciesHz, sampleRateHz);
  const count = samples.length;
  const nearSums = timedProjections(samples, 0, count, angles.subarray(0, 2));
  const farSums = projections(samples, 0, count, angles.subarray(2));
  const solution = createSinusoidSolver(
    angles,
    count,
  )({
    cosine: Float64Array.of(...nearSums.cosine, ...farSums.cosine),
    sine: Float64Array.of(...nearSums.sine, ...farSums.sine),
  });
  const correction = toneCorrection(angles, count, nearSums, solution);
  return { solution, correctionHz: (correction * sampleRateHz) / (2 * Math.PI) };
}

function lineAngles(frequenciesHz: readonly number[], sampleRateHz: number): Float64Array {
  return Float64Array.from([0, ...frequenciesHz], (f) => (2 * Math.PI * f) / sampleRateHz);
}

/**
 * The residual of the linear fit projected on the derivative of the tone by its angle; the sums of model terms are
 * slopes of Dirichlet kernels.
 */
function toneCorrection(
  angles: Float64Array,
  count: number,
  { timeCosine: timeCosines, timeSine: timeSines }: TimedProjections,
  { cosine, sine }: SinusoidSolution,
): number {
  const angle = angles[1]!;
  let timeCosine = timeCosines[1]!;
  let timeSine = timeSines[1]!;
  for (let k = 0; k < angles.length; k++) {
    const sum = dirichletSlope(angles[k]! + angle, count);
    const difference = dirichletSlope(angles[k]! - angle, count);
    timeCosine += 0.5 * sine[k]! * (sum + difference);
    timeSine += 0.5 * cosine[k]! * (sum - difference);
  }
  const [a, b] = [cosine[1]!, sine[1]!];
  const curvature = ((a * a + b * b) * count * (count * count - 1)) / 24;
  return curvature > 0 ? (b * timeCosine - a * timeSine) / curvature : 0;
}
