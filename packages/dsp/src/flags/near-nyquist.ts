import type { Flag, SpectrumResult } from '../types.js';
import { windowFigures } from '../windows/window-figures.js';
import { windowSamples } from '../windows/window-samples.js';

const BAND_START = 0.45;
const SHARE_OF_FUNDAMENTAL = 0.01;

/** Content above 0.45 of the sample rate that exceeds 1 % of the fundamental: the record may hold folded content. */
export function nearNyquistFlag(
  spectrum: SpectrumResult,
  sampleRateHz: number,
  fundamentalRms: number,
): Flag | null {
  const { enbwBins } = windowFigures(windowSamples(spectrum.window, 256));
  const from = Math.ceil((BAND_START * sampleRateHz) / spectrum.stepHz);
  let power = 0;
  for (let k = from; k < spectrum.rms.length; k++) power += spectrum.rms[k]! ** 2;
  const share = Math.sqrt(power / enbwBins) / fundamentalRms;
  if (!(share > SHARE_OF_FUNDAMENTAL)) return null;
  return {
    code: 'near-nyquist',
    severity: 'warning',
    message:
      `Content above ${(BAND_START * sampleRateHz).toPrecision(4)} Hz is ${(100 * share).toPrecision(2)} % of the fundamental. ` +
      'Frequencies above half the sample rate may have folded into the record: ' +
      'use an anti-alias filter or a higher sample rate.',
  };
}
