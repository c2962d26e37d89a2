import type { ByteSource } from '../byte-source.js';
import { isUsableRate } from '../channels.js';
import { EVEN, TimeAxis } from '../csv/time-axis.js';
import { MissingTally, requireFrames } from '../frames.js';
import { refuse } from '../refusal.js';
import type { Resampler } from '../resampling/resampler.js';
import type { TimeRule } from '../resampling/time-rule.js';
import type { ImportOptions, ReadChannel, ReadSuccess, ReadWarning, SampleSink } from '../types.js';
import { type CffHead, readCffHead } from './cff.js';
import { comtradeChannels, describeComtrade, recordReader } from './layout.js';
import { comtradeMetadata } from './metadata.js';
import { type RecordReader, WINDOW_BYTES } from './records.js';
import { Stamps } from './stamps.js';
import { configWarnings, dataWarnings } from './warnings.js';

const MAX_LINE_BYTES = 1 << 22;

export interface ComtradeArguments {
  options: ImportOptions;
  sink: SampleSink;
  time: TimeRule;
}

async function readHead(source: ByteSource): Promise<CffHead> {
  let wanted = 1 << 16;
  for (;;) {
    const bytes = await source.peek(wanted);
    const head = readCffHead(bytes, bytes.length < wanted || source.isLast(bytes.length));
    if (typeof head !== 'number') return head;
    wanted = head;
  }
}

/** Reads the data block by block; what it counts stands in the fields at the end. */
class DataReader {
  frameCount = 0;
  readonly missing: MissingTally;
  private begun = false;
  private held: Float64Array[] = [];

  constructor(
    readonly records: RecordReader,
    private readonly channels: ReadChannel[],
    private readonly stamps: Stamps,
    private readonly sink: SampleSink,
    private readonly resampler: Resampler | null,
  ) {
    this.missing = new MissingTally(channels);
  }

  async read(source: ByteSource, dataBytes: number | null): Promise<void> {
    let left = dataBytes ?? Infinity;
    let window = WINDOW_BYTES;
    while (left > 0) {
      const wanted = Math.min(left, window);
      const bytes = await source.peek(wanted);
      if (bytes.length === 0) break;
      const last = wanted === left || bytes.length < wanted || source.isLast(bytes.length);
      const used = this.records.read(bytes, last);
      await this.hand();
      source.consume(used);
      left -= used;
      if (used === 0 && last) break;
      window = used === 0 ? window * 2 : WINDOW_BYTES;
      if (window > MAX_LINE_BYTES) refuseLongRecord();
    }
    requireFrames(this.frameCount, 'The DAT section of the COMTRADE file');
  }

  private async hand(): Promise<void> {
    const { count, values, stamps } = this.records;
    this.stamps.take(stamps, count, this.frameCount);
    const blocks = values.map((block) => block.subarray(0, count));
    for (const [index, block] of blocks.entries()) this.missing.take(index, block, this.frameCount);
    this.frameCount += count;
    if (this.resampler !== null) {
      if (!this.begun) await this.sink.begin(this.channels);
      this.begun = true;
      await this.resampler.take(stamps, blocks, count);
      return;
    }
    if (!this.begun && this.frameCount < 2) {
      // Nothing is begun before it is certain that there is a record.
      this.held = blocks.map((block, i) => Float64Array.from([...(this.held[i] ?? []), ...block]));
      return;
    }
    if (!this.begun) {
      this.begun = true;
      await this.sink.begin(this.channels);
      for (const [index, block] of this.held.entries())
        if (block.length > 0) await this.sink.write(index, block);
    }
    for (const [index, block] of blocks.entries()) if (count > 0) await this.sink.write(index, block);
  }
}

function refuseLongRecord(): never {
  refuse(
    'line-too-long',
    'The data of the COMTRADE file hold a record of more than four million bytes.',
    'Check that configuration and data belong to the same record.',
  );
}

function chooseRate(head: CffHead, options: ImportOptions, stamps: Stamps, warnings: ReadWarning[]): number {
  const own = head.config.sampleRateHz ?? stamps.sampleRateHz();
  const stated = options.sampleRateHz;
  if (stated !== undefined) {
    if (own !== null && Math.abs(stated - own) > 0.01 * own) {
      const message = `The sample rate given, ${stated} Hz, is used; the file itself says ${Number(own.toPrecision(6))} Hz.`;
      warnings.push({ code: 'sample-rate-differs', message });
    }
    return stated;
  }
  if (own !== null && isUsableRate(own)) return own;
  return refuse(
    'needs-sample-rate',
    'The COMTRADE record states no sampling rate, and none can be had from its time stamps.',
    'Give the sample rate in hertz.',
  );
}

/** Reads a single-file COMTRADE record. Refusals travel as `Refusal`; see `readRecording` for the rules. */
export async function readComtrade(source: ByteSource, args: ComtradeArguments): Promise<ReadSuccess> {
  const { options, sink } = args;
  const head = await readHead(source);
  const channels = comtradeChannels(head, options);
  source.consume(head.dataOffset);
  const { config } = head;
  const columns = channels.map(({ column }) => column);
  const isText = config.encoding === 'ascii';
  const ruled = config.sampleRateHz === null && options.sampleRateHz === undefined;
  const axis = ruled
    ? new TimeAxis(
        { column: 1, unit: 'units', secondsPerUnit: config.secondsPerStamp },
        { row: 'record', otherwise: 'or give the sample rate' },
      )
    : null;
  const stamps = new Stamps(config.secondsPerStamp, axis);
  const resampler = args.time.resampler(channels.length, sink);
  const reader = new DataReader(recordReader(head, columns), channels, stamps, sink, resampler);
  await reader.read(source, isText ? null : head.dataBytes);
  await resampler?.finish();
  if (axis !== null) args.time.settle(axis, reader.frameCount);
  const warnings = [
    ...dataWarnings(head, reader.frameCount, reader.records.cut),
    ...reader.missing.warnings(),
    ...stamps.warnings(config.sampleRateHz, resampler?.treatment ?? EVEN),
    ...configWarnings(head, channels, options),
  ];
  const sampleRateHz = resampler?.rateHz ?? chooseRate(head, options, stamps, warnings);
  const layout = describeComtrade(head);
  const names = (layout.columns ?? []).map(({ name }) => name);
  return {
    ok: true,
    format: 'comtrade',
    sampleRateHz,
    sampleCount: resampler?.grid.count ?? reader.frameCount,
    channels,
    missingValues: resampler?.missing ?? reader.missing.counts,
    startTimeS: stamps.startS,
    warnings,
    metadata: comtradeMetadata(head, names),
    layout,
  };
}
