import { createUnitTurns } from '../fft/unit-turns.js';
import { besselI0 } from './bessel-i0.js';
import { COSINE_TERMS, DEFAULT_KAISER_BETA, type WindowName } from './window-terms.js';

export type { WindowName };

/**
 * The samples of a periodic ("DFT-even") window, as spectral analysis needs it.
 *
 * @param beta Kaiser only: β = πα; the first `length` of the length + 1 samples of the symmetric window
 * @throws RangeError when the length is not a positive integer
 */
export function windowSamples(name: WindowName, length: number, beta = DEFAULT_KAISER_BETA): Float64Array {
  if (!Number.isInteger(length) || length < 1)
    throw new RangeError(`Window length must be a positive integer, got ${length}`);
  const valueAt = name === 'kaiser' ? kaiserValue(length, beta) : cosineValue(COSINE_TERMS[name], length);
  const out = new Float64Array(length);
  for (let n = 0; 2 * n <= length; n++) {
    const value = valueAt(n);
    out[n] = value;
    if (n > 0) out[length - n] = value;
  }
  return out;
}

function kaiserValue(length: number, beta: number): (n: number) => number {
  const scale = besselI0(beta);
  return (n) => {
    const x = (2 * n) / length - 1;
    return besselI0(beta * Math.sqrt(Math.max(0, 1 - x * x))) / scale;
  };
}

/** Σ (−1)^k a_k cos(kx) by the recurrence of C. W. Clenshaw (1955): one cosine per sample whatever the number of terms. */
function cosineValue(terms: readonly number[], length: number): (n: number) => number {
  if (terms.length === 1) return () => terms[0]!;
  const turns = createUnitTurns(length);
  return (n) => {
    const minusCosine = -turns.cosine(n);
    let next = 0;
    let afterNext = 0;
    for (let k = terms.length - 1; k > 0; k--) {
      const here = terms[k]! + 2 * minusCosine * next - afterNext;
      afterNext = next;
      next = here;
    }
    return terms[0]! + minusCosine * next - afterNext;
  };
}
