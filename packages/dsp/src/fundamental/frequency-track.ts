import { createDemodulator, type Demodulate } from '../kernels/demodulator.js';
import { createPlanCache } from '../fft/plan-cache.js';
import { readFromMemory, readStretches, type Reading } from '../parts/reading.js';

const FRAME_CYCLES = 10;
/** A frame in which the fundamental is this much weaker than usual says nothing about its frequency. */
const WEAK_FRAME = 0.3;
const FEWEST_FRAMES = 3;

/** Phase of the fundamental against a steady carrier, at the centres of overlapping frames. */
export interface FrequencyTrack {
  carrierHz: number;
  centres: Float64Array;
  /** Unwrapped, radians. */
  deviation: Float64Array;
  /** Mean frequency between successive frame centres. */
  localHz: Float64Array;
}

/** Where the frames of a track lie. */
export interface TrackLayout {
  frameSamples: number;
  /** From the start of one frame to that of the next; may end in a half, starts are rounded. */
  hopSamples: number;
  frames: number;
}

/** Phase against the carrier, not unwrapped, and magnitude of the fundamental in some frames. */
export interface TrackFrames {
  phase: Float64Array;
  magnitude: Float64Array;
}

/** Hann frames of ten cycles of the carrier, half overlapping. */
export function trackLayout(sampleCount: number, sampleRateHz: number, carrierHz: number): TrackLayout {
  const frameSamples = Math.round((FRAME_CYCLES * sampleRateHz) / carrierHz);
  const hopSamples = frameSamples / 2;
  const frames = Math.max(0, Math.floor((sampleCount - frameSamples) / hopSamples) + 1);
  return { frameSamples, hopSamples, frames };
}

const demodulators = createPlanCache<Demodulate>();

function hannDemodulator(length: number, angle: number): Demodulate {
  const weight = (i: number) => 0.5 - 0.5 * Math.cos((2 * Math.PI * (i + 0.5)) / length);
  return createDemodulator(
    Float64Array.from({ length }, (_, i) => weight(i) * Math.cos(angle * i)),
    Float64Array.from({ length }, (_, i) => weight(i) * Math.sin(angle * i)),
  );
}

/** Demodulates a range of frames by the carrier. */
export function* trackFrames(
  layout: TrackLayout,
  sampleRateHz: number,
  carrierHz: number,
  frames: { from: number; to: number },
): Reading<TrackFrames> {
  const length = layout.frameSamples;
  const angle = (2 * Math.PI * carrierHz) / sampleRateHz;
  const demodulate = demodulators.get(`${length} ${angle}`, length, () => hannDemodulator(length, angle));
  const phase = new Float64Array(frames.to - frames.from);
  const magnitude = new Float64Array(phase.length);
  const stretchOf = (frame: number) => {
    const from = Math.round(frame * layout.hopSamples);
    return { from, to: from + length };
  };
  yield* readStretches(frames, stretchOf, (frame, samples, offset) => {
    const { re, im } = demodulate(samples, offset);
    phase[frame - frames.from] = Math.atan2(im, re) - angle * stretchOf(frame).from;
    magnitude[frame - frames.from] = Math.hypot(re, im);
  });
  return { phase, magnitude };
}

/**
 * Puts the frames of a record together: frames in which the fundamental is weak are left out, the phases unwrapped.
 *
 * @param parts of successive ranges, all frames of the layout
 * @returns null when fewer than three frames are left
 */
export function assembleTrack(
  layout: TrackLayout,
  sampleRateHz: number,
  carrierHz: number,
  parts: readonly TrackFrames[],
): FrequencyTrack | null {
  const phase = parts.flatMap((part) => Array.from(part.phase));
  const magnitude = parts.flatMap((part) => Array.from(part.magnitude));
  if (phase.length < FEWEST_FRAMES) return null;
  const median = Float64Array.from(magnitude).sort()[magnitude.length >> 1]!;
  const strong = magnitude.flatMap((value, frame) => (value > WEAK_FRAME * median ? [frame] : []));
  if (strong.length < FEWEST_FRAMES) return null;
  const deviation = unwrap(strong.map((frame) => phase[frame]!));
  const toCentre = (layout.frameSamples - 1) / 2;
  const centres = Float64Array.from(strong, (frame) => Math.round(frame * layout.hopSamples) + toCentre);
  const localHz = new Float64Array(strong.length - 1);
  for (let i = 0; i < localHz.length; i++) {
    const seconds = (centres[i + 1]! - centres[i]!) / sampleRateHz;
    localHz[i] = carrierHz + (deviation[i + 1]! - deviation[i]!) / (2 * Math.PI * seconds);
  }
  return { carrierHz, centres, deviation, localHz };
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
  const layout = trackLayout(samples.length, sampleRateHz, carrierHz);
  const reading = trackFrames(layout, sampleRateHz, carrierHz, { from: 0, to: layout.frames });
  const frames = readFromMemory(reading, samples, () => undefined);
  return assembleTrack(layout, sampleRateHz, carrierHz, [frames]);
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

function unwrap(phases: number[]): Float64Array {
  const out = new Float64Array(phases.length);
  for (let i = 0; i < phases.length; i++) {
    const turns = i === 0 ? 0 : Math.round((phases[i]! - out[i - 1]!) / (2 * Math.PI));
    out[i] = phases[i]! - 2 * Math.PI * turns;
  }
  return out;
}
