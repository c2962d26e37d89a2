import { decode } from 'wav-decoder';
import { describe, expect, it } from 'vitest';
import { fixture, readBad, readGood } from './support.js';
import { chunk, formatChunk, join, wavFile } from './wav-builder.js';

const text = (value: string) => new TextEncoder().encode(value);
const samples16 = (...codes: number[]) => new Uint8Array(Int16Array.from(codes).buffer);
const pair = chunk('data', samples16(1000, -1000));

describe('samples against an independent decoder', () => {
  // Reference: the wav-decoder package 1.3.0. It gives single precision and divides positive codes by one step less
  // than full scale, hence the tolerances.
  it.each([
    ['F9-P38.wav', '16 bit', 2 ** -15],
    ['F9-P39.wav', '24 bit', 2 ** -23],
    ['F9-P40.wav', '32 bit', 2 ** -24],
    ['F9-P41.wav', 'float 32', 0],
    ['F9-P42.wav', 'float 64', 2 ** -23],
    ['F9-P37.wav', '8 bit', 2 ** -7],
  ])('%s, %s', async (name, _format, tolerance) => {
    const bytes = fixture(name);
    const reference = await decode(bytes.slice().buffer);
    const { samples, sampleRateHz } = await readGood(bytes, {}, name);
    expect(sampleRateHz).toBe(reference.sampleRate);
    expect(samples).toHaveLength(reference.channelData.length);
    reference.channelData.forEach((wanted, channel) => {
      expect(samples[channel]).toHaveLength(wanted.length);
      const worst = Math.max(
        ...Array.from(wanted, (value, i) => Math.abs(value - (samples[channel]?.[i] ?? NaN))),
      );
      expect(worst).toBeLessThanOrEqual(tolerance);
    });
  });
});

// Left-justification, pad bytes and sizes: Microsoft/IBM RIFF WAVE specification 1.0 (1991); WAVE_FORMAT_EXTENSIBLE.
describe('WAV files', () => {
  it('scales integer codes by the container and says where the codes end', async () => {
    const extremes = chunk('data', samples16(-32768, 32767, 0));
    const { samples, channels } = await readGood(wavFile(formatChunk(), extremes));
    expect(samples[0]).toEqual([-1, 32767 / 32768, 0]);
    expect(channels[0]).toMatchObject({ lowestCode: -1, highestCode: 32767 / 32768, name: 'ch1', unit: '' });
  });

  it('takes 12 bits in 16 as left-justified', async () => {
    const { samples, channels } = await readGood(
      wavFile(formatChunk({ bits: 12 }), chunk('data', samples16(0x7ff0, -32768))),
    );
    expect(samples[0]).toEqual([2047 / 2048, -1]);
    expect(channels[0]?.highestCode).toBe(2047 / 2048);
  });

  it('knows no end codes for floats and counts values that are no numbers', async () => {
    const floats = new Uint8Array(Float32Array.from([0.5, NaN, Infinity, 2]).buffer);
    const read = await readGood(wavFile(formatChunk({ tag: 3, bits: 32 }), chunk('data', floats)));
    expect(read.samples[0]).toEqual([0.5, NaN, NaN, 2]);
    expect(read.missingValues).toEqual([2]);
    expect(read.channels[0]?.lowestCode).toBeNull();
    expect(read.warnings.map(({ code }) => code)).toEqual(['missing-values']);
  });

  it('reads texts of LIST chunks before and after the samples', async () => {
    const info = (id: string, value: string) => chunk('LIST', join(text('INFO'), chunk(id, text(value))));
    const { metadata } = await readGood(
      wavFile(formatChunk(), info('ISFT', 'Recorder 7\0'), pair, info('INAM', 'Run 3')),
    );
    expect(metadata).toEqual({ software: 'Recorder 7', title: 'Run 3' });
  });

  it('steps over a large chunk before the samples', async () => {
    const { sampleCount } = await readGood(
      wavFile(formatChunk(), chunk('JUNK', new Uint8Array(300001)), pair),
    );
    expect(sampleCount).toBe(2);
  });

  it('selects and scales channels as the options say', async () => {
    const stereo = wavFile(formatChunk({ channels: 2 }), chunk('data', samples16(1, 16384, 3, -16384)));
    const channels = [{ column: 'ch2', name: 'U supply', unit: 'kV', gain: 0.4 }];
    const read = await readGood(stereo, { channels, sampleRateHz: 9000 });
    expect(read.samples).toEqual([[0.5, -0.5]]);
    expect(read.channels[0]).toMatchObject({
      column: 1,
      name: 'U supply',
      unit: 'V',
      quantity: 'voltage',
      gain: 400,
    });
    expect(read.sampleRateHz).toBe(9000);
    expect(read.warnings.map(({ code }) => code)).toEqual(['sample-rate-differs']);
  });

  it.each([
    [
      'a channel that is not there',
      wavFile(formatChunk(), pair),
      { channels: [{ column: 4 }] },
      'unknown-column',
      /ch1/,
    ],
    ['one sample', wavFile(formatChunk(), chunk('data', samples16(1))), {}, 'too-few-samples', /one sample/],
    ['5000 channels', wavFile(formatChunk({ channels: 5000 }), pair), {}, 'too-many-channels', /5000/],
    ['64-bit integers', wavFile(formatChunk({ bits: 64 }), pair), {}, 'bad-format-chunk', /64 bits/],
    ['MP3 in WAV', wavFile(formatChunk({ tag: 0x55 }), pair), {}, 'unsupported-encoding', /MP3/],
    ['an AVI file', chunk('RIFF', text('AVI LIST')), {}, 'not-a-capture', /RIFF/],
    ['a negative rate', wavFile(formatChunk(), pair), { sampleRateHz: -1 }, 'bad-sample-rate', /-1 Hz/],
  ])('refuses %s', async (_what, bytes, options, code, message) => {
    const problem = await readBad(bytes, options);
    expect(problem.code).toBe(code);
    expect(problem.message).toMatch(message);
    expect(problem.cure).not.toBe('');
  });
});
