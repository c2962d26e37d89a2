import type { Flag } from '../types.js';
import { wholeRecordEvidence } from './evidence.js';
import type { ScanFindings } from './flag-scan.js';

/** Quantisation noise in percent of the AC rms from which on it is called coarse. */
const LIMIT_PERCENT = 1;
/** A signal of fewer levels may be what it looks like: a logic level, a rectangular current. */
const FEWEST_LEVELS = 8;
/** With the range of the converter known, a signal that fills less of it is weak, whatever its shape. */
const TINY_SHARE_OF_RANGE = 0.01;

/**
 * The converter step is coarse against the signal: the noise of an ideal quantiser, step/√12 (Bennett, Bell System
 * Technical Journal 27, 1948), exceeds 1 % of the AC rms. A sine reaches that when it spans fewer than 82 codes. The
 * limit is common practice; no standard defines this check.
 */
export function lowResolutionFlag(
  { quantisationStep, highest, lowest, fullScale }: ScanFindings,
  acRms: number,
): Flag | null {
  if (quantisationStep === null || !(acRms > 0)) return null;
  const span = highest - lowest;
  const levels = Math.round(span / quantisationStep) + 1;
  const weak = fullScale !== null && span < TINY_SHARE_OF_RANGE * (fullScale[1] - fullScale[0]);
  if (levels < FEWEST_LEVELS && !weak) return null;
  const noisePercent = (100 * quantisationStep) / Math.sqrt(12) / acRms;
  if (noisePercent <= LIMIT_PERCENT) return null;
  return {
    code: 'low-resolution',
    severity: 'warning',
    message:
      `The signal spans only ${levels} codes of the converter: the quantisation noise is ${noisePercent.toPrecision(2)} % ` +
      'of the AC rms, and harmonics below that may be lost in it. Choose a smaller input range and record again.',
    evidence: wholeRecordEvidence(noisePercent, LIMIT_PERCENT, '%'),
  };
}
