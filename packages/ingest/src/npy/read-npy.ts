import type { ByteSource } from '../byte-source.js';
import { MissingTally, requireFrames } from '../frames.js';
import type { ImportOptions, ReadChannel, ReadSuccess, ReadWarning, SampleSink } from '../types.js';
import { type NpyHeader, readNpyHeader } from './header.js';
import { describeNpy, npyChannels, npySampleRateHz } from './layout.js';
import { decoderOf } from './samples.js';

const BLOCK_BYTES = 1 << 17;

export interface NpyArguments {
  options: ImportOptions;
  sink: SampleSink;
}

/** Reads the numbers of an array and hands them on; knows what was missing at the end. */
class ArrayReader {
  /** Samples per channel that the file has. */
  frameCount = 0;
  /** True when the file ends before the array does. */
  cut = false;
  readonly missing: MissingTally;
  /** Integers that a double cannot hold exactly. */
  rounded = 0;
  private readonly out = new Float64Array(BLOCK_BYTES);
  private readonly decode: ReturnType<typeof decoderOf>;

  constructor(
    private readonly source: ByteSource,
    private readonly header: NpyHeader,
    private readonly channels: ReadChannel[],
    private readonly sink: SampleSink,
  ) {
    this.missing = new MissingTally(channels);
    this.decode = decoderOf(header.type);
  }

  async read(): Promise<void> {
    if (this.header.planar) await this.readPlanes();
    else await this.readFrames();
  }

  private async readFrames(): Promise<void> {
    const { channelCount, frameCount, type } = this.header;
    const stride = channelCount * type.bytes;
    const blockFrames = Math.max(1, Math.floor(BLOCK_BYTES / stride));
    while (this.frameCount < frameCount) {
      const wanted = Math.min(frameCount - this.frameCount, blockFrames);
      const bytes = await this.source.peek(wanted * stride);
      const frames = Math.floor(bytes.length / stride);
      for (const [index, { column }] of this.channels.entries()) {
        await this.hand(index, bytes, { from: column * type.bytes, stride, frames, sample: this.frameCount });
      }
      this.source.consume(frames * stride);
      this.frameCount += frames;
      if (frames < wanted) {
        this.cut = true;
        return;
      }
    }
  }

  /** Channel after channel. A file that ends early has whole channels and such that are missing from some sample on. */
  private async readPlanes(): Promise<void> {
    const { channelCount, frameCount } = this.header;
    this.frameCount = frameCount;
    for (let plane = 0; plane < channelCount; plane += 1) {
      const read = await this.readPlane(plane);
      if (read < this.frameCount) this.cut = true;
      if (plane === 0) this.frameCount = read;
      await this.fill(plane, this.frameCount - read);
    }
  }

  private async readPlane(plane: number): Promise<number> {
    const { type } = this.header;
    let read = 0;
    while (read < this.frameCount) {
      const wanted = Math.min(this.frameCount - read, BLOCK_BYTES / type.bytes);
      const bytes = await this.source.peek(wanted * type.bytes);
      const frames = Math.floor(bytes.length / type.bytes);
      for (const [index, { column }] of this.channels.entries()) {
        if (column === plane)
          await this.hand(index, bytes, { from: 0, stride: type.bytes, frames, sample: read });
      }
      this.source.consume(frames * type.bytes);
      read += frames;
      if (frames < wanted) break;
    }
    return read;
  }

  private async hand(
    index: number,
    bytes: Uint8Array,
    { from, stride, frames, sample }: { from: number; stride: number; frames: number; sample: number },
  ): Promise<void> {
    if (frames === 0) return;
    const samples = this.out.subarray(0, frames);
    this.decode(bytes, from, stride, frames, samples);
    if (this.header.type.kind === 'f') this.missing.take(index, samples, sample);
    if (this.header.type.bytes === 8 && this.header.type.kind === 'i') this.countRounded(samples);
    await this.sink.write(index, samples);
  }

  private countRounded(samples: Float64Array): void {
    for (const value of samples) if (!Number.isSafeInteger(value)) this.rounded += 1;
  }

  private async fill(plane: number, count: number): Promise<void> {
    for (const [index, { column }] of this.channels.entries()) {
      if (column !== plane) continue;
      for (let left = count; left > 0; left -= this.out.length) {
        await this.sink.write(index, this.out.subarray(0, Math.min(left, this.out.length)).fill(NaN));
      }
      if (count > 0) this.missing.add(index, this.frameCount - count, count);
    }
  }
}

function collectWarnings(header: NpyHeader, reader: ArrayReader): ReadWarning[] {
  const found: ReadWarning[] = [];
  if (reader.cut) {
    const rest =
      header.planar && header.channelCount > 1 ? '; channels that lie behind the end are missing' : '';
    const message = `The header claims ${header.frameCount} samples in ${header.channelCount === 1 ? '1 channel' : `each of ${header.channelCount} channels`} but the file ends earlier; what is there was read, ${reader.frameCount} samples${rest}.`;
    found.push({ code: 'truncated', message, count: 1, samples: [reader.frameCount] });
  }
  found.push(...reader.missing.warnings());
  if (reader.rounded > 0) {
    const message = `Whole numbers beyond 2^53 were rounded to the nearest that a 64-bit float holds: ${reader.rounded} of them.`;
    found.push({ code: 'rounded-values', message, count: reader.rounded });
  }
  return found;
}

/** Reads an .npy file. Refusals travel as `Refusal`; see `readRecording` for the rules. */
export async function readNpy(source: ByteSource, { options, sink }: NpyArguments): Promise<ReadSuccess> {
  let wanted = 1 << 10;
  let header: NpyHeader | number = wanted;
  while (typeof header === 'number') {
    const bytes = await source.peek(wanted);
    header = readNpyHeader(bytes, bytes.length < wanted || source.isLast(bytes.length));
    if (typeof header === 'number') wanted = header;
  }
  const channels = npyChannels(header, options);
  const sampleRateHz = npySampleRateHz(options);
  source.consume(header.dataOffset);
  const stride = header.type.bytes * (header.planar ? 1 : header.channelCount);
  const present = Math.floor((await source.peek(2 * stride)).length / stride);
  requireFrames(Math.min(present, header.frameCount), 'The .npy file');
  await sink.begin(channels);
  const reader = new ArrayReader(source, header, channels, sink);
  await reader.read();
  return {
    ok: true,
    format: 'npy',
    sampleRateHz,
    sampleCount: reader.frameCount,
    channels,
    missingValues: reader.missing.counts,
    startTimeS: null,
    warnings: collectWarnings(header, reader),
    metadata: {},
    layout: describeNpy(header),
  };
}
