import type { Flag } from '../types.js';
import { wholeRecordEvidence } from './evidence.js';

/** `too-short-one-cycle` below one cycle of the found (or else nominal) frequency, `too-short-ten-cycles` below ten. */
export function recordLengthFlag(durationS: number, frequencyHz: number): Flag | null {
  // A millionth of slack: a record of exactly ten cycles must not be refused by rounding.
  const cycles = durationS * frequencyHz * (1 + 1e-6);
  const held = `The record of ${durationS.toPrecision(4)} s holds ${(durationS * frequencyHz).toFixed(2)} cycles of ${frequencyHz.toPrecision(6)} Hz`;
  const advice = `Record at least ${(10 / frequencyHz).toPrecision(3)} s.`;
  if (cycles < 1) {
    return {
      code: 'too-short-one-cycle',
      severity: 'error',
      message: `${held}, less than one: no harmonics can be given. ${advice}`,
      evidence: wholeRecordEvidence(durationS * frequencyHz, 1, 'cycles'),
    };
  }
  if (cycles >= 10) return null;
  return {
    code: 'too-short-ten-cycles',
    severity: 'warning',
    message: `${held}, fewer than ten: a 200 ms window does not fit. ${advice}`,
    evidence: wholeRecordEvidence(durationS * frequencyHz, 10, 'cycles'),
  };
}
