import type { CountedFrequency } from '../types.js';
import { deviationAt, type FrequencyTrack } from './frequency-track.js';

const INTERVAL_S = 10;
/** Rising zero crossings of a cosine lie at −90°. */
const RISING = -0.25;
/** Frames of the track farther apart than this many usual distances leave a hole: the fundamental was too weak. */
const HOLE = 1.5;

/**
 * Frequency by counted cycles (IEC 61000-4-30:2015, 5.1.1): for each 10 s interval, the number of integral cycles counted
 * within it divided by the cumulative duration of those cycles. Intervals do not overlap, cycles that reach over the end
 * of an interval are left out, and a last incomplete interval is not given. The first interval begins at the first sample,
 * not on a tick of the clock, which the record does not tell.
 *
 * The standard asks for harmonics and interharmonics to be attenuated before crossings are counted. Here the phase of
 * the demodulated fundamental does that: a carrier of the mean frequency and Hann frames of ten cycles are a band-pass
 * filter around the fundamental with zeros at all its harmonics (side lobes below −31 dB, falling by 18 dB per octave)
 * and without phase shift. The output of that filter is √2 X cos φ(t), and it rises through zero exactly where φ(t)
 * passes −90° + k·360°: reading these instants from the phase is the same as counting crossings of the filtered wave,
 * without the noise of single crossings. Between frames φ is taken as linear; a change of 1 Hz/s puts a crossing off by
 * less than 0.0013 cycles, which is 0.3 mHz in 10 s.
 *
 * Intervals in which the fundamental was too weak to be followed are left out.
 *
 * @param track phase of the fundamental, from `frequencyTrack`
 * @returns one entry per whole interval in rising order; empty for records below 10 s
 */
export function countedFrequency(
  track: FrequencyTrack,
  sampleRateHz: number,
  sampleCount: number,
): CountedFrequency[] {
  const cyclesAt = (position: number): number =>
    (track.carrierHz * position) / sampleRateHz + deviationAt(track, position) / (2 * Math.PI) - RISING;
  const length = INTERVAL_S * sampleRateHz;
  const holes = holesIn(track);
  const out: CountedFrequency[] = [];
  // A record of whole intervals must not lose the last one by rounding.
  for (let k = 0; (k + 1) * length <= sampleCount * (1 + 1e-12); k++) {
    const [from, to] = [k * length, (k + 1) * length];
    const first = Math.ceil(cyclesAt(from));
    const last = Math.floor(cyclesAt(to));
    if (last <= first || holes.some((hole) => hole.from < to && hole.to > from)) continue;
    const duration = crossing(cyclesAt, last, from, to) - crossing(cyclesAt, first, from, to);
    const cycles = last - first;
    out.push({ startS: k * INTERVAL_S, frequencyHz: (cycles * sampleRateHz) / duration, cycles });
  }
  return out;
}

/** Where the count of cycles reaches `whole`, by bisection: the phase rises all the way. */
function crossing(cyclesAt: (position: number) => number, whole: number, from: number, to: number): number {
  let [low, high] = [from, to];
  for (let i = 0; i < 60; i++) {
    const middle = (low + high) / 2;
    if (cyclesAt(middle) < whole) low = middle;
    else high = middle;
  }
  return (low + high) / 2;
}

/** Stretches of the record, in samples, over which the track says nothing. */
function holesIn({ centres }: FrequencyTrack): { from: number; to: number }[] {
  const steps = Float64Array.from({ length: centres.length - 1 }, (_, i) => centres[i + 1]! - centres[i]!);
  const usual = Float64Array.from(steps).sort()[steps.length >> 1]!;
  const last = centres[centres.length - 1]!;
  const holes = [
    { from: -Infinity, to: centres[0]! - HOLE * usual },
    { from: last + HOLE * usual, to: Infinity },
  ];
  steps.forEach((step, i) => {
    if (step > HOLE * usual) holes.push({ from: centres[i]!, to: centres[i + 1]! });
  });
  return holes;
}
