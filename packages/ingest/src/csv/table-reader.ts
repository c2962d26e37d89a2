import type { Resampler } from '../resampling/resampler.js';
import type { SampleSink } from '../types.js';
import type { CsvPlan } from './plan.js';
import { RowCollector } from './row-collector.js';
import { RowParser } from './row-parser.js';
import { makeStampReader } from './stamp-reader.js';
import { TimeAxis } from './time-axis.js';

const LF = 10;
const CR = 13;

/** Reads the rows of a planned table from bytes and hands them on block by block. */
export class TableReader {
  readonly axis: TimeAxis | null;
  readonly collector: RowCollector;
  private readonly parser: RowParser;
  private readonly stamps: ReturnType<typeof makeStampReader> | null;
  private line = 1;

  constructor(
    private readonly plan: CsvPlan,
    private readonly sink: SampleSink,
    private readonly rules: { refusesMissing: boolean; resampler: Resampler | null },
  ) {
    const { layout, channels, encoding } = plan;
    this.axis = layout.time === null ? null : new TimeAxis(layout.time);
    this.stamps = layout.time !== null && layout.time.unit === null ? makeStampReader() : null;
    this.collector = new RowCollector(layout, channels, this.axis, rules.refusesMissing);
    const wanted = layout.columns.map(
      ({ index }) => index === layout.time?.column || channels.some(({ column }) => column === index),
    );
    const text = encoding === 'latin1' ? 'latin1' : 'utf-8';
    this.parser = new RowParser(
      { ...layout.dialect, encoding: text },
      wanted,
      layout.time?.column ?? -1,
      this.stamps?.read ?? null,
    );
  }

  get startText(): string | null {
    return this.stamps?.firstText() ?? null;
  }

  /** Parses whole lines of `bytes`, or all of it when it is the last; returns the bytes used. */
  async read(bytes: Uint8Array, last: boolean): Promise<number> {
    const { collector, parser } = this;
    const end = last ? bytes.length : lastLineEnd(bytes);
    let p = 0;
    collector.begin(bytes);
    while (p < end) {
      if (this.line <= this.plan.layout.dialect.bodyLine) {
        p = nextLine(bytes, p, end);
        this.line += 1;
        continue;
      }
      const rows = collector.takePlain(p, end, this.line);
      if (rows > 0) {
        p = collector.next;
        this.line += rows;
      } else {
        parser.parse(bytes, p, end, this.line);
        p = parser.next;
        const ended = bytes[p - 1] === LF || bytes[p - 1] === CR;
        collector.take(parser, this.line, !ended);
        this.line += 1;
      }
      if (collector.full) await this.flush();
    }
    return end;
  }

  async flush(): Promise<void> {
    const { blocks, stamps, filled } = this.collector;
    if (filled === 0) return;
    const { resampler } = this.rules;
    if (resampler !== null) await resampler.take(stamps, blocks, filled);
    else
      for (const [index, block] of blocks.entries()) await this.sink.write(index, block.subarray(0, filled));
    this.collector.filled = 0;
  }
}

/** Offset after the last line end. A CR as the very last byte may be half of a CRLF and is left for the next window. */
function lastLineEnd(bytes: Uint8Array): number {
  let p = bytes.length;
  while (p > 0 && bytes[p - 1] !== LF && (bytes[p - 1] !== CR || p === bytes.length)) p -= 1;
  return p;
}

function nextLine(bytes: Uint8Array, from: number, end: number): number {
  let p = from;
  while (p < end && bytes[p] !== LF && bytes[p] !== CR) p += 1;
  return bytes[p] === CR && bytes[p + 1] === LF ? Math.min(end, p + 2) : Math.min(end, p + 1);
}
