import type { ChannelInput } from '@overtally/dsp';
import { readRecording, type ImportOptions, type ReadOutcome } from '@overtally/ingest';
import { createReadStream } from 'node:fs';
import { stat } from 'node:fs/promises';
import { join } from 'node:path';
import type { CaseChannel, CaseFile } from './case-file.js';
import { CannotServe } from './quantities.js';

/** Reads a file by packages/ingest and keeps the raw values of every channel. */
export async function readFileOf(
  folder: string,
  name: string,
  options: ImportOptions,
): Promise<{ outcome: ReadOutcome; samples: Float64Array[] }> {
  const path = join(folder, name);
  const { size } = await stat(path);
  const blocks: Float64Array[][] = [];
  const outcome = await readRecording(() => createReadStream(path), {
    fileName: name,
    sizeBytes: size,
    options,
    sink: {
      begin: (channels) => void blocks.splice(0, blocks.length, ...channels.map(() => [])),
      write: (index, samples) => void blocks[index]!.push(samples.slice()),
    },
  });
  return { outcome, samples: blocks.map(joined) };
}

function joined(blocks: Float64Array[]): Float64Array {
  const all = new Float64Array(blocks.reduce((sum, { length }) => sum + length, 0));
  let at = 0;
  for (const block of blocks) {
    all.set(block, at);
    at += block.length;
  }
  return all;
}

export interface CaseRecord {
  sampleRateHz: number;
  sampleCount: number;
  channels: ChannelInput[];
  /** Names of the channels as the case has them; those of the reader lack the unit. */
  names: string[];
  /** Codes of what the reader noticed. */
  warnings: string[];
}

/** The described channels of a file in engineering values: stored value x scale, of codes counted from `offset_code`. */
export async function readRecord(folder: string, file: CaseFile): Promise<CaseRecord> {
  const described = file.channels ?? [];
  const { outcome, samples } = await readFileOf(folder, file.name, optionsOf(file));
  if (!outcome.ok) throw new CannotServe(`${file.name} is refused: ${outcome.problem.message}`);
  const { sampleRateHz, sampleCount, warnings } = outcome;
  const channels = outcome.channels.map((channel, i): ChannelInput => {
    const scaling = described[i] ?? { name: channel.name, unit: channel.unit, scale: 1, offset_code: 0 };
    const engineering = (raw: number) => (raw - scaling.offset_code) * scaling.scale;
    return {
      index: channel.index,
      name: channel.name,
      quantity: channel.quantity,
      unit: scaling.unit,
      samples: samples[i]!.map(engineering),
      ...codeEnds(file, scaling, channel, engineering),
    };
  });
  const names = channels.map(({ name }, i) => described[i]?.name ?? name);
  return { sampleRateHz, sampleCount, channels, names, warnings: warnings.map(({ code }) => code) };
}

function optionsOf(file: CaseFile): ImportOptions {
  const isTable = /\.csv$/i.test(file.name);
  const hasTime = file.time_column !== undefined && file.time_column !== null;
  const columns = (file.channels ?? []).map(({ name, unit }, i) => ({ column: isTable ? name : i, unit }));
  return {
    ...(columns.length > 0 && { channels: columns }),
    ...(isTable && hasTime && { timeColumn: file.time_column! }),
    ...(isTable &&
      !hasTime &&
      file.sample_rate_hz && { timeColumn: null, sampleRateHz: file.sample_rate_hz }),
  };
}

/** Ends of the integer codes in engineering values: of a WAV by its format; a table of codes counts from 0, or is signed where there is no offset. */
function codeEnds(
  file: CaseFile,
  { offset_code: offset }: CaseChannel,
  { lowestCode, highestCode }: { lowestCode: number | null; highestCode: number | null },
  engineering: (raw: number) => number,
): Pick<ChannelInput, 'lowestCode' | 'highestCode'> {
  if (lowestCode !== null && highestCode !== null) {
    return { lowestCode: engineering(lowestCode), highestCode: engineering(highestCode) };
  }
  const { bits } = file;
  if (typeof bits !== 'number') return {};
  const lowest = offset === 0 ? -(2 ** (bits - 1)) : 0;
  return { lowestCode: engineering(lowest), highestCode: engineering(lowest + 2 ** bits - 1) };
}
