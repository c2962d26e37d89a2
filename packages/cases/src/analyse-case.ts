import {
  analyseRecord,
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

/** Analyses a record as the worker does; what cannot be analysed is left out with the words of the analysis. */
export function analyse({ sampleRateHz, channels }: CaseRecord, settings: AnalysisSettings): RecordAnalysis {
  return analyseRecord({ sampleRateHz, channels, settings });
}

/** Reads and analyses a case of one channel. */
export async function analyseOneChannel(
  folder: string,
  one: ReferenceCase,
  settings: AnalysisSettings,
): Promise<{ channel: ChannelAnalysis; record: CaseRecord }> {
  const record = await recordOf(folder, one);
  return { channel: analyse(record, settings).channels[0]!, record };
}
