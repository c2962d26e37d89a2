import { Injectable } from '@nestjs/common';
import type { Waveform, WaveformQuery } from '@overtally/contracts';
import { pipeline, Transform, type Readable } from 'node:stream';
import { problem } from '../common/problem.js';
import { asBytes, headerBytes, readNpy } from '../storage/npy.js';
import { Storage } from '../storage/storage.js';
import { coarser } from './reading/pyramid.js';
import { RecordingsRepository, type ChannelRow } from './recordings.repository.js';
import { envelopeOf, planWaveform, type WaveformPlan } from './waveform.js';

/** Samples of a channel in its unit, in part and at any zoom. */
@Injectable()
export class WaveformService {
  constructor(
    private readonly repository: RecordingsRepository,
    private readonly storage: Storage,
  ) {}

  /** The part of the record from `fromS` to `toS`, as samples or as minima and maxima. */
  async part(recordingId: string, query: WaveformQuery): Promise<Waveform> {
    const { channel, sampleRateHz, sampleCount } = await this.channel(recordingId, query.channel);
    const first = Math.min(sampleCount, Math.floor((query.fromS ?? 0) * sampleRateHz));
    const end = Math.min(sampleCount, Math.ceil((query.toS ?? Infinity) * sampleRateHz));
    if (end <= first) {
      const message = `The record lasts ${sampleCount / sampleRateHz} s; ask for a part of it`;
      throw problem(400, 'invalid-request', message, [{ path: 'toS', message }]);
    }
    const plan = planWaveform(sampleCount, first, end, query.points);
    const values = await this.values(channel, plan);
    const stepSamples = plan.kind === 'samples' ? 1 : plan.binSamples;
    return {
      channel: channel.index,
      unit: channel.unit,
      kind: plan.kind,
      fromS: first / sampleRateHz,
      toS: end / sampleRateHz,
      startS: plan.first / sampleRateHz,
      stepS: stepSamples / sampleRateHz,
      ...values,
    };
  }

  /**
   * Samples `first` up to but not including `end` of a channel in its unit, NaN where none is stored; held to the record.
   * @throws as `part`
   */
  async samples(recordingId: string, index: number, first: number, end: number): Promise<Float64Array> {
    const { channel, sampleCount } = await this.channel(recordingId, index);
    const samples = await readNpy(
      this.storage,
      channel.samplesKey,
      Math.max(0, first),
      Math.min(sampleCount, end),
    );
    return samples.map((value) => value * channel.gain + channel.offset);
  }

  /** The whole channel in its unit as an .npy file, with its size in bytes. */
  async asNpy(recordingId: string, index: number): Promise<{ stream: Readable; size: number }> {
    const { channel } = await this.channel(recordingId, index);
    const stream = await this.storage.read(channel.samplesKey);
    const size = await this.storage.size(channel.samplesKey);
    return { stream: scaled(stream, channel), size };
  }

  private async channel(recordingId: string, index: number) {
    const recording = await this.repository.find(recordingId);
    const channel = await this.repository.channel(recordingId, index);
    const { sampleRateHz, sampleCount } = recording ?? {};
    if (channel && sampleRateHz && sampleCount) return { channel, sampleRateHz, sampleCount };
    if (recording?.status === 'received' || recording?.status === 'reading') {
      throw problem(409, 'not-read', 'The recording is still being read');
    }
    throw problem(404, 'no-such-channel', `The recording has no channel ${index}`);
  }

  private async values(
    channel: ChannelRow,
    plan: WaveformPlan,
  ): Promise<Pick<Waveform, 'values' | 'minimum' | 'maximum'>> {
    if (plan.kind === 'samples') {
      const samples = await readNpy(this.storage, channel.samplesKey, plan.first, plan.end);
      return { values: Array.from(samples, scaler(channel)), minimum: [], maximum: [] };
    }
    const pairs = await this.envelope(channel, plan);
    const values = Array.from(pairs, scaler(channel));
    const lower = values.filter((_, i) => i % 2 === 0);
    const upper = values.filter((_, i) => i % 2 === 1);
    // A negative gain turns the signal over, and the lowest sample into the highest value.
    return channel.gain < 0
      ? { values: [], minimum: upper, maximum: lower }
      : { values: [], minimum: lower, maximum: upper };
  }

  private async envelope(
    channel: ChannelRow,
    plan: Extract<WaveformPlan, { kind: 'envelope' }>,
  ): Promise<Float64Array> {
    const { level, first, end, ratio } = plan;
    if (level === null) {
      return envelopeOf(await readNpy(this.storage, channel.samplesKey, first, end), ratio);
    }
    const from = level.offset + (2 * first) / level.factor;
    const to = level.offset + 2 * Math.min(level.bins, Math.ceil(end / level.factor));
    return coarser(await readNpy(this.storage, channel.pyramidKey, from, to), ratio);
  }
}

/** Values in the channel's unit; null where none is stored, or where a damaged one is beyond all numbers. */
function scaler({ gain, offset }: ChannelRow): (raw: number) => number | null {
  return (raw) => {
    const value = raw * gain + offset;
    return Number.isFinite(value) ? value : null;
  };
}

function scaled(stream: Readable, channel: ChannelRow): Readable {
  // A failure of either end destroys both; the reader of the result sees it as the error of the stream.
  return pipeline(stream, scaling(channel), () => undefined);
}

/** Applies gain and offset to an .npy stream of float64, leaving its header as it is. */
function scaling({ gain, offset }: ChannelRow): Transform {
  let header = headerBytes;
  let rest = Buffer.alloc(0);
  return new Transform({
    transform(chunk: Buffer, _encoding, done) {
      const head = chunk.subarray(0, header);
      header -= head.length;
      const body = Buffer.concat([rest, chunk.subarray(head.length)]);
      const whole = body.length - (body.length % 8);
      const values = new Float64Array(whole / 8);
      for (let i = 0; i < values.length; i += 1) values[i] = body.readDoubleLE(8 * i) * gain + offset;
      rest = body.subarray(whole);
      done(null, Buffer.concat([head, asBytes(values)]));
    },
  });
}
