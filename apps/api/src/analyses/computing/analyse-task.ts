import type {
  ChannelAnalysis,
  Flag,
  PowerPair,
  Quantity,
  ReadProblem,
  ReadWarning,
  Settings,
  ThreePhase,
} from '@overtally/contracts';
import {
  AnalysisInputError,
  analyseSource,
  type AnalysisPart,
  type ChannelDescription,
  type PartResult,
  type RecordAnalysis,
} from '@overtally/dsp';
import { ComputeStopped, type ComputeContext } from '../../jobs/compute-task.js';
import { findMissingValues } from './find-missing-values.js';
import type { PartTaskInput } from './part-task.js';
import { gapsWithin, readingFlags } from './reading-flags.js';
import { spanInSamples, spanProblem, type SampleSpan } from './span.js';
import { storeChannel, type StoredArrays } from './store-channel.js';

export interface AnalyseTaskChannel {
  index: number;
  name: string;
  quantity: Quantity;
  unit: string;
  gain: number;
  offset: number;
  lowestCode: number | null;
  highestCode: number | null;
  /** Of the whole recording. */
  missingValues: number;
  samplesKey: string;
}

export interface AnalyseTaskInput {
  channels: AnalyseTaskChannel[];
  sampleRateHz: number;
  sampleCount: number;
  /** What the reader noticed. */
  warnings: ReadWarning[];
  settings: Settings;
  /** Prefix of the keys under which spectra and series are stored. */
  outputPrefix: string;
}

export type AnalyseTaskResult =
  | {
      ok: true;
      engineVersion: string;
      /** The settings with every default filled in. */
      settings: Settings;
      channels: (ChannelAnalysis & StoredArrays)[];
      power: PowerPair[];
      threePhase: ThreePhase[];
    }
  | { ok: false; problem: ReadProblem };

/**
 * Analyses stored samples and stores spectra and series; samples that cannot be analysed are a result, not an error. The
 * parts of the analysis are computed by other threads, each of which reads the samples it needs.
 */
export async function analyseTask(
  input: AnalyseTaskInput,
  context: ComputeContext,
): Promise<AnalyseTaskResult> {
  const span = spanInSamples(input);
  if (span.end - span.first < 2) return { ok: false, problem: spanProblem(input) };
  const missing = await findMissingValues(input.channels, span, input.sampleRateHz, context);
  if (missing !== null) return { ok: false, problem: missing };
  try {
    return await store(input, span, await analyse(input, span, context), context);
  } catch (error) {
    if (hasName(error, 'AnalysisStopped')) throw new ComputeStopped();
    if (hasName(error, 'AnalysisInputError')) return { ok: false, problem: inputProblem(error) };
    throw error;
  }
}

function analyse(
  { settings, sampleRateHz, channels, warnings }: AnalyseTaskInput,
  span: SampleSpan,
  { reportProgress, shouldStop, delegate, workers }: ComputeContext,
): Promise<RecordAnalysis> {
  const { first, end } = span;
  const stored = new Map(
    channels.map(({ index, samplesKey, gain, offset }) => [index, { samplesKey, gain, offset, first }]),
  );
  const runPart = async (part: AnalysisPart, onProgress: (fraction: number) => void): Promise<PartResult> => {
    const task: PartTaskInput = { part, samples: stored.get(part.channel.index)! };
    return (await delegate('analysis-part', task, onProgress)) as PartResult;
  };
  const gapsBefore = gapsWithin(warnings, span);
  const source = {
    sampleRateHz,
    sampleCount: end - first,
    channels: channels.map(described),
    settings,
    gapsBefore,
  };
  return analyseSource(source, { runPart, parallel: workers, onProgress: reportProgress, shouldStop });
}

function described(channel: AnalyseTaskChannel): ChannelDescription {
  const { index, name, quantity, unit, lowestCode, highestCode, gain, offset } = channel;
  if (lowestCode === null || highestCode === null) return { index, name, quantity, unit };
  const ends = [lowestCode * gain + offset, highestCode * gain + offset];
  return { index, name, quantity, unit, lowestCode: Math.min(...ends), highestCode: Math.max(...ends) };
}

async function store(
  { settings, warnings, sampleRateHz, outputPrefix }: AnalyseTaskInput,
  span: SampleSpan,
  analysis: RecordAnalysis,
  { storage, shouldStop }: ComputeContext,
): Promise<AnalyseTaskResult> {
  const flags = readingFlags(warnings, span, sampleRateHz);
  const channels: (ChannelAnalysis & StoredArrays)[] = [];
  for (const channel of analysis.channels) {
    if (shouldStop()) throw new ComputeStopped();
    const stored = await storeChannel(storage, outputPrefix, channel);
    channels.push({ ...stored, flags: bySeverity([...stored.flags, ...flags]) });
  }
  const { engineVersion, power, threePhase } = analysis;
  const { cyclesPerWindow, ...resolved } = analysis.settings;
  const used = { ...resolved, ...(cyclesPerWindow !== null && { cyclesPerWindow }) };
  return {
    ok: true,
    ...{ engineVersion, channels, power, threePhase },
    settings: { ...used, ...(settings.span && { span: settings.span }) },
  };
}

const severities: Flag['severity'][] = ['error', 'warning', 'info'];

function bySeverity(flags: Flag[]): Flag[] {
  return flags.sort((a, b) => severities.indexOf(a.severity) - severities.indexOf(b.severity));
}

/** By name: an error that comes from another thread keeps its name but not its class. */
function hasName(error: unknown, name: string): error is Error {
  return error instanceof Error && error.name === name;
}

function inputProblem({ message }: Pick<AnalysisInputError, 'message'>): ReadProblem {
  return { code: 'cannot-be-analysed', message, cure: 'Change the settings or the span and analyse again.' };
}
