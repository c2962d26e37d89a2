import type { ProfileName } from '../types.js';

const LONGEST_WHOLE_RECORD = 2 ** 17;
const LONG_RECORD_SEGMENT = 2 ** 16;
const SHORTEST_AVERAGED_RECORD = 4096;

/**
 * Samples per spectrum segment: the whole record while it is short enough to draw, averaged segments of 65536 beyond;
 * the general profile always averages (segments of at most a quarter of the record) unless the record is very short.
 */
export function segmentLength(sampleCount: number, profile: ProfileName): number {
  if (profile === 'general' && sampleCount >= SHORTEST_AVERAGED_RECORD) {
    return Math.min(LONG_RECORD_SEGMENT, 2 ** Math.floor(Math.log2(sampleCount / 4)));
  }
  return sampleCount <= LONGEST_WHOLE_RECORD ? sampleCount : LONG_RECORD_SEGMENT;
}
