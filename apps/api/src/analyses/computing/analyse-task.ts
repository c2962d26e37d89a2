import type { ChannelAnalysis, Quantity, ReadProblem, Settings } from '@overtally/contracts';
import {
  AnalysisInputError,
  analyseRecord,
  AnalysisStopped,
  type ChannelAnalysis as EngineChannel,
  type ChannelInput,
} from '@overtally/dsp';
import { ComputeStopped, type ComputeContext } from '../../jobs/compute-task.js';
import { putNpy, readNpy } from '../../storage/npy.js';
import { missingValuesProblem } from './missing-values.js';
import { tooLongProblem } from './record-length.js';

export interface AnalyseTaskChannel {
  index: number;
  name: string;
  quantity: Quantity;
  unit: string;
  gain: number;
  offset: number;
  lowestCode: number | null;
  highestCode: number | null;
  samplesKey: string;
}

export interface AnalyseTaskInput {
  channels: AnalyseTaskChannel[];
  sampleRateHz: number;
  sampleCount: number;
  settings: Settings;
  /** Prefix of the keys under which the spectra are stored. */
  outputPrefix: string;
}

export interface StoredSpectrum {
  spectrumKey: string;
  spectrumWindow: string;
  spectrumStartHz: number;
  spectrumStepHz: number;
}

export type AnalyseTaskResult =
  | {
      ok: true;
      engineVersion: string;
      /** The settings with every default filled in. */
      settings: Settings;
      channels: (ChannelAnalysis & StoredSpectrum)[];
    }
  | { ok: false; problem: ReadProblem };

/** Analyses stored samples and stores the spectra; samples that cannot be analysed are a result, not an error. */
export async function analyseTask(
  input: AnalyseTaskInput,
  context: ComputeContext,
): Promise<AnalyseTaskResult> {
  const { settings, sampleRateHz } = input;
  const { first, end } = spanInSamples(input);
  if (end - first < 2) return { ok: false, problem: spanProblem(input) };
  const tooLong = tooLongProblem(end - first, input.channels.length, sampleRateHz);
  if (tooLong !== null) return { ok: false, problem: tooLong };
  const channels: ChannelInput[] = [];
  for (const channel of input.channels) {
    const samples = await loadScaled(channel, first, end, context);
    const problem = missingValuesProblem(channel.name, samples, first, sampleRateHz);
    if (problem !== null) return { ok: false, problem };
    channels.push({ ...channel, samples, ...codesInUnit(channel) });
  }
  try {
    const result = analyseRecord(
      { sampleRateHz, channels, settings },
      { onProgress: context.reportProgress, shouldStop: context.shouldStop },
    );
    const stored = [];
    for (const channel of result.channels)
      stored.push(await storeSpectrum(channel, input.outputPrefix, context));
    const { cyclesPerWindow, ...resolved } = result.settings;
    const used = { ...resolved, ...(cyclesPerWindow !== null && { cyclesPerWindow }) };
    return {
      ok: true,
      engineVersion: result.engineVersion,
      settings: { ...used, ...(settings.span && { span: settings.span }) },
      channels: stored,
    };
  } catch (error) {
    if (error instanceof AnalysisStopped) throw new ComputeStopped();
    if (error instanceof AnalysisInputError) return { ok: false, problem: inputProblem(error) };
    throw error;
  }
}

function spanInSamples({ settings: { span }, sampleRateHz, sampleCount }: AnalyseTaskInput) {
  if (span === undefined) return { first: 0, end: sampleCount };
  return {
    first: Math.min(sampleCount, Math.round(span.fromS * sampleRateHz)),
    end: Math.min(sampleCount, Math.round(span.toS * sampleRateHz)),
  };
}

/** A channel's part in its unit. */
async function loadScaled(
  { samplesKey, gain, offset }: AnalyseTaskChannel,
  first: number,
  end: number,
  { storage, shouldStop }: ComputeContext,
): Promise<Float64Array> {
  if (shouldStop()) throw new ComputeStopped();
  const samples = await readNpy(storage, samplesKey, first, end);
  for (let i = 0; i < samples.length; i += 1) samples[i] = samples[i]! * gain + offset;
  return samples;
}

function codesInUnit({ lowestCode, highestCode, gain, offset }: AnalyseTaskChannel) {
  if (lowestCode === null || highestCode === null) return { lowestCode: undefined, highestCode: undefined };
  const ends = [lowestCode * gain + offset, highestCode * gain + offset];
  return { lowestCode: Math.min(...ends), highestCode: Math.max(...ends) };
}

async function storeSpectrum(
  channel: EngineChannel,
  prefix: string,
  { storage }: ComputeContext,
): Promise<ChannelAnalysis & StoredSpectrum> {
  const { spectrum, ...figures } = channel;
  const spectrumKey = `${prefix}/spectrum-${channel.index}.npy`;
  await putNpy(storage, spectrumKey, spectrum.rms);
  return {
    ...figures,
    quantity: channel.quantity as Quantity,
    interharmonics: channel.interharmonics.flatMap(({ betweenOrders, groupRms, centredSubgroupRms }) =>
      groupRms === null || centredSubgroupRms === null
        ? []
        : [{ betweenOrders, groupRms, centredSubgroupRms }],
    ),
    spectrumKey,
    spectrumWindow: spectrum.window,
    spectrumStartHz: spectrum.startHz,
    spectrumStepHz: spectrum.stepHz,
  };
}

function spanProblem({ settings: { span }, sampleRateHz, sampleCount }: AnalyseTaskInput): ReadProblem {
  const duration = `${sampleCount / sampleRateHz} s`;
  return span === undefined
    ? {
        code: 'record-too-short',
        message: `The record holds ${sampleCount} ${sampleCount === 1 ? 'sample' : 'samples'}; an analysis needs at least 2.`,
        cure: 'Capture a longer record; for the mains profile at least 10 cycles.',
      }
    : {
        code: 'span-outside-record',
        message: `From ${span.fromS} s to ${span.toS} s the record of ${duration} holds fewer than 2 samples.`,
        cure: `Choose a span within 0 s and ${duration}.`,
      };
}

function inputProblem({ message }: AnalysisInputError): ReadProblem {
  return { code: 'cannot-be-analysed', message, cure: 'Change the settings or the span and analyse again.' };
}
