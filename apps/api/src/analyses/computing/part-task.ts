import { AnalysisInputError, computePart, type AnalysisPart, type PartResult } from '@overtally/dsp';
import type { ComputeContext } from '../../jobs/compute-task.js';
import { readScaled, type StoredSamples } from './stored-samples.js';

export interface PartTaskInput {
  part: AnalysisPart;
  /** Of the channel that the part is about. */
  samples: StoredSamples;
}

/** Samples that may be in memory at once: 512 MiB, beside a transform of about three times that. */
const mostSamplesAtOnce = 2 ** 26;

/** Computes a part of an analysis from stored samples, which are read block by block. */
export function partTask({ part, samples }: PartTaskInput, context: ComputeContext): Promise<PartResult> {
  const { reportProgress, shouldStop, storage } = context;
  return computePart(part, (_channel, from, to) => readBlock(storage, samples, from, to), {
    onProgress: reportProgress,
    shouldStop,
  });
}

/** A block is longer than a few megabytes only where one window, or one cycle, is. */
function readBlock(
  storage: ComputeContext['storage'],
  samples: StoredSamples,
  from: number,
  to: number,
): Promise<Float64Array> {
  if (to - from <= mostSamplesAtOnce) return readScaled(storage, samples, from, to);
  throw new AnalysisInputError(
    `A window of ${to - from} samples does not fit into memory. ` +
      'Choose fewer cycles per window, a shorter span or a higher nominal frequency.',
  );
}
