import { besselI0 } from './bessel-i0.js';

export type WindowName =
  'rectangular' | 'hann' | 'hamming' | 'blackman' | 'blackman-harris' | 'nuttall' | 'flat-top' | 'kaiser';

/**
 * Coefficients a_k of w[n] = Σ (−1)^k a_k cos(2πkn/N).
 * Hann to Blackman-Harris (4 terms, minimum side lobe): F. J. Harris, Proc. IEEE 66(1), 1978, table 1.
 * Nuttall: A. H. Nuttall, IEEE Trans. ASSP-29(1), 1981, minimum 4-term. Flat-top: the usual five-term library form.
 */
const COSINE_TERMS: Record<Exclude<WindowName, 'kaiser'>, readonly number[]> = {
  rectangular: [1],
  hann: [0.5, 0.5],
  hamming: [0.54, 0.46],
  blackman: [0.42, 0.5, 0.08],
  'blackman-harris': [0.35875, 0.48829, 0.14128, 0.01168],
  nuttall: [0.3635819, 0.4891775, 0.1365995, 0.0106411],
  'flat-top': [0.21557895, 0.41663158, 0.277263158, 0.083578947, 0.006947368],
};

const DEFAULT_KAISER_BETA = 9;

/**
 * The samples of a periodic ("DFT-even") window, as spectral analysis needs it.
 *
 * @param beta Kaiser only: β = πα; the first `length` of the length + 1 samples of the symmetric window
 * @throws RangeError when the length is not a positive integer
 */
export function windowSamples(name: WindowName, length: number, beta = DEFAULT_KAISER_BETA): Float64Array {
  if (!Number.isInteger(length) || length < 1)
    throw new RangeError(`Window length must be a positive integer, got ${length}`);
  const out = new Float64Array(length);
  if (name === 'kaiser') {
    const scale = besselI0(beta);
    for (let n = 0; n < length; n++) {
      const x = (2 * n) / length - 1;
      out[n] = besselI0(beta * Math.sqrt(Math.max(0, 1 - x * x))) / scale;
    }
    return out;
  }
  const terms = COSINE_TERMS[name];
  for (let n = 0; n < length; n++) {
    let value = 0;
    for (let k = terms.length - 1; k >= 0; k--) {
      value += (k % 2 === 0 ? 1 : -1) * terms[k]! * Math.cos((2 * Math.PI * ((k * n) % length)) / length);
    }
    out[n] = value;
  }
  return out;
}
