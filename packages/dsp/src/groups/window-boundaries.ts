import { deviationAt, type FrequencyTrack } from '../fundamental/frequency-track.js';
import { meanFrequencyHz } from '../fundamental/local-frequency.js';

/** Synchronism tolerance of IEC 61000-4-7, 4.4.1. */
const SYNC_TOLERANCE = 3e-4;
/** Windows that follow the frequency are whole multiples of this share of the mean window long. */
const LENGTH_STEP = 2e-5;
/** Differences within this many standard deviations of the noise of the track do not count … */
const NOISE_DEVIATIONS = 4;
/** … as long as they stay below this share of the frequency. */
const LARGEST_STEADY_SHARE = 2e-4;

/**
 * Positions (in samples, fractional) of the boundaries of back-to-back windows of `cycles` periods, the first one at
 * the first sample; a last incomplete window is dropped (IEC 61000-4-7, 4.4.1). While the frequency is steady within the
 * noise of its track, all windows have the length of its mean. Otherwise the windows follow the phase of the fundamental,
 * so that they stay gapless and hold whole cycles: each ends where the phase asks for it within 1e-5 of its length, a
 * thirtieth of the tolerance, so that few different lengths occur (each needs tables of its own).
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
  const followed = track !== null && !isSteady(track, sampleRateHz, frequencyHz, length) ? track : null;
  const step = LENGTH_STEP * length;
  const out = [0];
  for (let j = 1; ; j++) {
    const last = out[j - 1]!;
    const asked =
      followed === null ? j * length : trackedPosition(followed, j * cycles, sampleRateHz, last + length);
    const next = followed === null ? asked : last + step * Math.round((asked - last) / step);
    if (!(next <= end) || next - last < length / 2) break;
    out.push(next);
  }
  return Float64Array.from(out);
}

/** Looks at stretches of two windows, whose mean frequency is less noisy than that of one. */
function isSteady(
  track: FrequencyTrack,
  sampleRateHz: number,
  frequencyHz: number,
  windowSamples: number,
): boolean {
  // Phase noise of a frame that puts a window off by so much of its cycles.
  const noise = phaseNoise(track) / ((2 * Math.PI * frequencyHz * windowSamples) / sampleRateHz);
  const limit = Math.min(LARGEST_STEADY_SHARE, Math.max(LENGTH_STEP, NOISE_DEVIATIONS * noise));
  const last = track.centres[track.centres.length - 1]!;
  for (let from = 0; from === 0 || from + windowSamples <= last; from += windowSamples) {
    const local = meanFrequencyHz(track, sampleRateHz, from, from + 2 * windowSamples);
    if (Math.abs(local - frequencyHz) > limit * frequencyHz) return false;
  }
  return true;
}

/**
 * Standard deviation of the phases of single frames in radians, from their second differences, which a slow drift hardly
 * enters: the variance of x₁ − 2x₂ + x₃ is six times that of x.
 */
function phaseNoise({ deviation }: FrequencyTrack): number {
  const count = deviation.length - 2;
  let squares = 0;
  for (let i = 0; i < count; i++) {
    squares += (deviation[i]! - 2 * deviation[i + 1]! + deviation[i + 2]!) ** 2;
  }
  return count > 0 ? Math.sqrt(squares / (6 * count)) : 0;
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
