import { waveformFigures } from './waveform-figures.js';

/** max|x|/rms over all samples, DC included; null for a record of zeros. */
export function crestFactor(samples: Float64Array): number | null {
  const { peak, rms } = waveformFigures(samples);
  return rms > 0 ? peak / rms : null;
}
