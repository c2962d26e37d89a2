import {
  analyseSource,
  computePart,
  type AnalysisSettings,
  type ChannelAnalysis,
  type RecordAnalysis,
} from '@overtally/dsp';
import { z } from 'zod';
import type { ReferenceCase } from './case-file.js';
import { CannotServe } from './quantities.js';
import { readRecord, type CaseRecord } from './read-record.js';

const number = z.number().optional().catch(undefined);

/** Settings that any case may carry. */
export const commonSettings = z.object({ nominal_hz: number, orders: number });

/** Nominal frequency of a case, else the whole range is searched. */
export function nominalOf({ analysis }: ReferenceCase): AnalysisSettings['nominalFrequencyHz'] {
  return commonSettings.parse(analysis).nominal_hz ?? 'auto';
}

/** Reads the one file of a case. */
export async function recordOf(folder: string, { files }: ReferenceCase): Promise<CaseRecord> {
  const [file] = files;
  if (file === undefined) throw new CannotServe('the case has no file');
  return readRecord(folder, file);
}

/** Analyses a record part by part, as the worker of the server does. */
export function analyse(record: CaseRecord, settings: AnalysisSettings): Promise<RecordAnalysis> {
  const { sampleRateHz, sampleCount } = record;
  const samples = new Map(record.channels.map((channel) => [channel.index, channel.samples]));
  const channels = record.channels.map(({ samples: _samples, ...description }) => description);
  return analyseSource(
    { sampleRateHz, sampleCount, channels, settings },
    {
      runPart: (part, onProgress) =>
        computePart(part, (index, from, to) => samples.get(index)!.subarray(from, to), { onProgress }),
    },
  );
}

/** Reads and analyses a case of one channel. */
export async function analyseOneChannel(
  folder: string,
  one: ReferenceCase,
  settings: AnalysisSettings,
): Promise<ChannelAnalysis> {
  const { channels } = await analyse(await recordOf(folder, one), settings);
  return channels[0]!;
}
