import { projections } from './projections.js';
import { createSinusoidSolver, type SinusoidSolution } from './sinusoid-solver.js';

/** One fitted component: x(t) = √2 rms cos(2πft + phase), t = 0 at the first sample. */
export interface FittedSinusoid {
  frequencyHz: number;
  rms: number;
  phaseDeg: number;
}

export interface SinusoidFit {
  /** Constant term of the model. Not the mean of the samples when these hold a broken number of cycles. */
  dc: number;
  components: FittedSinusoid[];
}

/**
 * Least-squares fit of a constant and sinusoids at known, different frequencies below half the sample rate
 * (IEEE 1057, sine fit with known frequency, for many components).
 *
 * @param frequenciesHz positive and below half the sample rate
 */
export function fitSinusoids(
  samples: Float64Array,
  sampleRateHz: number,
  frequenciesHz: readonly number[],
): SinusoidFit {
  const angles = Float64Array.from([0, ...frequenciesHz.map((f) => (2 * Math.PI * f) / sampleRateHz)]);
  const sums = projections(samples, 0, samples.length, angles);
  const solution = createSinusoidSolver(angles, samples.length)(sums);
  return toFit(solution, angles, samples.length, sampleRateHz);
}

/** Turns centred amplitudes into rms and cosine phase at the first sample. */
export function toFit(
  solution: SinusoidSolution,
  angles: Float64Array,
  sampleCount: number,
  sampleRateHz: number,
): SinusoidFit {
  const centre = (sampleCount - 1) / 2;
  const components: FittedSinusoid[] = [];
  for (let i = 1; i < angles.length; i++) {
    const a = solution.cosine[i]!;
    const b = solution.sine[i]!;
    components.push({
      frequencyHz: (angles[i]! * sampleRateHz) / (2 * Math.PI),
      rms: Math.hypot(a, b) / Math.SQRT2,
      phaseDeg: wrapDegrees(((Math.atan2(-b, a) - angles[i]! * centre) * 180) / Math.PI),
    });
  }
  return { dc: solution.cosine[0]!, components };
}

/** The same angle within (−180, 180]. */
export function wrapDegrees(degrees: number): number {
  const wrapped = degrees - 360 * Math.round(degrees / 360);
  return wrapped <= -180 ? wrapped + 360 : wrapped;
}
