import type { ChannelScan } from '../parts/channel-scan.js';
import { finishSpectrum, planSpectrum } from '../parts/spectrum-segments.js';
import type { SpectrumResult } from '../types.js';
import type { ChannelSurvey } from './channel-survey.js';
import type { PartBatch } from './part-batch.js';
import { splitItems } from './split.js';

/** What is seen of a channel whatever its windows are. */
export interface Observation {
  scan: ChannelScan;
  spectrum: SpectrumResult;
}

/** The pass over all samples and the averaged spectrum of a channel. */
export function observeChannel({ context, fundamental }: ChannelSurvey, batch: PartBatch): () => Observation {
  const { sampleCount, sampleRateHz, settings } = context;
  const fundamentalHz = fundamental?.estimate.frequencyHz ?? null;
  const scan = batch.add({ ...context, kind: 'scan', fundamentalHz });
  const plan = planSpectrum(sampleCount, settings);
  const sums = splitItems(plan.segments, plan.segmentLength).map((segments) =>
    batch.add({ ...context, kind: 'spectrum', plan, segments }),
  );
  return () => {
    const parts = sums.map((sum) => sum());
    return { scan: scan(), spectrum: finishSpectrum(plan, parts, sampleRateHz) };
  };
}
