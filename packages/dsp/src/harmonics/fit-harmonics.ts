import { fitSinusoids } from '../model/fit-sinusoids.js';
import { highestOrder } from './harmonic-orders.js';

export interface FittedHarmonic {
  order: number;
  frequencyHz: number;
  rms: number;
  /** Cosine form, zero time = first sample. */
  phaseDeg: number;
}

export interface HarmonicFit {
  dc: number;
  harmonics: FittedHarmonic[];
}

/**
 * Least-squares fit of DC and the orders 1..maxOrder of a known fundamental to all samples. Orders that do not fit
 * below half the sample rate are not listed.
 *
 * Model: x(t) = X0 + Σ √2 X_h cos(2πh f0 t + φ_h), t = 0 at the first sample.
 *
 * @param fundamentalHz f0; the record should hold at least one cycle
 */
export function fitHarmonics(
  samples: Float64Array,
  sampleRateHz: number,
  fundamentalHz: number,
  maxOrder: number,
): HarmonicFit {
  const count = highestOrder(fundamentalHz, sampleRateHz, samples.length, maxOrder);
  const frequencies = Array.from({ length: count }, (_, i) => (i + 1) * fundamentalHz);
  const fit = fitSinusoids(samples, sampleRateHz, frequencies);
  return { dc: fit.dc, harmonics: fit.components.map((c, i) => ({ order: i + 1, ...c })) };
}
