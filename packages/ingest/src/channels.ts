import { refuse } from './refusal.js';
import type { ChannelOptions, CodeRange, ImportOptions, LayoutColumn, ReadChannel } from './types.js';
import { unitMeaning } from './units.js';

/** Most channels of one recording; each is a file of its own while it is read. */
const MAX_CHANNELS = 512;

/**
 * Finds a column by 0-based index or by name (as written in the header or without its unit, ignoring case).
 * Refuses one that is not there, naming those that are.
 */
export function findColumn(
  wanted: number | string,
  columns: LayoutColumn[],
  headerCells: string[],
  what: string,
): number {
  if (typeof wanted === 'number' && Number.isInteger(wanted) && columns[wanted] !== undefined) return wanted;
  if (typeof wanted === 'string') {
    const text = wanted.trim().toLowerCase();
    const index = columns.findIndex(
      (column, i) => column.name.toLowerCase() === text || headerCells[i]?.trim().toLowerCase() === text,
    );
    if (index >= 0) return index;
  }
  const known = columns.map((column) => `${column.index} "${column.name}"`).join(', ');
  return refuse(
    'unknown-column',
    `The ${what} "${wanted}" is not in the file. It has these columns: ${known}.`,
    'Choose one of the columns there are, by name or by index counting from 0.',
  );
}

const CURE_SCALING =
  'Give a gain other than zero, a finite offset, and a full scale and probe ratio greater than zero.';

function refuseScaling(column: LayoutColumn, what: string): never {
  return refuse('bad-scaling', `Channel "${column.name}": ${what}.`, CURE_SCALING);
}

/** Full scale x probe ratio, negative where the channel is inverted. */
function inputFactor(
  column: LayoutColumn,
  { fullScale = 1, probeRatio = 1, inverted }: Partial<ChannelOptions>,
) {
  const isFactor = (value: number) => value > 0 && Number.isFinite(value);
  if (!isFactor(fullScale))
    refuseScaling(column, `the full scale ${fullScale} is no number greater than zero`);
  if (!isFactor(probeRatio))
    refuseScaling(column, `the probe ratio ${probeRatio} is no number greater than zero`);
  return fullScale * probeRatio * (inverted === true ? -1 : 1);
}

/**
 * Gain and offset from the raw value to the base unit. `factor`: that of the prefix of the unit. An offset of the
 * options is in the unit of the channel and comes last; one of the file belongs to its gain and goes with it.
 */
function scalingOf(column: LayoutColumn, wanted: Partial<ChannelOptions>, factor: number) {
  const own = wanted.gain ?? column.gain ?? 1;
  const input = inputFactor(column, wanted);
  const gain = own * input * factor;
  const offset = (wanted.offset ?? (column.offset ?? 0) * input) * factor;
  if (!Number.isFinite(gain) || gain === 0)
    refuseScaling(column, `the gain ${own}, times full scale and probe ratio ${gain}, is not usable`);
  if (!Number.isFinite(offset))
    refuseScaling(column, `the offset ${wanted.offset ?? column.offset} is not a usable number`);
  return { gain, offset };
}

function makeChannel(
  index: number,
  column: LayoutColumn,
  wanted: ChannelOptions | undefined,
  range: CodeRange | null,
): ReadChannel {
  const written = wanted?.unit ?? column.unit;
  const meaning = unitMeaning(written);
  return {
    index,
    column: column.index,
    name: wanted?.name ?? column.name,
    quantity:
      wanted?.quantity ?? (wanted?.unit === undefined ? column.quantity : meaning?.quantity) ?? 'other',
    unit: meaning?.base ?? written,
    ...scalingOf(column, wanted ?? {}, meaning?.factor ?? 1),
    lowestCode: range?.lowest ?? null,
    highestCode: range?.highest ?? null,
  };
}

/**
 * Channels to read: those the options select, or every column of `byDefault`. The prefix of a unit goes into the
 * gain, so that gain x raw + offset is in the base unit. A gain or offset of the options stands in place of the file's own;
 * full scale, probe ratio and inversion multiply the gain, whichever it is:
 * gain = (gain of the options, else of the file, else 1) x full scale x probe ratio x (inverted ? -1 : 1) x prefix.
 * @param rangeOf raw ends of a column that holds integer codes
 */
export function selectChannels(
  options: ImportOptions,
  columns: LayoutColumn[],
  headerCells: string[],
  byDefault: number[],
  rangeOf: (column: number) => CodeRange | null = () => null,
): ReadChannel[] {
  if (options.channels === undefined || options.channels.length === 0) {
    if (byDefault.length > MAX_CHANNELS) {
      refuse(
        'too-many-channels',
        `The file holds ${byDefault.length} channels; up to ${MAX_CHANNELS} are read at a time.`,
        `Choose up to ${MAX_CHANNELS} of them, or check the delimiter when the file has fewer.`,
      );
    }
    return byDefault.map((column, index) =>
      makeChannel(index, columns[column] as LayoutColumn, undefined, rangeOf(column)),
    );
  }
  return options.channels.map((wanted, index) => {
    const column = findColumn(wanted.column, columns, headerCells, 'channel');
    return makeChannel(index, columns[column] as LayoutColumn, wanted, rangeOf(column));
  });
}

/** True for a sample rate that a capture can have; from it follow durations and frequencies that are finite. */
export function isUsableRate(rateHz: number): boolean {
  return rateHz >= 1e-3 && rateHz <= 1e10;
}

/** Refuses a sample rate that cannot be one. */
export function checkSampleRateOption(options: ImportOptions): void {
  const rate = options.sampleRateHz;
  if (rate === undefined || isUsableRate(rate)) return;
  refuse(
    'bad-sample-rate',
    `The sample rate given, ${rate} Hz, is not a number from 0.001 Hz to 10 GHz.`,
    'Give the sample rate in hertz, for example 50000.',
  );
}
