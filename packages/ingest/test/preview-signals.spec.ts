import { describe, expect, it } from 'vitest';
import { previewRecording } from '../src/index.js';
import { fixture, readGood } from './support.js';
import { chunk, formatChunk, wavFile } from './wav-builder.js';

const bytesOf = (text: string) => new TextEncoder().encode(text);

/** 16-bit sine of full scale at 50 Hz. */
function sineWav(sampleRateHz: number, count: number): Uint8Array {
  const data = new Uint8Array(2 * count);
  const view = new DataView(data.buffer);
  for (let n = 0; n < count; n += 1)
    view.setInt16(2 * n, Math.round(32767 * Math.sin((2 * Math.PI * 50 * n) / sampleRateHz)), true);
  return wavFile(formatChunk({ channels: 1, rate: sampleRateHz }), chunk('data', data));
}

describe('the beginning of the channels in a preview', () => {
  it.each([
    ['F9-P01.csv', {}],
    ['F9-P25.csv', {}],
    ['F9-P41.wav', {}],
    ['npy-f8-little.npy', { sampleRateHz: 4000 }],
    ['npy-fortran-order.npy', { sampleRateHz: 4000 }],
    ['comtrade-ascii.cff', {}],
    ['comtrade-binary.cff', {}],
  ])('has the values of the reading, scaled: %s', async (name, options) => {
    const bytes = fixture(name);
    const whole = await readGood(bytes, options, name);
    const shown = await previewRecording(bytes, { fileName: name, sizeBytes: bytes.length, options });
    const wanted = whole.channels.slice(0, 8).map(({ gain, offset, column, unit }, c) => ({
      column,
      unit,
      samples: Float64Array.from(whole.samples[c] ?? [], (raw) => gain * raw + offset),
    }));
    expect(shown.problem).toBeNull();
    expect(shown.headSamples).toMatchObject(wanted);
    for (const [c, signal] of shown.signals.entries()) {
      expect(signal).toMatchObject({ startS: whole.startTimeS ?? 0, stepS: 1 / whole.sampleRateHz });
      const samples = wanted[c]?.samples.slice(0, 2000) ?? [];
      expect(signal.values).toEqual(Array.from(samples, (value) => (Number.isNaN(value) ? null : value)));
    }
  });

  it('does not take a cut last line for a row', async () => {
    const rows = Array.from({ length: 40 }, (_, n) => `${(n / 1000).toFixed(3)},${100 + n}`);
    const text = `t (s),u (V)\n${rows.join('\n')}`;
    const shown = await previewRecording(bytesOf(text.slice(0, -2)), { fileName: 'a.csv', sizeBytes: 1e6 });
    expect(shown.headSamples[0]?.samples.at(-1)).toBe(138);
  });

  it('keeps both ends of every bin where full rate would show too little, over four cycles of 50 Hz', async () => {
    const bytes = sineWav(1e6, 100_000);
    const shown = await previewRecording(bytes.subarray(0, 180_000), {
      fileName: 'a.wav',
      sizeBytes: bytes.length,
    });
    const [signal] = shown.signals;
    const values = (signal?.values ?? []) as number[];
    expect(values.length).toBeLessThanOrEqual(2000);
    expect(values.length * (signal?.stepS ?? 0)).toBeCloseTo(0.08, 3);
    // A sine of full scale: highest and lowest code.
    expect([Math.max(...values), Math.min(...values)]).toEqual([32767 / 32768, -32767 / 32768]);
    // sin is within half a bin of the sine itself: 2 pi 50 Hz x 2 steps.
    for (const [n, value] of values.entries()) {
      const time = (n + 0.5) * (signal?.stepS ?? 0);
      expect(Math.abs(value - Math.sin(2 * Math.PI * 50 * time))).toBeLessThan(
        2 * Math.PI * 50 * 2 * (signal?.stepS ?? 0) + 1e-4,
      );
    }
    expect(shown.headSamples[0]?.samples.length).toBe((180_000 - 44) / 2);
  });

  it('shows at most eight channels, those that the options choose', async () => {
    const name = 'F9-P24.csv';
    const bytes = fixture(name);
    const args = { fileName: name, sizeBytes: bytes.length };
    expect((await previewRecording(bytes, args)).signals).toHaveLength(8);
    const channels = [{ column: 9, gain: 2 }];
    const { signals, headSamples } = await previewRecording(bytes, { ...args, options: { channels } });
    const plain = await readGood(bytes, {}, name);
    expect(signals).toMatchObject([{ column: 9 }]);
    expect(headSamples[0]?.samples[0]).toBe(2 * (plain.samples[8]?.[0] as number));
  });

  it('tells a problem that shows only among the rows, by line and column', async () => {
    const rows = Array.from({ length: 300 }, (_, n) => `${n},${n === 250 ? '"1,234.5"' : n}`);
    const bytes = bytesOf(`t (s),u (V)\n${rows.join('\n')}\n`);
    const shown = await previewRecording(bytes, { fileName: 'a.csv', sizeBytes: bytes.length });
    expect(shown).toMatchObject({
      problem: { code: 'thousands-separator', line: 252, column: 2 },
      signals: [],
    });
  });

  it('marks every column that tells the time', async () => {
    const row = (i: number) => `${3 + i},${2135003 + i},${(i * 7) % 11}`;
    const rows = Array.from({ length: 20 }, (_, i) => row(i)).join('\n');
    const bytes = bytesOf(`timestamp_ms,global_ms,accel\n${rows}\n`);
    const args = { fileName: 'a.csv', sizeBytes: bytes.length };
    expect((await previewRecording(bytes, args)).clockColumns).toEqual([0, 1]);
    const without = { ...args, options: { timeColumn: null, sampleRateHz: 1000 } };
    expect((await previewRecording(bytes, without)).clockColumns).toEqual([0]);
    const other = { ...args, options: { timeColumn: 1 } };
    expect((await previewRecording(bytes, other)).clockColumns).toEqual([1, 0]);
    expect((await previewRecording(fixture('F9-P38.wav'), { fileName: 'a.wav' })).clockColumns).toEqual([]);
  });
});
