import { textbookSeries } from '@overtally/dsp';
import { describe, expect, it } from 'vitest';
import { cycleCsv, cycleOf, harmonicsCsv, normalised } from './cycle.js';
import { wavFile } from './wav.js';

const series = textbookSeries({ shape: 'square', amplitude: 4, frequencyHz: 49.98, maxOrder: 9 });
const all = new Set([0, ...series.components.map(({ order }) => order)]);
const cycle = cycleOf(series, all, 1024);
const info = { title: 'One cycle', comment: 'A sample of 1 is 4.7 µA', software: 'Overtally' };

/** Chunks of a RIFF file by the layout that the specification prints, without the code under test. */
function chunksOf(file: Uint8Array) {
  const text = (from: number, length: number) =>
    Buffer.from(file.subarray(from, from + length)).toString('latin1');
  const view = new DataView(file.buffer);
  const found: Record<string, Uint8Array> = {};
  expect(text(0, 4) + text(8, 4)).toBe('RIFFWAVE');
  expect(view.getUint32(4, true)).toBe(file.length - 8);
  for (let at = 12; at < file.length;) {
    const length = view.getUint32(at + 4, true);
    found[text(at, 4)] = file.slice(at + 8, at + 8 + length);
    at += 8 + length + (length % 2);
  }
  return found;
}

describe('WAV', () => {
  it.each([
    ['float32', 3, 32, 1e-7],
    ['int16', 1, 16, 0.5 / 32767 + 1e-9],
  ] as const)('%s holds the cycle to its resolution', (encoding, code, bits, tolerance) => {
    const file = wavFile(normalised(cycle), cycle.sampleRateHz, encoding, info);
    const { 'fmt ': format, data } = chunksOf(file);
    const fmt = new DataView(format!.buffer);
    expect([fmt.getUint16(0, true), fmt.getUint16(2, true), fmt.getUint16(14, true)]).toEqual([
      code,
      1,
      bits,
    ]);
    // 1024 points of a cycle of 49.98 Hz: 51 179.52 Sa/s, and the format takes whole numbers.
    expect(fmt.getUint32(4, true)).toBe(51_180);
    const samples = new DataView(data!.buffer);
    expect(data!.length).toBe((1024 * bits) / 8);
    for (const n of [0, 1, 100, 511, 1023]) {
      const read = code === 3 ? samples.getFloat32(4 * n, true) : samples.getInt16(2 * n, true) / 32767;
      expect(Math.abs(read * cycle.fullScale - cycle.values[n]!)).toBeLessThanOrEqual(
        tolerance * cycle.fullScale,
      );
    }
  });

  it('says what it is in INFO, in ASCII', () => {
    const { LIST } = chunksOf(wavFile(normalised(cycle), 48_000, 'int16', info));
    const text = Buffer.from(LIST!).toString('latin1');
    expect(text).toContain('INFO');
    expect(text).toContain('A sample of 1 is 4.7 uA');
  });
});

describe('CSV', () => {
  it('holds one cycle with its times', () => {
    const rows = cycleCsv(cycle, 'V').trim().split('\r\n');
    expect(rows).toHaveLength(1025);
    expect(rows[0]).toBe('Time (s),Value (V)');
    const [time, value] = rows[257]!.split(',').map(Number);
    // A quarter of the cycle: partial sum of 4A/π Σ (−1)^k/(2k+1), the Leibniz series.
    expect(time).toBeCloseTo(1 / (4 * 49.98), 12);
    expect(value).toBeCloseTo(((4 * 4) / Math.PI) * (1 - 1 / 3 + 1 / 5 - 1 / 7 + 1 / 9), 9);
  });

  it('holds the harmonics with both forms of the phase', () => {
    const rows = harmonicsCsv(series, new Set([1, 3]), 'V')
      .trim()
      .split('\r\n');
    expect(rows).toHaveLength(3);
    const [order, frequency, rms, percent, cosine, sine] = rows[2]!.split(',').map(Number);
    expect([order, frequency]).toEqual([3, 3 * 49.98]);
    expect(rms).toBeCloseTo((4 * 4) / (3 * Math.PI) / Math.SQRT2, 12);
    expect(percent).toBeCloseTo(100 / 3, 9);
    // A square wave with its edge at t = 0 is a sum of sines.
    expect(Math.abs(sine!)).toBeLessThan(1e-9);
    expect(cosine).toBeCloseTo(-90, 9);
  });
});
