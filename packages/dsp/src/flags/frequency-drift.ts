import type { FrequencyTrack } from '../fundamental/frequency-track.js';
import type { Flag } from '../types.js';
import { firstTimes } from './evidence.js';

const LIMIT_HZ = 0.2;
const REFERENCE_HZ = 50;

/**
 * Raised when the fundamental moves by more than 0.2 Hz (0.4 % above 50 Hz) within the record. Counted are the local
 * frequencies that lie farther than half of that from the middle one.
 */
export function frequencyDriftFlag(
  track: FrequencyTrack | null,
  frequencyHz: number,
  sampleRateHz: number,
): Flag | null {
  if (track === null) return null;
  const { localHz, centres } = track;
  const lowest = localHz.reduce((a, b) => Math.min(a, b), Infinity);
  const highest = localHz.reduce((a, b) => Math.max(a, b), -Infinity);
  const limit = LIMIT_HZ * Math.max(1, frequencyHz / REFERENCE_HZ);
  if (highest - lowest <= limit) return null;
  const middle = Float64Array.from(localHz).sort()[localHz.length >> 1]!;
  const away: number[] = [];
  for (let i = 0; i < localHz.length; i++) {
    if (Math.abs(localHz[i]! - middle) > limit / 2) away.push((centres[i]! + centres[i + 1]!) / 2);
  }
  return {
    code: 'frequency-drift',
    severity: 'warning',
    message:
      `The fundamental moves between ${lowest.toFixed(2)} Hz and ${highest.toFixed(2)} Hz within the record. ` +
      'Phases over the whole record are not given; analyse a steady span or record again.',
    evidence: {
      count: away.length,
      timesS: firstTimes(away, sampleRateHz),
      value: highest - lowest,
      limit,
      unit: 'Hz',
    },
  };
}
