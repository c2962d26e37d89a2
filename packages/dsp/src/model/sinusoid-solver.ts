import { choleskyFactor, choleskySolve } from '../linear/cholesky.js';
import type { Projections } from './projections.js';

/** Amplitudes a, b of Σ a_i cos(θ_i (n − c)) + b_i sin(θ_i (n − c)), c = centre of the segment. */
export interface SinusoidSolution {
  cosine: Float64Array;
  sine: Float64Array;
  /** Sum of squares of the fitted model over the segment. */
  explained: number;
}

/**
 * Normal equations of the linear least-squares fit of sinusoids at known frequencies (IEEE 1057 three-parameter fit,
 * extended to many components). With time counted from the centre of the segment the cosines and sines are
 * orthogonal, so two small systems remain; their elements are Dirichlet kernels in closed form.
 *
 * @param angles radians per sample, all different, below π; a leading 0 stands for DC
 */
export function createSinusoidSolver(
  angles: Float64Array,
  sampleCount: number,
): (p: Projections) => SinusoidSolution {
  const size = angles.length;
  const even = new Float64Array(size * size);
  const odd = new Float64Array(size * size);
  for (let i = 0; i < size; i++) {
    for (let k = 0; k <= i; k++) {
      const difference = dirichlet(angles[i]! - angles[k]!, sampleCount);
      const sum = dirichlet(angles[i]! + angles[k]!, sampleCount);
      even[i * size + k] = (difference + sum) / 2;
      odd[i * size + k] = (difference - sum) / 2;
    }
  }
  const floor = 1e-9 * sampleCount;
  choleskyFactor(even, size, floor);
  choleskyFactor(odd, size, floor);
  return (p) => {
    const cosine = choleskySolve(even, size, p.cosine);
    const sine = choleskySolve(odd, size, p.sine);
    let explained = 0;
    for (let i = 0; i < size; i++) {
      if (angles[i] === 0) sine[i] = 0;
      explained += cosine[i]! * p.cosine[i]! + sine[i]! * p.sine[i]!;
    }
    return { cosine, sine, explained };
  };
}

/** Σ cos(θ(n − c)) over N samples about their centre c: sin(Nθ/2)/sin(θ/2). */
export function dirichlet(angle: number, sampleCount: number): number {
  const denominator = Math.sin(angle / 2);
  return Math.abs(denominator) < 1e-12 ? sampleCount : Math.sin((sampleCount * angle) / 2) / denominator;
}
