import { isUsableRate } from '../channels.js';
import { refuse } from '../refusal.js';
import { type AnalogChannel, parseAnalogChannel } from './analog-channel.js';
import { type ConfigLine, numberField, refuseConfig } from './config-line.js';

export type DataEncoding = 'ascii' | 'binary' | 'binary32' | 'float32';

/** What the configuration of a COMTRADE record says. */
export interface ComtradeConfig {
  station: string;
  device: string;
  revision: number;
  analog: AnalogChannel[];
  statusCount: number;
  lineFrequencyHz: number | null;
  /** Null: the time stamps rule. */
  sampleRateHz: number | null;
  /** Number of the last sample, null where none is stated. */
  lastSample: number | null;
  /** Date and time of the first sample and of the trigger, in ISO 8601 where they can be read so. */
  start: string;
  trigger: string;
  encoding: DataEncoding;
  /** Seconds per unit of the time stamps. */
  secondsPerStamp: number;
}

const ENCODINGS: DataEncoding[] = ['ascii', 'binary', 'binary32', 'float32'];
const MAX_CHANNELS = 999_999;

/** Hands out the lines one after the other. */
class Lines {
  private at = 0;
  constructor(private readonly lines: ConfigLine[]) {}

  next(what: string): ConfigLine {
    const line = this.lines[this.at];
    if (line === undefined) {
      const last = this.lines.at(-1)?.number ?? 1;
      refuseConfig(last, `the configuration ends after this line, where ${what} is expected`);
    }
    this.at += 1;
    return line;
  }

  /** The next line when there is one that is not blank. */
  optional(): ConfigLine | null {
    const line = this.lines[this.at];
    this.at += 1;
    return line === undefined || line.fields.every((field) => field === '') ? null : line;
  }
}

function parseCounts({ fields, number }: ConfigLine): { analog: number; status: number } {
  const analog = /^(\d+)A$/i.exec(fields[1] ?? '')?.[1];
  const status = /^(\d+)D$/i.exec(fields[2] ?? '')?.[1];
  if (analog === undefined || status === undefined || Math.max(+analog, +status) > MAX_CHANNELS) {
    refuseConfig(number, 'the counts of channels are expected here, such as "8,6A,2D"');
  }
  return { analog: Number(analog), status: Number(status) };
}

function parseRates(lines: Lines): { sampleRateHz: number | null; lastSample: number | null } {
  const head = lines.next('the count of sampling rates');
  const count = numberField(head, 0, 'the count of sampling rates');
  if (!Number.isInteger(count) || count < 0) {
    refuseConfig(head.number, `the count of sampling rates is "${head.fields[0]}"`);
  }
  const rates = new Set<number>();
  let lastSample: number | null = null;
  for (let i = 0; i < Math.max(1, count); i += 1) {
    const line = lines.next('a sampling rate with its last sample');
    const rate = numberField(line, 0, 'the sampling rate');
    if (rate !== 0 && !isUsableRate(rate)) {
      refuseConfig(line.number, `the sampling rate is ${rate} Hz, outside 0.001 Hz to 10 GHz`);
    }
    rates.add(count === 0 ? 0 : rate);
    const last = numberField(line, 1, 'the number of the last sample');
    lastSample = Number.isSafeInteger(last) && last > 0 ? last : null;
  }
  if (rates.size > 1) {
    refuse(
      'several-sampling-rates',
      `Line ${head.number}: the record has ${count} sections with the sampling rates ${[...rates].slice(0, 10).join(', ')} Hz; one rate is needed throughout.`,
      'Export the sections of each sampling rate as a record of its own.',
      { line: head.number },
    );
  }
  const [rate = 0] = rates;
  return { sampleRateHz: rate === 0 ? null : rate, lastSample };
}

/** Date and time as ISO 8601; as written where they have another form. 1991 puts the month first. */
function dateTime({ fields }: ConfigLine, revision: number): string {
  const [date = '', time = ''] = fields;
  const parts = /^(\d{1,2})\/(\d{1,2})\/(\d{2}|\d{4})$/.exec(date);
  if (parts === null) return [date, time].filter((part) => part !== '').join(' ');
  const [, first = '', second = '', year = ''] = parts;
  const [day, month] = revision === 1991 ? [second, first] : [first, second];
  const century = Number(year) >= 70 ? '19' : '20';
  return `${year.length === 2 ? century : ''}${year}-${month.padStart(2, '0')}-${day.padStart(2, '0')}T${time}`;
}

function parseEncoding(line: ConfigLine): DataEncoding {
  const written = line.fields[0] ?? '';
  const found = ENCODINGS.find((encoding) => encoding === written.toLowerCase());
  return (
    found ??
    refuseConfig(
      line.number,
      `the type of the data is "${written}"; ${ENCODINGS.join(', ').toUpperCase()} are known`,
    )
  );
}

/**
 * Reads the configuration of a COMTRADE record (IEEE C37.111-1991, -1999 and -2013, which is IEC 60255-24), clause on
 * the configuration file. Leading blanks are tolerated; what is missing or malformed is refused with its line.
 */
export function parseConfig(all: ConfigLine[]): ComtradeConfig {
  const lines = new Lines(all);
  const [station = '', device = '', year = ''] = lines.next('the name of the station').fields;
  const revision = Number(year) || 1991;
  const counts = parseCounts(lines.next('the counts of channels'));
  const analog: AnalogChannel[] = [];
  for (let i = 0; i < counts.analog; i += 1)
    analog.push(parseAnalogChannel(lines.next('an analog channel'), i));
  for (let i = 0; i < counts.status; i += 1) lines.next('a status channel');
  const frequency = Number(lines.next('the line frequency').fields[0] || NaN);
  const rates = parseRates(lines);
  const start = lines.next('the date and time of the first sample');
  const trigger = lines.next('the date and time of the trigger');
  const encoding = parseEncoding(lines.next('the type of the data'));
  const multiplier = Number(lines.optional()?.fields[0] || 1);
  const inNanoseconds = [start, trigger].some(({ fields }) => /\.\d{7,}$/.test(fields[1] ?? ''));
  return {
    station,
    device,
    revision,
    analog,
    statusCount: counts.status,
    lineFrequencyHz: Number.isFinite(frequency) ? frequency : null,
    ...rates,
    start: dateTime(start, revision),
    trigger: dateTime(trigger, revision),
    encoding,
    secondsPerStamp:
      (inNanoseconds ? 1e-9 : 1e-6) * (multiplier > 0 && Number.isFinite(multiplier) ? multiplier : 1),
  };
}
