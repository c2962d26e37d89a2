import type { ReadProblem } from '@overtally/contracts';
import { ComputeStopped, type ComputeContext } from '../../jobs/compute-task.js';
import { readNpy } from '../../storage/npy.js';
import { MissingValues } from './missing-values.js';
import type { SampleSpan } from './span.js';

const blockSamples = 2 ** 18;

interface Channel {
  name: string;
  samplesKey: string;
  /** Of the whole recording. */
  missingValues: number;
}

/** What `MissingValues` says of the first channel with missing values in the span; null when there is none. */
export async function findMissingValues(
  channels: readonly Channel[],
  span: SampleSpan,
  sampleRateHz: number,
  { storage, shouldStop }: Pick<ComputeContext, 'storage' | 'shouldStop'>,
): Promise<ReadProblem | null> {
  for (const { name, samplesKey, missingValues } of channels) {
    if (missingValues === 0) continue;
    const found = new MissingValues();
    for (let from = span.first; from < span.end; from += blockSamples) {
      if (shouldStop()) throw new ComputeStopped();
      found.add(await readNpy(storage, samplesKey, from, Math.min(span.end, from + blockSamples)));
    }
    const problem = found.problem(name, span.first, sampleRateHz);
    if (problem !== null) return problem;
  }
  return null;
}
