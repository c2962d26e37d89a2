import { ByteSource } from '../byte-source.js';
import { checkSampleRateOption, selectChannels } from '../channels.js';
import { refuse } from '../refusal.js';
import type {
  DetectedLayout,
  ImportOptions,
  ReadChannel,
  ReadSuccess,
  ReadWarning,
  SampleSink,
} from '../types.js';
import { decodeText, guessEncoding, type TextEncoding, looksBinary, utf16ToUtf8 } from './encoding.js';
import { type CsvLayout, detectLayout } from './layout.js';
import { splitLines } from './lines.js';
import { RowCollector } from './row-collector.js';
import { RowParser } from './row-parser.js';
import { makeStampReader } from './stamp-reader.js';
import { TimeAxis } from './time-axis.js';

/** Bytes that are looked at to work out how a table is laid out. */
export const HEAD_BYTES = 1 << 17;
const WINDOW_BYTES = 1 << 18;
const MAX_LINE_BYTES = 1 << 22;
const LF = 10;
const CR = 13;

export interface CsvArguments {
  fileName: string;
  options: ImportOptions;
  sink: SampleSink;
}

/** The table as understood from the head of the file, ready to be read. */
export interface CsvPlan {
  layout: CsvLayout;
  channels: ReadChannel[];
  encoding: TextEncoding;
}

async function* bytesOf(source: ByteSource): AsyncGenerator<Uint8Array> {
  for (;;) {
    const bytes = await source.peek(WINDOW_BYTES);
    if (bytes.length === 0) return;
    yield bytes;
    source.consume(bytes.length);
  }
}

/** Refuses bytes that are no text. */
export function refuseBinary(text: string, fileName: string): void {
  if (!looksBinary(text)) return;
  refuse(
    'not-a-capture',
    `"${fileName}" holds binary data that is not recognised: it is not text and has no RIFF or RF64 header of a WAV file.`,
    'Upload a table of numbers as text (CSV) or a WAV file.',
  );
}

/**
 * Plans the reading of a table from its first lines.
 * Refuses tables from which no sample rate can be had and options that do not fit.
 */
export function planCsv(
  text: string,
  encoding: TextEncoding,
  complete: boolean,
  args: Omit<CsvArguments, 'sink'>,
): CsvPlan {
  const { options, fileName } = args;
  checkSampleRateOption(options);
  refuseBinary(text, fileName);
  const lines = splitLines(text);
  if (!complete && lines.length > 1) lines.pop();
  const layout = detectLayout(lines, fileName, options);
  const channels = selectChannels(options, layout.columns, layout.headerCells, layout.valueColumns, null);
  if (channels.length === 0) {
    refuse(
      'no-channels',
      `"${fileName}" holds a time column but no column of values.`,
      'Export at least one channel beside the time.',
    );
  }
  return { layout, channels, encoding };
}

/** Refuses a table that tells nothing of its sample rate. */
export function requireSampleRate({ layout }: CsvPlan, options: ImportOptions): void {
  if (layout.time !== null || layout.statedSampleRateHz !== null || options.sampleRateHz !== undefined)
    return;
  refuse(
    'needs-sample-rate',
    'The file has no time column and states no sample rate or sample interval.',
    'Give the sample rate in hertz, or name the time column.',
  );
}

/** Describes the plan in the words of the public interface. */
export function describeLayout({ layout, encoding }: CsvPlan): DetectedLayout {
  return {
    format: 'csv',
    encoding,
    delimiter: layout.dialect.delimiter,
    decimal: layout.dialect.decimal,
    headerRows: layout.dialect.bodyLine,
    unitsRow: layout.unitsLine === null ? null : layout.unitsLine + 1,
    timeColumn: layout.time?.column ?? null,
    timeUnit: layout.time?.unit ?? null,
    columns: layout.columns,
    confident: layout.doubts.length === 0,
    doubts: layout.doubts,
  };
}

/** Reads the rows of a planned table from bytes and hands them on block by block. */
class TableReader {
  readonly axis: TimeAxis | null;
  readonly collector: RowCollector;
  private readonly parser: RowParser;
  private readonly stamps: ReturnType<typeof makeStampReader> | null;
  private line = 1;

  constructor(
    private readonly plan: CsvPlan,
    private readonly sink: SampleSink,
  ) {
    const { layout, channels, encoding } = plan;
    this.axis = layout.time === null ? null : new TimeAxis(layout.time.column);
    this.stamps = layout.time !== null && layout.time.unit === null ? makeStampReader() : null;
    this.collector = new RowCollector(layout, channels, this.axis);
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
    const end = last ? bytes.length : lastLineEnd(bytes);
    let p = 0;
    while (p < end) {
      if (this.line <= this.plan.layout.dialect.bodyLine) p = nextLine(bytes, p, end);
      else {
        this.parser.parse(bytes, p, end, this.line);
        p = this.parser.next;
        const ended = bytes[p - 1] === LF || bytes[p - 1] === CR;
        this.collector.take(this.parser, this.line, !ended);
      }
      this.line += 1;
      if (this.collector.full) await this.flush();
    }
    return end;
  }

  async flush(): Promise<void> {
    const { blocks, filled } = this.collector;
    if (filled === 0) return;
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

async function readRows(source: ByteSource, reader: TableReader): Promise<void> {
  let window = WINDOW_BYTES;
  for (;;) {
    const bytes = await source.peek(window);
    if (bytes.length === 0) break;
    const used = await reader.read(bytes, bytes.length < window || source.isLast(bytes.length));
    source.consume(used);
    if (used === 0) window *= 2;
    if (window > MAX_LINE_BYTES) {
      refuse(
        'line-too-long',
        'The file holds a line of more than four million characters.',
        'Check that the file is a table with line ends.',
      );
    }
  }
  await reader.flush();
}

function chooseRate(
  reader: TableReader,
  layout: CsvLayout,
  options: ImportOptions,
  warnings: ReadWarning[],
): number {
  const measured = reader.axis?.sampleRateHz() ?? layout.statedSampleRateHz;
  const stated = options.sampleRateHz;
  if (stated === undefined) return measured as number;
  if (measured !== null && Math.abs(stated - measured) > 0.01 * measured) {
    const message = `The sample rate given, ${stated} Hz, is used; the file itself says ${Number(measured.toPrecision(6))} Hz.`;
    warnings.push({ code: 'sample-rate-differs', message });
  }
  return stated;
}

function refuseTooFew(rows: number, fileName: string): void {
  if (rows >= 2) return;
  refuse(
    rows === 0 ? 'no-samples' : 'too-few-samples',
    rows === 0
      ? `"${fileName}" holds no rows of numbers.`
      : `"${fileName}" holds one row of numbers only; at least two are needed.`,
    'Upload a record with at least two samples per channel.',
  );
}

/** Reads a table of numbers. Refusals travel as `Refusal`; see `readRecording` for the rules. */
export async function readCsv(input: ByteSource, args: CsvArguments): Promise<ReadSuccess> {
  const { encoding, bomBytes } = guessEncoding(await input.peek(HEAD_BYTES));
  input.consume(bomBytes);
  const source = encoding.startsWith('utf-16')
    ? new ByteSource(utf16ToUtf8(bytesOf(input), encoding))
    : input;
  const head = await source.peek(HEAD_BYTES);
  const text = decodeText(head, source === input ? encoding : 'utf-8');
  const plan = planCsv(text, encoding, source.isLast(head.length), args);
  requireSampleRate(plan, args.options);
  const { layout, channels } = plan;
  await args.sink.begin(channels);
  const reader = new TableReader(plan, args.sink);
  await readRows(source, reader);
  const { collector, axis } = reader;
  refuseTooFew(collector.rowCount, args.fileName);
  const warnings = [
    ...collector.warnings(),
    ...(axis?.warnings() ?? []),
    ...leftOutWarnings(layout, args.options),
  ];
  const sampleRateHz = chooseRate(reader, layout, args.options, warnings);
  const start = reader.startText;
  return {
    ok: true,
    format: 'csv',
    sampleRateHz,
    sampleCount: collector.rowCount,
    channels,
    missingValues: collector.missing,
    startTimeS: axis === null || Number.isNaN(axis.firstStampS) ? null : axis.firstStampS,
    warnings,
    metadata: start === null ? layout.metadata : { ...layout.metadata, startTime: start },
    layout: describeLayout(plan),
  };
}

function leftOutWarnings(layout: CsvLayout, options: ImportOptions): ReadWarning[] {
  if (options.channels !== undefined || layout.leftOut.length === 0) return [];
  const names = layout.leftOut.map(({ name }) => `"${name}"`).join(', ');
  const message = `Columns without numbers in their first rows were left out: ${names}.`;
  return [{ code: 'columns-left-out', message, count: layout.leftOut.length }];
}
