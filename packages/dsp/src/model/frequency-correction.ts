import { dirichletSlope } from './dirichlet-slope.js';
import type { TimedProjections } from './projections.js';
import type { SinusoidSolution } from './sinusoid-solver.js';

/**
 * One Gauss-Newton correction of the fundamental angle of a fitted harmonic series (the "four-parameter" step of the
 * IEEE 1057 sine fit, for a whole series): the residual of the linear fit projected on the derivative of the model with
 * respect to the fundamental frequency. Sums of model terms are derivatives of Dirichlet kernels in closed form.
 *
 * @param angle of the fundamental, radians per sample
 * @param orders of the fitted components, ascending, from 0 for DC
 * @returns the change of the angle; 0 when the series has no power
 */
export function frequencyCorrection(
  angle: number,
  orders: readonly number[],
  sampleCount: number,
  sums: TimedProjections,
  solution: SinusoidSolution,
): number {
  const slope = kernelSlopes(angle, 2 * (orders.at(-1) ?? 0), sampleCount);
  let gradient = 0;
  let weighted = 0;
  for (let i = 0; i < orders.length; i++) {
    const h = orders[i]!;
    let timeCosine = sums.timeCosine[i]!;
    let timeSine = sums.timeSine[i]!;
    for (let k = 0; k < orders.length; k++) {
      // Σ t sin(mθt) = −(kernel slope at m), odd in m.
      const sum = slope[h + orders[k]!]!;
      const apart = orders[k]! - h;
      const difference = apart >= 0 ? slope[apart]! : -slope[-apart]!;
      timeCosine += 0.5 * solution.sine[k]! * (sum + difference);
      timeSine += 0.5 * solution.cosine[k]! * (sum - difference);
    }
    gradient += h * (solution.sine[i]! * timeCosine - solution.cosine[i]! * timeSine);
    weighted += h * h * (solution.cosine[i]! ** 2 + solution.sine[i]! ** 2);
  }
  const curvature = (weighted * sampleCount * (sampleCount * sampleCount - 1)) / 24;
  return curvature > 0 ? gradient / curvature : 0;
}

/** d/dφ [sin(Nφ/2)/sin(φ/2)] at φ = mθ, m = 0..highest. */
function kernelSlopes(angle: number, highest: number, sampleCount: number): Float64Array {
  return Float64Array.from({ length: highest + 1 }, (_, m) => dirichletSlope(m * angle, sampleCount));
}
