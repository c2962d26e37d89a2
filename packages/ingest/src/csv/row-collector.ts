import { refuseMissing } from '../missing/missing-values.js';
import { refuse } from '../refusal.js';
import type { ReadChannel, ReadWarning } from '../types.js';
import type { CsvLayout } from './layout.js';
import { PlainRows } from './plain-rows.js';
import type { RowParser } from './row-parser.js';
import type { TimeAxis } from './time-axis.js';

const BLOCK_VALUES = 1 << 18;

/** Takes parsed rows into one block of samples per channel, applying the rules for missing, repeated and odd rows. */
export class RowCollector {
  /** Rows in the block. */
  filled = 0;
  rowCount = 0;
  readonly blocks: Float64Array[];
  readonly missing: number[];
  /** Time stamps of the rows in the block, NaN where one is missing; not kept without a time column. */
  readonly stamps: Float64Array;
  private readonly capacity: number;
  private readonly plain: PlainRows | null;
  private readonly previous: Float64Array;
  private missingLine = 0;
  private missingTimes = 0;
  private duplicates = { count: 0, firstLine: 0 };
  private trailingTextLine = 0;
  private tailLow = Infinity;
  private tailHigh = -Infinity;
  private partialLine = 0;

  constructor(
    private readonly layout: CsvLayout,
    private readonly channels: ReadChannel[],
    private readonly axis: TimeAxis | null,
    private readonly refusesMissing: boolean,
  ) {
    this.capacity = Math.max(64, Math.min(16384, Math.floor(BLOCK_VALUES / channels.length)));
    this.plain = PlainRows.create(layout, channels, this.capacity);
    this.blocks = this.plain?.blocks ?? channels.map(() => new Float64Array(this.capacity));
    this.missing = channels.map(() => 0);
    this.stamps = this.plain?.stamps ?? new Float64Array(axis === null ? 0 : this.capacity);
    this.previous = new Float64Array(channels.length);
  }

  get full(): boolean {
    return this.filled === this.capacity;
  }

  /** The bytes that `takePlain` speaks of. */
  begin(bytes: Uint8Array): void {
    this.plain?.begin(bytes);
  }

  /**
   * Takes the rows of plain numbers at `from`, the first of them line `line`; returns how many. They end at `next`.
   */
  takePlain(from: number, end: number, line: number): number {
    const { plain, axis, filled } = this;
    if (plain === null || this.trailingTextLine !== 0) return 0;
    const count = plain.read(from, end, filled, axis?.latest ?? NaN);
    if (count === 0) return 0;
    axis?.pushAll(this.stamps.subarray(filled, filled + count), line, this.rowCount);
    const [low, high] = plain.tails;
    this.tailLow = Math.min(this.tailLow, low);
    this.tailHigh = Math.max(this.tailHigh, high);
    this.filled += count;
    this.rowCount += count;
    for (const [k, block] of this.blocks.entries()) this.previous[k] = block[this.filled - 1] as number;
    return count;
  }

  /** Offset of the byte after the plain rows that were taken last. */
  get next(): number {
    return this.plain?.next ?? 0;
  }

  /** Takes the row that `parser` holds. `unfinished`: it is the last line and has no line end. */
  take(parser: RowParser, line: number, unfinished: boolean): void {
    if (parser.lastFilled < 0 && (parser.cellCount <= 1 || this.axis !== null)) return;
    if (unfinished && this.isCut(parser)) {
      this.partialLine = line;
      return;
    }
    if (this.isText(parser)) {
      if (this.trailingTextLine === 0) this.trailingTextLine = line;
      return;
    }
    if (this.trailingTextLine !== 0) this.refuseText(this.trailingTextLine);
    this.checkWidth(parser, line);
    if (!this.keepTime(parser, line)) return;
    if (parser.tail < this.tailLow) this.tailLow = parser.tail;
    if (parser.tail > this.tailHigh) this.tailHigh = parser.tail;
    this.keepValues(parser, line);
  }

  warnings(): ReadWarning[] {
    const found: ReadWarning[] = [];
    const missing = this.missing.reduce((sum, n) => sum + n, 0) + this.missingTimes;
    if (missing > 0) {
      found.push({
        code: 'missing-values',
        message:
          missing === 1
            ? `1 cell holds no number, at line ${this.missingLine}.`
            : `${missing} cells hold no number, first at line ${this.missingLine}.`,
        count: missing,
        firstLine: this.missingLine,
      });
    }
    if (this.duplicates.count > 0) {
      found.push({
        code: 'duplicate-rows',
        message: `${this.duplicates.count} rows repeat the time and values of the row before, first at line ${this.duplicates.firstLine}; the copies were dropped.`,
        ...this.duplicates,
      });
    }
    if (this.partialLine > 0) {
      const message = `The last line, ${this.partialLine}, is cut off and was dropped.`;
      const place = { firstLine: this.partialLine, samples: [this.rowCount] };
      found.push({ code: 'partial-row', message, count: 1, ...place });
    }
    if (this.trailingTextLine > 0) {
      const message = `Text follows the numbers from line ${this.trailingTextLine} on; it was not read.`;
      found.push({ code: 'trailing-text', message, firstLine: this.trailingTextLine });
    }
    return found;
  }

  private isCut(parser: RowParser): boolean {
    const { columnCount } = this.layout.dialect;
    if (parser.cellCount < columnCount) return true;
    if (parser.cellCount === columnCount && parser.endsBlank) return true;
    const last = parser.kinds[columnCount - 1];
    if (last === 2) return true;
    // A number of a fixed format that ends early: all rows before had the same count of digits, this one has fewer.
    return last === 1 && this.tailLow === this.tailHigh && parser.tail >= 0 && parser.tail < this.tailLow;
  }

  /** A line of another shape without a single number is no row of the table. */
  private isText(parser: RowParser): boolean {
    const { columnCount } = this.layout.dialect;
    const time = this.layout.time;
    // After a line of text, rows that begin with a word belong to it: a table of statistics behind the record.
    if (this.trailingTextLine !== 0 && time !== null && parser.kinds[time.column] !== 1) return true;
    if (parser.kinds.includes(1)) return false;
    if (time !== null) return parser.kinds[time.column] === 2 || parser.cellCount < columnCount;
    return (
      parser.cellCount < columnCount || (columnCount === 1 && parser.kinds[0] === 2 && parser.cellCount > 1)
    );
  }

  private refuseText(line: number): never {
    refuse(
      'text-in-data',
      `Line ${line} holds text in the middle of the rows of numbers.`,
      'Remove the line, or export each part of the record as a file of its own.',
      { line },
    );
  }

  private checkWidth(parser: RowParser, line: number): void {
    const { length } = this.layout.columns;
    if (parser.lastFilled < length) return;
    refuse(
      'too-many-cells',
      `Line ${line} holds ${parser.cellCount} cells where the table has ${length} columns; a thousands separator or a decimal comma may have split a number.`,
      'Export the table with another delimiter or without thousands separators.',
      { line, column: length + 1 },
    );
  }

  /** Follows the time stamp; returns false for a copy of the row before. */
  private keepTime(parser: RowParser, line: number): boolean {
    const { time } = this.layout;
    if (this.axis === null || time === null) return true;
    const kind = parser.kinds[time.column];
    if (kind === 2) {
      refuse(
        'bad-time-stamp',
        `Line ${line}, column ${time.column + 1}: the time stamp is not a number or a time that can be read.`,
        'Correct the time stamp; or state that there is no time column and give the sample rate.',
        { line, column: time.column + 1 },
      );
    }
    if (kind === 0) {
      this.missingTimes += 1;
      this.noteMissing(line, time.column);
      this.axis.skip();
      this.stamps[this.filled] = NaN;
      return true;
    }
    const stamp = parser.cells[time.column] as number;
    if (this.axis.repeats(stamp) && this.equalsPrevious(parser)) {
      if (this.duplicates.count === 0) this.duplicates.firstLine = line;
      this.duplicates.count += 1;
      return false;
    }
    this.axis.push(stamp, line, this.rowCount);
    this.stamps[this.filled] = stamp;
    return true;
  }

  private equalsPrevious(parser: RowParser): boolean {
    return this.channels.every(({ column }, k) => Object.is(parser.cells[column], this.previous[k]));
  }

  private noteMissing(line: number, column: number): void {
    if (this.refusesMissing)
      refuseMissing(`Line ${line}, column ${column + 1}: the cell holds no number`, {
        line,
        column: column + 1,
      });
    if (this.missingLine === 0) this.missingLine = line;
  }

  private keepValues(parser: RowParser, line: number): void {
    const { channels, blocks, previous, filled } = this;
    for (let k = 0; k < channels.length; k += 1) {
      const column = (channels[k] as ReadChannel).column;
      const value = parser.cells[column] as number;
      if (parser.kinds[column] !== 1) {
        this.missing[k] = (this.missing[k] as number) + 1;
        this.noteMissing(line, column);
      }
      previous[k] = value;
      (blocks[k] as Float64Array)[filled] = value;
    }
    this.filled += 1;
    this.rowCount += 1;
  }
}
