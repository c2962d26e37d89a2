import type { FrequencyTrack } from './frequency-track.js';

const FEWEST_FRAMES = 3;

/** Frames count whose centres lie this share of the stretch outside it: half the distance of frames for ten cycles. */
const MARGIN = 0.25;

/**
 * Mean frequency between two positions: slope of the straight line through the phases of the frames whose centres lie
 * between them or little outside, of the nearest three at least.
 *
 * @param from position in samples
 * @param to position in samples, behind `from`
 */
export function meanFrequencyHz(
  track: FrequencyTrack,
  sampleRateHz: number,
  from: number,
  to: number,
): number {
  const { centres, deviation, carrierHz } = track;
  const margin = MARGIN * (to - from);
  let first = firstAtOrBehind(centres, from - margin);
  let end = firstAtOrBehind(centres, to + margin);
  while (end - first < FEWEST_FRAMES) {
    const nextIsNearer = first === 0 || centres[end]! - to < from - centres[first - 1]!;
    if (nextIsNearer && end < centres.length) end++;
    else first--;
  }
  return carrierHz + (slopeOf(centres, deviation, first, end) * sampleRateHz) / (2 * Math.PI);
}

/**
 * Mean frequency over a whole track by linear regression of its phase: the frequency estimate of S. A. Tretter (IEEE
 * Trans. Information Theory 31, 1985), with frames in place of single samples.
 */
export function regressedFrequencyHz(track: FrequencyTrack, sampleRateHz: number): number {
  const slope = slopeOf(track.centres, track.deviation, 0, track.centres.length);
  return track.carrierHz + (slope * sampleRateHz) / (2 * Math.PI);
}

/** Slope of the least-squares line through points from up to but not including end. */
export function slopeOf(x: ArrayLike<number>, y: ArrayLike<number>, from: number, end: number): number {
  const count = end - from;
  let meanX = 0;
  let meanY = 0;
  for (let i = from; i < end; i++) {
    meanX += x[i]! / count;
    meanY += y[i]! / count;
  }
  let product = 0;
  let square = 0;
  for (let i = from; i < end; i++) {
    product += (x[i]! - meanX) * (y[i]! - meanY);
    square += (x[i]! - meanX) ** 2;
  }
  return product / square;
}

function firstAtOrBehind(values: Float64Array, limit: number): number {
  let low = 0;
  let high = values.length;
  while (low < high) {
    const middle = (low + high) >> 1;
    if (values[middle]! < limit) low = middle + 1;
    else high = middle;
  }
  return low;
}
