import type { FundamentalEstimate } from '../fundamental/find-fundamental.js';
import { assembleTrack, trackLayout, type FrequencyTrack } from '../fundamental/frequency-track.js';
import { regressedFrequencyHz } from '../fundamental/local-frequency.js';
import { keepsPhase } from '../fundamental/phase-wander.js';
import { fitsAsWhole } from '../parts/locate-fundamental.js';
import type { PartContext } from '../parts/part-types.js';
import { PartBatch, type Batches } from './part-batch.js';
import { splitItems } from './split.js';

/** rms wander, in radians of the highest order, that takes 0.1 % of its amplitude in a model of steady frequency. */
const WANDER_RAD = 0.045;

/** What is known of a channel before windows are laid. */
export interface ChannelSurvey {
  context: PartContext;
  /** null when none stands out. */
  fundamental: SurveyedFundamental | null;
  track: FrequencyTrack | null;
  /** Whether one model of steady frequency fits the whole record; otherwise the synchronous windows give the orders. */
  fittedWhole: boolean;
}

export interface SurveyedFundamental {
  /** Over the whole record. */
  frequencyHz: number;
  /** Of the record, or of the stretch that was fitted of a long one. */
  estimate: FundamentalEstimate;
}

/** Fundamental of each channel and how it moves. */
export function* surveyChannels(contexts: readonly PartContext[]): Batches<ChannelSurvey[]> {
  const locating = new PartBatch();
  const located = contexts.map((context) => locating.add({ ...context, kind: 'locate' }));
  yield* locating.run();
  const batch = new PartBatch();
  const surveys = contexts.map((context, i) => surveyChannel(context, located[i]!(), batch));
  yield* batch.run();
  return surveys.map((survey) => survey());
}

function surveyChannel(
  context: PartContext,
  estimate: FundamentalEstimate | null,
  batch: PartBatch,
): () => ChannelSurvey {
  const { sampleRateHz, sampleCount } = context;
  const track = estimate && trackParts(context, estimate.frequencyHz, batch);
  return () => {
    const wholeTrack = track?.() ?? null;
    const limitRad = WANDER_RAD / context.settings.maxOrder;
    const fittedWhole = fitsAsWhole(context) && keepsPhase(wholeTrack, 0, sampleCount, limitRad);
    return {
      context,
      fundamental: estimate && {
        frequencyHz:
          wholeTrack === null || fittedWhole
            ? estimate.frequencyHz
            : regressedFrequencyHz(wholeTrack, sampleRateHz),
        estimate,
      },
      track: wholeTrack,
      fittedWhole,
    };
  };
}

function trackParts(context: PartContext, carrierHz: number, batch: PartBatch): () => FrequencyTrack | null {
  const { sampleRateHz, sampleCount } = context;
  const layout = trackLayout(sampleCount, sampleRateHz, carrierHz);
  const frames = splitItems(layout.frames, layout.hopSamples).map((range) =>
    batch.add({ ...context, kind: 'track', carrierHz, frames: range }),
  );
  return () =>
    assembleTrack(
      layout,
      sampleRateHz,
      carrierHz,
      frames.map((part) => part()),
    );
}
