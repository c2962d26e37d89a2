import FFT from 'fft.js';
import { createChirpPlan } from './chirp-plan.js';

/** A prepared complex DFT of one length. Arrays are interleaved: re0, im0, re1, im1, … */
export interface ComplexFftPlan {
  readonly length: number;
  /** Reads 2·length values of `input`, writes 2·length values of `output`. */
  transform(input: ArrayLike<number>, output: Float64Array | number[]): void;
}

/** True for 4, 8, 16, … (the lengths that the radix-4 kernel takes). */
export function isRadixLength(length: number): boolean {
  return length >= 4 && Number.isInteger(Math.log2(length));
}

/**
 * Plan for the forward DFT X_k = Σ x_n e^(−j2πkn/N) of any length: radix-4 for powers of two, otherwise the
 * chirp transform of L. I. Bluestein (IEEE Trans. Audio Electroacoust. AU-18, 1970).
 */
export function createComplexFftPlan(length: number): ComplexFftPlan {
  if (!Number.isInteger(length) || length < 1)
    throw new RangeError(`FFT length must be a positive integer, got ${length}`);
  if (isRadixLength(length)) {
    const fft = new FFT(length);
    return { length, transform: (input, output) => fft.transform(output, input) };
  }
  // n² is reduced modulo 2N before the trigonometric call, so that long transforms keep full precision.
  const chirp = createChirpPlan(length, length, (i) => (Math.PI * ((i * i) % (2 * length))) / length);
  return { length, transform: (input, output) => chirp.transform(input, output) };
}
