import type { ByteSource } from '../byte-source.js';
import { MissingTally, requireFrames } from '../frames.js';
import { refuse } from '../refusal.js';
import type { ImportOptions, ReadChannel, ReadSuccess, SampleSink } from '../types.js';
import { fourCc, readWavHeader, type WavHeader } from './header.js';
import { readInfoList } from './info-list.js';
import { describeWav, wavChannels } from './layout.js';
import { frameDecoder } from './samples.js';
import { collectWarnings, type Counts } from './warnings.js';

const HEAD_BYTES = 1 << 16;
const MAX_HEADER_BYTES = 1 << 26;
const BLOCK_BYTES = 1 << 17;
const TRAILER_BYTES = 1 << 20;

export interface WavArguments {
  fileName: string;
  options: ImportOptions;
  sink: SampleSink;
}

async function readHeader(source: ByteSource): Promise<WavHeader> {
  let wanted = HEAD_BYTES;
  for (;;) {
    const bytes = await source.peek(wanted);
    const header = readWavHeader(bytes, bytes.length < wanted || source.isLast(bytes.length));
    if (typeof header !== 'number') return header;
    if (header > MAX_HEADER_BYTES) {
      refuse(
        'header-too-long',
        'The WAV file holds a chunk of more than 64 MB before its samples.',
        'Save the recording again without embedded pictures or other extras.',
      );
    }
    wanted = Math.max(header, wanted + 1);
  }
}

async function readSamples(
  source: ByteSource,
  header: WavHeader,
  channels: ReadChannel[],
  sink: SampleSink,
): Promise<Counts> {
  const { format } = header;
  const stride = format.bytesPerSample * format.channelCount;
  const blockFrames = Math.max(1, Math.floor(BLOCK_BYTES / stride));
  const decoder = frameDecoder(format, blockFrames);
  const counts: Counts = { frames: 0, leftover: 0, missing: new MissingTally(channels) };
  let left = header.dataBytes ?? Infinity;
  while (left > 0) {
    const bytes = await source.peek(Math.min(left, blockFrames * stride));
    const frames = Math.floor(bytes.length / stride);
    decoder.begin(bytes.subarray(0, frames * stride));
    for (const [index, channel] of channels.entries()) {
      const samples = decoder.decode(channel.column);
      if (format.encoding === 'float') counts.missing.take(index, samples, counts.frames);
      if (frames > 0) await sink.write(index, samples);
    }
    const used = frames === 0 ? bytes.length : frames * stride;
    source.consume(used);
    left -= used;
    counts.frames += frames;
    if (frames === 0) {
      counts.leftover = bytes.length;
      break;
    }
  }
  return counts;
}

/** Texts in LIST chunks after the samples. Whatever else follows is not looked at. */
async function readTrailer(source: ByteSource, header: WavHeader): Promise<Record<string, string>> {
  if (header.dataBytes === null) return {};
  const bytes = await source.peek(TRAILER_BYTES);
  const view = new DataView(bytes.buffer, bytes.byteOffset, bytes.byteLength);
  const metadata: Record<string, string> = {};
  for (let offset = header.dataBytes % 2; offset + 8 <= bytes.length;) {
    const size = view.getUint32(offset + 4, true);
    const start = offset + 8;
    if (fourCc(bytes, offset) === 'LIST')
      Object.assign(metadata, readInfoList(bytes.subarray(start, start + size)));
    offset = start + size + (size % 2);
  }
  return metadata;
}

async function requireSamples(source: ByteSource, header: WavHeader): Promise<void> {
  const stride = header.format.bytesPerSample * header.format.channelCount;
  const wanted = Math.min(2 * stride, header.dataBytes ?? Infinity);
  const frames = Math.floor((await source.peek(wanted)).length / stride);
  requireFrames(frames, 'The data chunk of the WAV file');
}

/** Reads a WAV file. Refusals travel as `Refusal`; see `readRecording` for the rules. */
export async function readWav(source: ByteSource, args: WavArguments): Promise<ReadSuccess> {
  const { options, sink } = args;
  const header = await readHeader(source);
  const channels = wavChannels(header, options);
  source.consume(header.dataOffset);
  await requireSamples(source, header);
  await sink.begin(channels);
  const counts = await readSamples(source, header, channels, sink);
  const warnings = collectWarnings(header, counts);
  const stated = options.sampleRateHz;
  const own = header.format.sampleRateHz;
  if (stated !== undefined && Math.abs(stated - own) > 0.01 * own) {
    const message = `The sample rate given, ${stated} Hz, is used; the file itself says ${own} Hz.`;
    warnings.push({ code: 'sample-rate-differs', message });
  }
  return {
    ok: true,
    format: 'wav',
    sampleRateHz: stated ?? own,
    sampleCount: counts.frames,
    channels,
    missingValues: counts.missing.counts,
    startTimeS: null,
    warnings,
    metadata: { ...header.metadata, ...(await readTrailer(source, header)) },
    layout: describeWav(header),
  };
}
