import type { Flag } from '../types.js';
import { wholeRecordEvidence } from './evidence.js';

const LIMIT = 0.5;

/** |DC| above half of the AC rms. */
export function dcHeavyFlag(mean: number, acRms: number, unit: string): Flag | null {
  if (!(acRms > 0) || Math.abs(mean) <= LIMIT * acRms) return null;
  const amount = (value: number): string => `${inDigits(value)} ${unit}`.trimEnd();
  return {
    code: 'dc-heavy',
    severity: 'warning',
    message:
      `The DC component of ${amount(mean)} is ${inDigits(Math.abs(mean) / acRms, 3)} times the AC rms of ` +
      `${amount(acRms)}. Check the offset of the probe or channel, or whether DC belongs to the signal.`,
    evidence: wholeRecordEvidence((100 * Math.abs(mean)) / acRms, 100 * LIMIT, '%'),
  };
}

/** A number to significant digits, with an exponent from a million on alone. */
function inDigits(value: number, digits = 4): string {
  const text = value.toPrecision(digits);
  return text.includes('e+') && Math.abs(Number(text)) < 1e6 ? Number(text).toFixed(0) : text;
}
