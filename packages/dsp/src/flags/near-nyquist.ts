import type { Flag, SpectrumResult } from '../types.js';
import { wholeRecordEvidence } from './evidence.js';

const BAND_START = 0.45;
const LIMIT_PERCENT = 1;

/** Content above 0.45 of the sample rate that exceeds 1 % of the fundamental: the record may hold folded content. */
export function nearNyquistFlag(
  { rms, stepHz, noiseBandwidthHz }: SpectrumResult,
  sampleRateHz: number,
  fundamentalRms: number,
): Flag | null {
  const from = Math.ceil((BAND_START * sampleRateHz) / stepHz);
  let power = 0;
  for (let k = from; k < rms.length; k++) power += rms[k]! ** 2;
  const percent = (100 * Math.sqrt((power * stepHz) / noiseBandwidthHz)) / fundamentalRms;
  if (!(percent > LIMIT_PERCENT)) return null;
  return {
    code: 'near-nyquist',
    severity: 'warning',
    message:
      `Content above ${(BAND_START * sampleRateHz).toPrecision(4)} Hz is ${percent.toPrecision(2)} % of the fundamental. ` +
      'Frequencies above half the sample rate may have folded into the record: ' +
      'use an anti-alias filter or a higher sample rate.',
    evidence: wholeRecordEvidence(percent, LIMIT_PERCENT, '%'),
  };
}
