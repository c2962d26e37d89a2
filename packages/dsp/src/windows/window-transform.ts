import { COSINE_TERMS, DEFAULT_KAISER_BETA, type WindowName } from './window-terms.js';

/**
 * The spectrum of a window as a function of the distance from its peak in bins, relative to the peak, for windows of
 * many samples: Σ ½ a_k [sinc(δ − k) + sinc(δ + k)] for cosine sums, sinh√(β² − π²δ²)/√(β² − π²δ²) for Kaiser
 * (F. J. Harris, Proc. IEEE 66(1), 1978). Right to about 1/N of the peak for N samples.
 */
export function windowTransform(name: WindowName, beta = DEFAULT_KAISER_BETA): (bins: number) => number {
  if (name === 'kaiser') {
    const peak = sinhRatio(beta * beta);
    return (bins) => sinhRatio(beta * beta - (Math.PI * bins) ** 2) / peak;
  }
  const terms = COSINE_TERMS[name];
  return (bins) => {
    let sum = 0;
    for (let k = 0; k < terms.length; k++) {
      const pair = k === 0 ? sinc(bins) : 0.5 * (sinc(bins - k) + sinc(bins + k));
      sum += terms[k]! * pair;
    }
    return sum / terms[0]!;
  };
}

function sinc(x: number): number {
  return x === 0 ? 1 : Math.sin(Math.PI * x) / (Math.PI * x);
}

/** sinh(√q)/√q, continued to negative q as sin(√−q)/√−q. */
function sinhRatio(square: number): number {
  if (square === 0) return 1;
  const root = Math.sqrt(Math.abs(square));
  return square > 0 ? Math.sinh(root) / root : Math.sin(root) / root;
}
