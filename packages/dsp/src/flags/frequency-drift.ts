import type { FrequencyTrack } from '../fundamental/frequency-track.js';
import type { Flag } from '../types.js';

const LIMIT_HZ = 0.2;
const REFERENCE_HZ = 50;

/** Raised when the fundamental moves by more than 0.2 Hz (0.4 % above 50 Hz) within the record. */
export function frequencyDriftFlag(track: FrequencyTrack | null, frequencyHz: number): Flag | null {
  if (track === null) return null;
  const lowest = track.localHz.reduce((a, b) => Math.min(a, b), Infinity);
  const highest = track.localHz.reduce((a, b) => Math.max(a, b), -Infinity);
  if (highest - lowest <= LIMIT_HZ * Math.max(1, frequencyHz / REFERENCE_HZ)) return null;
  return {
    code: 'frequency-drift',
    severity: 'warning',
    message:
      `The fundamental moves between ${lowest.toFixed(2)} Hz and ${highest.toFixed(2)} Hz within the record. ` +
      'Phases over the whole record are not given; analyse a steady span or record again.',
  };
}
