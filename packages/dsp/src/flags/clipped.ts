import type { Flag } from '../types.js';
import type { CrestFindings, RunFindings } from './crest-watch.js';
import { firstTimes } from './evidence.js';
import type { ScanFindings } from './flag-scan.js';

const MIN_CRESTS = 2;
const MIN_RUN = 3;
/** A flat stretch at this share of the span around zero is a rectifier's pause, not a limit. */
const ZERO_LEVEL = 1e-3;

/**
 * Three or more successive samples at the highest (or lowest) value of the record, to 1e-6 of the peak-to-peak value, in
 * at least two separate crests with sharp edges.
 */
export function clippedFlag(findings: ScanFindings, sampleRateHz: number): Flag | null {
  const { top, bottom } = clippedCrests(findings);
  const found = [top, bottom].filter((crests) => crests !== null);
  if (found.length === 0) return null;
  const where = [
    top === null ? '' : `${top.count} crests at the top`,
    bottom === null ? '' : `${bottom.count} crests at the bottom`,
  ].filter((text) => text !== '');
  const timesS = firstTimes(
    found.flatMap((crests) => crests.positions),
    sampleRateHz,
  );
  return {
    code: 'clipped',
    severity: 'error',
    message:
      `The waveform stays flat at its limit in ${where.join(' and ')}, first at ${timesS[0]!.toPrecision(4)} s. ` +
      'Harmonics of a clipped record are wrong: choose a larger range and record again, ' +
      'or confirm that the signal itself has flat tops.',
    evidence: {
      count: found.reduce((sum, crests) => sum + crests.count, 0),
      timesS,
      value: Math.max(...found.map((crests) => crests.longest)),
      limit: MIN_RUN,
      unit: 'samples',
    },
  };
}

/** The flat crests that count as clipped, by the end they stand at; null where there are none. */
export function clippedCrests({ top, bottom, lowest, highest }: ScanFindings): {
  top: RunFindings | null;
  bottom: RunFindings | null;
} {
  const clipped = ({ level, flat }: CrestFindings): RunFindings | null =>
    flat.count >= MIN_CRESTS && Math.abs(level) > ZERO_LEVEL * (highest - lowest) ? flat : null;
  return { top: clipped(top), bottom: clipped(bottom) };
}
