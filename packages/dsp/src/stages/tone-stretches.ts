import type { FrequencyTrack } from '../fundamental/frequency-track.js';
import { meanFrequencyHz } from '../fundamental/local-frequency.js';
import { keepsPhase } from '../fundamental/phase-wander.js';
import type { PartContext } from '../parts/part-types.js';
import type { SampleRange } from '../parts/reading.js';
import { longestToneStretch } from '../tone/combine-tone-powers.js';
import type { SurveyedFundamental } from './channel-survey.js';

/** A stretch holds so many cycles of the tone at least, so that its harmonics are lines of their own. */
const FEWEST_CYCLES = 64;
/** rms wander of the tone in a stretch: its residue lies 70 dB below the tone. */
const WANDER_RAD = 3e-4;

export interface ToneStretch {
  stretch: SampleRange;
  /** Mean frequency of the tone in it. */
  fundamentalHz: number;
}

/**
 * Equal stretches that a tone is measured in: the whole record when it is short and the tone steady; otherwise halved
 * until the tone keeps its phase within each, since a fit of one frequency would count a wandering tone and its harmonics
 * as noise.
 */
export function toneStretches({
  context: { sampleCount, sampleRateHz },
  fundamental,
  track,
}: {
  context: PartContext;
  fundamental: SurveyedFundamental;
  track: FrequencyTrack | null;
}): ToneStretch[] {
  const mostStretches = (sampleCount / sampleRateHz) * (fundamental.frequencyHz / FEWEST_CYCLES);
  let count = Math.ceil(sampleCount / longestToneStretch);
  while (
    2 * count <= mostStretches &&
    !split(sampleCount, count).every((s) => keepsPhase(track, s.from, s.to, WANDER_RAD))
  ) {
    count *= 2;
  }
  return split(sampleCount, count).map((stretch) => ({
    stretch,
    fundamentalHz:
      track === null || count === 1
        ? fundamental.frequencyHz
        : meanFrequencyHz(track, sampleRateHz, stretch.from, stretch.to),
  }));
}

function split(sampleCount: number, count: number): SampleRange[] {
  return Array.from({ length: count }, (_, i) => ({
    from: Math.floor((i * sampleCount) / count),
    to: Math.floor(((i + 1) * sampleCount) / count),
  }));
}
