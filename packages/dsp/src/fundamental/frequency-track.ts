const FRAME_CYCLES = 10;
/** A frame in which the fundamental is this much weaker than usual says nothing about its frequency. */
const WEAK_FRAME = 0.3;

/** Phase of the fundamental against a steady carrier, at the centres of overlapping frames. */
export interface FrequencyTrack {
  carrierHz: number;
  centres: Float64Array;
  /** Unwrapped, radians. */
  deviation: Float64Array;
  /** Mean frequency between successive frame centres. */
  localHz: Float64Array;
}

/**
 * Follows the fundamental through a record: demodulation by a carrier of its mean frequency, Hann frames of ten cycles,
 * half overlapping; the phase difference of neighbouring frames is the local frequency.
 *
 * @returns null when the record holds fewer than three such frames
 */
export function frequencyTrack(
  samples: Float64Array,
  sampleRateHz: number,
  carrierHz: number,
): FrequencyTrack | null {
  const length = Math.round((FRAME_CYCLES * sampleRateHz) / carrierHz);
  const hop = length / 2;
  const count = Math.floor((samples.length - length) / hop) + 1;
  if (count < 3) return null;
  const frames = demodulate(samples, (2 * Math.PI * carrierHz) / sampleRateHz, length, hop, count);
  const threshold = WEAK_FRAME * frames.map((f) => f.magnitude).sort((a, b) => a - b)[count >> 1]!;
  const strong = frames.filter((f) => f.magnitude > threshold);
  if (strong.length < 3) return null;
  const deviation = unwrap(strong.map((f) => f.phase));
  const centres = Float64Array.from(strong, (f) => f.centre);
  const localHz = new Float64Array(strong.length - 1);
  for (let i = 0; i < localHz.length; i++) {
    const seconds = (centres[i + 1]! - centres[i]!) / sampleRateHz;
    localHz[i] = carrierHz + (deviation[i + 1]! - deviation[i]!) / (2 * Math.PI * seconds);
  }
  return { carrierHz, centres, deviation, localHz };
}

/** The phase deviation at any sample position, linear between frame centres and beyond the outer ones. */
export function deviationAt(track: FrequencyTrack, position: number): number {
  const { centres, deviation } = track;
  let i = 0;
  let high = centres.length - 2;
  while (i < high) {
    const middle = (i + high + 1) >> 1;
    if (centres[middle]! <= position) i = middle;
    else high = middle - 1;
  }
  const share = (position - centres[i]!) / (centres[i + 1]! - centres[i]!);
  return deviation[i]! + share * (deviation[i + 1]! - deviation[i]!);
}

interface Frame {
  centre: number;
  phase: number;
  magnitude: number;
}

function demodulate(
  samples: Float64Array,
  angle: number,
  length: number,
  hop: number,
  count: number,
): Frame[] {
  const cosine = new Float64Array(length);
  const sine = new Float64Array(length);
  for (let i = 0; i < length; i++) {
    const weight = 0.5 - 0.5 * Math.cos((2 * Math.PI * (i + 0.5)) / length);
    cosine[i] = weight * Math.cos(angle * i);
    sine[i] = weight * Math.sin(angle * i);
  }
  return Array.from({ length: count }, (_, j) => {
    const start = Math.round(j * hop);
    let re = 0;
    let im = 0;
    for (let i = 0; i < length; i++) {
      re += samples[start + i]! * cosine[i]!;
      im -= samples[start + i]! * sine[i]!;
    }
    return {
      centre: start + (length - 1) / 2,
      phase: Math.atan2(im, re) - angle * start,
      magnitude: Math.hypot(re, im),
    };
  });
}

function unwrap(phases: number[]): Float64Array {
  const out = new Float64Array(phases.length);
  for (let i = 0; i < phases.length; i++) {
    const turns = i === 0 ? 0 : Math.round((phases[i]! - out[i - 1]!) / (2 * Math.PI));
    out[i] = phases[i]! - 2 * Math.PI * turns;
  }
  return out;
}
