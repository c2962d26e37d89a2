import { dirichletSlope } from './dirichlet-slope.js';
import type { TimedProjections } from './projections.js';
import type { SinusoidSolution } from './sinusoid-solver.js';

/**
 * One Gauss-Newton correction of the fundamental angle of a fitted harmonic series (the "four-parameter" step of the
 * IEEE 1057 sine fit, for a whole series): the residual of the linear fit projected on the derivative of the model with
 * respect to the fundamental frequency. Sums of model terms are derivatives of Dirichlet kernels in closed form.
 *
 * @param angles h·θ for h = 0..H, component by component as in `solution`
 * @returns the change of θ in radians per sample; 0 when the series has no power
 */
export function frequencyCorrection(
  angles: Float64Array,
  sampleCount: number,
  sums: TimedProjections,
  solution: SinusoidSolution,
): number {
  const size = angles.length;
  const slope = kernelSlopes(angles[1] ?? 0, size, sampleCount);
  let gradient = 0;
  let weighted = 0;
  for (let h = 1; h < size; h++) {
    let timeCosine = sums.timeCosine[h]!;
    let timeSine = sums.timeSine[h]!;
    for (let k = 0; k < size; k++) {
      // Σ t sin(mθt) = −(kernel slope at m), odd in m.
      const sum = slope[h + k]!;
      const difference = k >= h ? slope[k - h]! : -slope[h - k]!;
      timeCosine += 0.5 * solution.sine[k]! * (sum + difference);
      timeSine += 0.5 * solution.cosine[k]! * (sum - difference);
    }
    gradient += h * (solution.sine[h]! * timeCosine - solution.cosine[h]! * timeSine);
    weighted += h * h * (solution.cosine[h]! ** 2 + solution.sine[h]! ** 2);
  }
  const curvature = (weighted * sampleCount * (sampleCount * sampleCount - 1)) / 24;
  return curvature > 0 ? gradient / curvature : 0;
}

/** d/dφ [sin(Nφ/2)/sin(φ/2)] at φ = mθ, m = 0..2·size − 2. */
function kernelSlopes(angle: number, size: number, sampleCount: number): Float64Array {
  return Float64Array.from({ length: 2 * size - 1 }, (_, m) => dirichletSlope(m * angle, sampleCount));
}
