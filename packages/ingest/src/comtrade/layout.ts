import { checkSampleRateOption, selectChannels } from '../channels.js';
import { quantityFromName } from '../header-cell.js';
import { refuse } from '../refusal.js';
import type { CodeRange, DetectedLayout, ImportOptions, LayoutColumn, ReadChannel } from '../types.js';
import { unitMeaning } from '../units.js';
import type { AnalogChannel } from './analog-channel.js';
import { AsciiRecords } from './ascii-records.js';
import { BinaryRecords } from './binary-records.js';
import type { CffHead } from './cff.js';
import type { ComtradeConfig } from './config.js';
import type { RecordReader } from './records.js';

/** Names of the channels: with the phase where several share a name, with their number where that does not tell them apart. */
function channelNames(analog: AnalogChannel[]): string[] {
  const shared = new Map<string, number>();
  for (const { name } of analog) shared.set(name, (shared.get(name) ?? 0) + 1);
  const seen = new Set<string>();
  return analog.map(({ name, phase }, index) => {
    const full = (shared.get(name) ?? 0) > 1 && phase !== '' ? `${name} ${phase}` : name;
    const unique = seen.has(full) ? `${full} (${index + 1})` : full;
    seen.add(unique);
    return unique;
  });
}

function comtradeColumns({ analog }: ComtradeConfig): LayoutColumn[] {
  const names = channelNames(analog);
  return analog.map(({ unit, a, b }, index) => {
    const name = names[index] as string;
    const quantity = unitMeaning(unit)?.quantity ?? quantityFromName(name) ?? 'other';
    return { index, name, unit, quantity, gain: a, offset: b };
  });
}

/** Raw ends of a channel of integers: the range the configuration states within what the type holds. */
function codeRange({ encoding, analog }: ComtradeConfig, index: number): CodeRange | null {
  if (encoding !== 'binary' && encoding !== 'binary32') return null;
  // The lowest code of the type stands for a missing value.
  const end = encoding === 'binary' ? 0x7fff : 0x7fffffff;
  const { lowest, highest } = analog[index] as AnalogChannel;
  const stated = lowest !== null && highest !== null && lowest < highest;
  return stated
    ? { lowest: Math.max(lowest, -end), highest: Math.min(highest, end) }
    : { lowest: -end, highest: end };
}

const BITS = { ascii: undefined, binary: 16, binary32: 32, float32: 32 };

/** Describes the record in the words of the public interface. */
export function describeComtrade({ config }: CffHead): DetectedLayout {
  const columns = comtradeColumns(config);
  const unitless = columns.filter(({ unit }) => unitMeaning(unit) === null).map(({ name }) => `"${name}"`);
  const doubts = unitless.length === 0 ? [] : [`No unit is known for ${unitless.join(', ')}.`];
  const bitsPerSample = BITS[config.encoding];
  return {
    format: 'comtrade',
    columns,
    ...(bitsPerSample === undefined ? {} : { bitsPerSample }),
    sampleFormat: config.encoding.toUpperCase(),
    confident: doubts.length === 0,
    doubts,
  };
}

/** Analog channels of the record as the options have them. */
export function comtradeChannels({ config }: CffHead, options: ImportOptions): ReadChannel[] {
  checkSampleRateOption(options);
  if (config.analog.length === 0) {
    refuse(
      'no-channels',
      'The COMTRADE record holds status channels only; there are no analog channels in it.',
      'Export a record with at least one analog channel.',
    );
  }
  const columns = comtradeColumns(config);
  const all = columns.map(({ index }) => index);
  const written = config.analog.map(({ name }) => name);
  return selectChannels(options, columns, written, all, (index) => codeRange(config, index));
}

/** Decoder of the record's data for the columns wanted. */
export function recordReader({ config, dataLine }: CffHead, columns: number[]): RecordReader {
  return config.encoding === 'ascii'
    ? new AsciiRecords(config, columns, dataLine)
    : new BinaryRecords(config, config.encoding, columns);
}
