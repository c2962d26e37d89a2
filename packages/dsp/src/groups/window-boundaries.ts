import { deviationAt, type FrequencyTrack } from '../fundamental/frequency-track.js';

/** Local frequency differences below this share are met by windows of constant length (0.03 % is the tolerance). */
const STEADY_SHARE = 2e-4;
/** Synchronism tolerance of IEC 61000-4-7, 4.4.1. */
const SYNC_TOLERANCE = 3e-4;

/**
 * Positions (in samples, fractional) of the boundaries of back-to-back windows of `cycles` periods, the first one at
 * the first sample; a last incomplete window is dropped (IEC 61000-4-7, 4.4.1). A drifting fundamental is followed by
 * its phase, so the windows stay gapless and hold whole cycles.
 *
 * @returns windows + 1 positions; a single 0 when no whole window fits
 */
export function windowBoundaries(
  sampleCount: number,
  sampleRateHz: number,
  frequencyHz: number,
  cycles: number,
  track: FrequencyTrack | null,
): Float64Array {
  const length = (cycles * sampleRateHz) / frequencyHz;
  const end = sampleCount + Math.max(0.5, SYNC_TOLERANCE * length);
  const steady =
    track === null || track.localHz.every((f) => Math.abs(f - frequencyHz) <= STEADY_SHARE * frequencyHz);
  const out = [0];
  for (let j = 1; ; j++) {
    const next = steady ? j * length : trackedPosition(track, j * cycles, sampleRateHz, out[j - 1]! + length);
    if (!(next <= end) || next - out[j - 1]! < length / 2) break;
    out.push(next);
  }
  return Float64Array.from(out);
}

function trackedPosition(track: FrequencyTrack, cycles: number, sampleRateHz: number, guess: number): number {
  const origin = deviationAt(track, 0);
  let position = guess;
  for (let i = 0; i < 8; i++) {
    const turned = (deviationAt(track, position) - origin) / (2 * Math.PI);
    position = ((cycles - turned) * sampleRateHz) / track.carrierHz;
  }
  return position;
}
