import { refuse } from '../refusal.js';
import type { ComtradeConfig } from './config.js';
import { type RecordReader, WINDOW_BYTES } from './records.js';

const LF = 10;
const NUMBER = /^[-+]?(\d+\.?\d*|\.\d+)(e[-+]?\d+)?$/i;
/** Missing value of the 1991 edition. */
const MISSING_1991 = 99999;

function numberOf(field: string | undefined): number {
  const text = (field ?? '').trim();
  return NUMBER.test(text) ? Number(text) : NaN;
}

/** Records of data as text: n, timestamp, A1 … Ak, D1 … Dm on each line (IEEE C37.111, clause on ASCII data files). */
export class AsciiRecords implements RecordReader {
  readonly stamps: Float64Array;
  readonly values: Float64Array[];
  count = 0;
  cut = false;
  private readonly fieldCount: number;
  private readonly missing: number;
  private readonly lastSample: number | null;

  /** @param line number of the first line of data, for messages */
  constructor(
    config: ComtradeConfig,
    private readonly columns: number[],
    private line: number,
  ) {
    this.fieldCount = 2 + config.analog.length + config.statusCount;
    this.missing = config.revision === 1991 ? MISSING_1991 : NaN;
    this.lastSample = config.lastSample;
    // A record has at least its commas and a line end.
    const capacity = Math.ceil(WINDOW_BYTES / this.fieldCount) + 1;
    this.stamps = new Float64Array(capacity);
    this.values = columns.map(() => new Float64Array(capacity));
  }

  read(bytes: Uint8Array, last: boolean): number {
    this.count = 0;
    // A window that had to grow for a long line is read up to the end of that line, which the block has room for.
    const lineEnd = bytes.length > WINDOW_BYTES ? bytes.indexOf(LF) : bytes.lastIndexOf(LF);
    const end = last && (bytes.length <= WINDOW_BYTES || lineEnd < 0) ? bytes.length : lineEnd + 1;
    if (end === 0) return 0;
    const lines = new TextDecoder('latin1').decode(bytes.subarray(0, end)).split('\n');
    const unfinished = lines.pop() ?? '';
    for (const text of lines) this.readLine(text, false);
    if (unfinished !== '') this.readLine(unfinished, true);
    return end;
  }

  /** A last line without line end is whole only when it is the sample the configuration names as the last. */
  private isCut(fields: string[]): boolean {
    return this.lastSample !== null && numberOf(fields[0]) !== this.lastSample;
  }

  private readLine(text: string, unfinished: boolean): void {
    const { line, columns, fieldCount } = this;
    this.line += 1;
    // A control character marks the end of the file on old systems.
    if (text.replace('\u001a', '').trim() === '') return;
    const fields = text.split(',');
    if (fields.length > fieldCount && fields.at(-1)?.trim() === '') fields.pop();
    if (unfinished && (fields.length < fieldCount || this.isCut(fields))) {
      this.cut = true;
      return;
    }
    if (fields.length !== fieldCount) {
      refuse(
        'wrong-field-count',
        `Line ${line} of the COMTRADE file holds ${fields.length} fields where the configuration lays down ${fieldCount}: number, time stamp, analog and status values.`,
        'Check that configuration and data belong to the same record, and that no line was lost or cut.',
        { line },
      );
    }
    this.stamps[this.count] = numberOf(fields[1]);
    for (const [k, column] of columns.entries()) {
      const value = numberOf(fields[2 + column]);
      (this.values[k] as Float64Array)[this.count] =
        value === this.missing || !Number.isFinite(value) ? NaN : value;
    }
    this.count += 1;
  }
}
