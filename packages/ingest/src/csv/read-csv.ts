import { ByteSource } from '../byte-source.js';
import { isUsableRate } from '../channels.js';
import { refuse } from '../refusal.js';
import type { TimeRule } from '../resampling/time-rule.js';
import type { ImportOptions, LayoutColumn, ReadSuccess, ReadWarning, SampleSink } from '../types.js';
import { decodeText, guessEncoding, utf16ToUtf8 } from './encoding.js';
import type { CsvLayout } from './layout.js';
import { describeLayout, planCsv, refuseNoSampleRate, requireSampleRate } from './plan.js';
import { TableReader } from './table-reader.js';
import { EVEN } from './time-axis.js';

/** Bytes that are looked at to work out how a table is laid out. */
const HEAD_BYTES = 1 << 17;
const WINDOW_BYTES = 1 << 18;
const MAX_LINE_BYTES = 1 << 22;

export interface CsvArguments {
  fileName: string;
  options: ImportOptions;
  sink: SampleSink;
  time: TimeRule;
}

async function* bytesOf(source: ByteSource): AsyncGenerator<Uint8Array> {
  for (;;) {
    const bytes = await source.peek(WINDOW_BYTES);
    if (bytes.length === 0) return;
    yield bytes;
    source.consume(bytes.length);
  }
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
  gridRateHz: number | null,
): number {
  const measured = gridRateHz ?? reader.axis?.sampleRateHz() ?? layout.statedSampleRateHz;
  const stated = options.sampleRateHz;
  if (stated === undefined) {
    if (measured === null || !Number.isFinite(measured)) {
      refuseNoSampleRate('No sample rate can be had from the time stamps of the file.');
    }
    if (isUsableRate(measured)) return measured;
    refuse(
      'bad-sample-rate',
      `The file gives a sample rate of ${measured} Hz, which is outside 0.001 Hz to 10 GHz.`,
      'Check the unit of the time column, or give the sample rate in hertz.',
    );
  }
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
  const resampler = args.time.resampler(channels.length, args.sink);
  const refusesMissing = args.options.missingValues === 'refuse';
  const reader = new TableReader(plan, args.sink, { refusesMissing, resampler });
  await readRows(source, reader);
  await resampler?.finish();
  const { collector, axis } = reader;
  refuseTooFew(collector.rowCount, args.fileName);
  if (axis !== null) args.time.settle(axis, collector.rowCount);
  const warnings = [
    ...collector.warnings(),
    ...(axis?.warnings(resampler?.treatment ?? EVEN) ?? []),
    ...leftOutWarnings(layout, args.options),
  ];
  const sampleRateHz = chooseRate(reader, layout, args.options, warnings, resampler?.rateHz ?? null);
  const start = reader.startText;
  return {
    ok: true,
    format: 'csv',
    sampleRateHz,
    sampleCount: resampler?.grid.count ?? collector.rowCount,
    channels,
    missingValues: resampler?.missing ?? collector.missing,
    startTimeS: axis?.startS ?? null,
    warnings,
    metadata: start === null ? layout.metadata : { ...layout.metadata, startTime: start },
    layout: describeLayout(plan),
  };
}

function namesOf(columns: LayoutColumn[]): string {
  return columns.map(({ name }) => `"${name}"`).join(', ');
}

function leftOutWarnings(layout: CsvLayout, options: ImportOptions): ReadWarning[] {
  if (options.channels !== undefined && options.channels.length > 0) return [];
  const { leftOut, clocks } = layout;
  const found: ReadWarning[] = [];
  if (leftOut.length > 0) {
    const message = `Columns without numbers in their first rows were left out: ${namesOf(leftOut)}.`;
    found.push({ code: 'columns-left-out', message, count: leftOut.length });
  }
  if (clocks.length > 0) {
    const message = `${namesOf(clocks)} rises in step with the time column, so it was taken as a second clock and left out; choose it as a channel to have it read.`;
    found.push({ code: 'second-clock', message, count: clocks.length });
  }
  return found;
}
