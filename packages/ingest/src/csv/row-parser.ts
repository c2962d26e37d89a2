import { refuse } from '../refusal.js';
import type { DecimalMark, Delimiter } from '../types.js';
import { bareCell, cellKind, cellNumber } from './cell.js';
import { decodeText, type TextEncoding } from './encoding.js';
import { NumberScanner, SCANNED } from './number-scanner.js';

const LF = 10;
const CR = 13;
const QUOTE = 34;
const BLANK = 32;
const TAB = 9;

export interface RowDialect {
  delimiter: Delimiter;
  decimal: DecimalMark;
  encoding: TextEncoding;
}

/** Parses the cells of one line at a time from bytes into numbers. */
export class RowParser {
  /** Values of the line parsed last; NaN where a wanted cell holds no number. */
  readonly cells: Float64Array;
  /** Kind of each cell: 1 number, 0 blank or missing, 2 a word. Columns that are not wanted stay 0. */
  readonly kinds: Uint8Array;
  /** Cells on the line parsed last, a trailing blank one included. */
  cellCount = 0;
  /** Index of the last cell on the line that is not blank, -1 when all are. */
  lastFilled = -1;
  /** True when the last cell on the line is blank. */
  endsBlank = false;
  /** Offset of the byte after the line and its end. */
  next = 0;
  /** Digits at the end of the last number, see {@link NumberScanner.tail}; -1 when the last cell is no plain number. */
  tail = -1;
  private readonly scanner: NumberScanner;
  private readonly delimiterByte: number;
  private readonly blankRuns: boolean;

  /**
   * @param wanted for each column, whether its value is needed
   * @param readText turns the text of the time column into a number where it holds calendar or clock stamps
   */
  constructor(
    private readonly dialect: RowDialect,
    private readonly wanted: boolean[],
    private readonly timeColumn: number,
    private readonly readStamp: ((text: string) => number) | null,
  ) {
    this.cells = new Float64Array(wanted.length);
    this.kinds = new Uint8Array(wanted.length);
    this.scanner = new NumberScanner(dialect.decimal.charCodeAt(0));
    this.delimiterByte = dialect.delimiter.charCodeAt(0);
    this.blankRuns = dialect.delimiter === ' ';
  }

  /** Parses the line that begins at `from`; `end` is the end of the bytes. `line` is its number, for messages. */
  parse(bytes: Uint8Array, from: number, end: number, line: number): void {
    const { delimiterByte, blankRuns, wanted, scanner, cells, kinds } = this;
    cells.fill(NaN);
    kinds.fill(0);
    let p = from;
    let column = 0;
    let lastFilled = -1;
    for (;;) {
      p = this.skipBlanks(bytes, p, end);
      if (blankRuns && (p >= end || bytes[p] === LF || bytes[p] === CR)) break;
      const start = p;
      this.tail = -1;
      const quoted = p < end && bytes[p] === QUOTE;
      if (wanted[column] === true && scanner.scan(bytes, quoted ? p + 1 : p, end) === SCANNED) {
        p = scanner.next;
        const closed = !quoted || (p < end && bytes[p] === QUOTE);
        p = this.skipBlanks(bytes, quoted && closed ? p + 1 : p, end);
        const byte = p < end ? (bytes[p] as number) : LF;
        const ends = byte === delimiterByte || byte === LF || byte === CR || (blankRuns && p > scanner.next);
        if (closed && ends) {
          cells[column] = scanner.value;
          kinds[column] = 1;
          this.tail = scanner.tail;
        } else p = this.parseText(bytes, start, end, column, line);
      } else p = this.parseText(bytes, start, end, column, line);
      this.endsBlank = p === start;
      if (!this.endsBlank) lastFilled = column;
      column += 1;
      if (p >= end || bytes[p] === LF || bytes[p] === CR) break;
      if (!blankRuns) p += 1;
    }
    this.cellCount = column;
    this.lastFilled = lastFilled;
    this.next = p >= end ? end : bytes[p] === CR && p + 1 < end && bytes[p + 1] === LF ? p + 2 : p + 1;
  }

  private skipBlanks(bytes: Uint8Array, from: number, end: number): number {
    let p = from;
    while (p < end && (bytes[p] === BLANK || (bytes[p] === TAB && this.delimiterByte !== TAB))) p += 1;
    return p;
  }

  /** Parses a cell that is not a plain number; returns the offset of the delimiter or line end behind it. */
  private parseText(bytes: Uint8Array, start: number, end: number, column: number, line: number): number {
    let p = start;
    let inQuotes = false;
    for (; p < end; p += 1) {
      const byte = bytes[p] as number;
      if (byte === LF || byte === CR) break;
      if (byte === QUOTE) inQuotes = !inQuotes;
      else if (!inQuotes && (byte === this.delimiterByte || (this.blankRuns && byte === TAB))) break;
    }
    if (this.wanted[column] !== true) return p;
    const text = bareCell(decodeText(bytes.subarray(start, p), this.dialect.encoding));
    this.keepText(text, column, line);
    return p;
  }

  private keepText(text: string, column: number, line: number): void {
    const { decimal } = this.dialect;
    const kind = cellKind(text, decimal);
    const place = { line, column: column + 1 };
    if (kind === 'grouped') {
      refuse(
        'thousands-separator',
        `Line ${line}, column ${column + 1}: "${text}" seems to hold a thousands separator, which cannot be told from a decimal mark with certainty.`,
        'Export the numbers without thousands separators.',
        place,
      );
    }
    if (kind === 'other-mark') {
      refuse(
        'mixed-decimal-marks',
        `Line ${line}, column ${column + 1}: "${text}" is not written with the decimal mark "${decimal}" of the rest of the table.`,
        'State the decimal mark of the file, or export it with one decimal mark throughout.',
        place,
      );
    }
    if (column === this.timeColumn && this.readStamp !== null) {
      this.cells[column] = this.readStamp(text);
      this.kinds[column] = Number.isNaN(this.cells[column])
        ? kind === 'blank' || kind === 'missing'
          ? 0
          : 2
        : 1;
      return;
    }
    if (kind === 'number') {
      const value = cellNumber(text, decimal);
      this.cells[column] = Number.isFinite(value) ? value : NaN;
      this.kinds[column] = Number.isFinite(value) ? 1 : 2;
    } else this.kinds[column] = kind === 'blank' || kind === 'missing' ? 0 : 2;
  }
}
