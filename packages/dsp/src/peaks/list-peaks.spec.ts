import { describe, expect, it } from 'vitest';
import { seededNoise } from '../../test/seeded-noise.js';
import { amplitudeSpectrum } from '../spectrum/amplitude-spectrum.js';
import { WINDOW_NAMES, type WindowName } from '../windows/window-terms.js';
import { listPeaks } from './list-peaks.js';

// Outside truth: records made of lines whose frequencies and amplitudes are known.

const RATE = 10_000;

/** Sum of cosines [frequency, rms] in white noise, with an offset. */
function record(
  lines: [number, number][],
  { noise = 0, length = 32_768, offset = 0, seed = 3 } = {},
): Float64Array {
  return seededNoise(length, seed).map((e, n) =>
    lines.reduce(
      (sum, [f, rms], i) => sum + Math.SQRT2 * rms * Math.cos((2 * Math.PI * f * n) / RATE + i),
      offset + noise * e,
    ),
  );
}

function peaksOf(samples: Float64Array, window: WindowName = 'hann', segmentLength = samples.length) {
  return listPeaks(amplitudeSpectrum(samples, RATE, { window, segmentLength }));
}

describe('listPeaks', () => {
  it.each(WINDOW_NAMES)('finds lines between the lines of the spectrum with %s', (window) => {
    const lines: [number, number][] = [
      [997.13, 1],
      [3210.9, 0.3],
      [71.23, 0.1],
    ];
    const found = peaksOf(record(lines, { noise: 1e-4, offset: 2 }), window).lines;
    // Leakage of one line into another is what remains with a rectangular window.
    const relative = window === 'rectangular' ? 0.02 : 0.001;
    for (const [i, [frequencyHz, rms]] of lines.entries()) {
      expect(Math.abs(found[i]!.frequencyHz - frequencyHz)).toBeLessThan(0.03);
      expect(Math.abs(found[i]!.rms / rms - 1)).toBeLessThan(relative);
    }
    if (window !== 'rectangular') expect(found).toHaveLength(3);
  });

  it('takes no noise for a line', () => {
    const counts = [1, 2, 3, 4, 5].map((seed) => peaksOf(record([], { noise: 1, seed })).lines.length);
    expect(counts).toEqual([0, 0, 0, 0, 0]);
    expect(peaksOf(record([], { noise: 1, length: 200_000 }), 'hann', 4096).lines).toEqual([]);
  });

  it('follows noise that falls with frequency', () => {
    // First-order low-pass of white noise, and a line that stands out of it only where it is weak.
    let state = 0;
    const coloured = record([], { noise: 1 }).map((e) => (state = 0.98 * state + e));
    const line = record([[3001.7, 0.05]]);
    const { lines } = peaksOf(coloured.map((x, n) => x + line[n]!));
    expect(lines).toHaveLength(1);
    expect(lines[0]!.frequencyHz).toBeCloseTo(3001.7, 1);
  });

  it('sees a weaker line in an average of many segments', () => {
    const samples = record([[2000.3, 0.03]], { noise: 1, length: 400_000 });
    const { lines } = peaksOf(samples, 'hann', 4096);
    expect(lines).toHaveLength(1);
    expect(Math.abs(lines[0]!.frequencyHz - 2000.3)).toBeLessThan(0.3);
  });

  it('lists no more lines than asked for, the largest first', () => {
    const comb = Array.from({ length: 60 }, (_, i): [number, number] => [70.7 * (i + 1), 1 / (i + 1)]);
    const spectrum = amplitudeSpectrum(record(comb, { noise: 1e-5 }), RATE, {
      window: 'hann',
      segmentLength: 32_768,
    });
    const { lines } = listPeaks(spectrum, { most: 7 });
    lines.forEach(({ rms }, i) => expect(rms).toBeCloseTo(1 / (i + 1), 3));
    expect(lines).toHaveLength(7);
    expect(listPeaks(spectrum).lines).toHaveLength(40);
  });

  it('sums a line that moves', () => {
    // 1000 Hz to 1004 Hz in 3.3 s: 13 lines of the spectrum.
    const samples = Float64Array.from({ length: 32_768 }, (_, n) => {
      const t = n / RATE;
      return Math.SQRT2 * Math.cos(2 * Math.PI * (1000 * t + (4 * t * t) / 2 / 3.2768));
    });
    const { lines } = peaksOf(samples);
    expect(lines).toHaveLength(1);
    expect(Math.abs(lines[0]!.frequencyHz - 1002)).toBeLessThan(0.2);
    expect(Math.abs(lines[0]!.rms - 1)).toBeLessThan(0.05);
  });
});

describe('families of listPeaks', () => {
  const mains: [number, number][] = [1, 2, 3, 5, 7, 9, 11].map((h) => [49.98 * h, 1 / h]);

  it('puts lines on multiples together', () => {
    const { lines, families } = peaksOf(record(mains, { noise: 1e-3 }));
    expect(families).toHaveLength(1);
    expect(families[0]!.fundamentalHz).toBeCloseTo(49.98, 2);
    expect(families[0]!.orders).toEqual([1, 2, 3, 5, 7, 9, 11]);
    expect(families[0]!.shareOfPower).toBeCloseTo(1, 9);
    for (const line of lines) {
      expect(line.familyIndex).toBe(0);
      expect(line.frequencyHz / line.order!).toBeCloseTo(49.98, 1);
    }
  });

  it('tells two series and a line of its own apart', () => {
    const other: [number, number][] = [1, 2, 3, 4, 5, 6].map((h) => [333.37 * h, 0.4]);
    const single: [number, number] = [4321.9, 0.7];
    const { lines, families } = peaksOf(record([...mains, ...other, single], { noise: 1e-3 }));
    expect(families.map((f) => Math.round(100 * f.fundamentalHz) / 100)).toEqual([49.98, 333.37]);
    expect(families[1]!.orders).toEqual([1, 2, 3, 4, 5, 6]);
    // Power by arithmetic: 1.4 of the mains series would be Σ 1/h², 6 × 0.16 of the other, 0.49 of the single line.
    const mainsPower = mains.reduce((sum, [, rms]) => sum + rms * rms, 0);
    expect(families[0]!.shareOfPower).toBeCloseTo(mainsPower / (mainsPower + 0.96 + 0.49), 3);
    const alone = lines.filter((line) => line.familyIndex === null);
    expect(alone.map((line) => Math.round(line.frequencyHz))).toEqual([4322]);
    expect(alone[0]!.order).toBeNull();
  });

  it('finds a series without its fundamental', () => {
    const { families } = peaksOf(
      record(
        [3, 4, 5, 7, 8].map((h) => [200.3 * h, 0.5]),
        { noise: 1e-3 },
      ),
    );
    expect(families).toHaveLength(1);
    expect(families[0]!.fundamentalHz).toBeCloseTo(200.3, 2);
    expect(families[0]!.orders).toEqual([3, 4, 5, 7, 8]);
  });

  it('sees no series in lines that have nothing to do with one another', () => {
    const counts = [1, 2, 3, 4, 5, 6, 7, 8].map((seed) => {
      const places = seededNoise(12, 900 + seed);
      // Normal deviates turned into frequencies all over the band.
      const lines = Array.from(places, (e): [number, number] => [
        2500 + 4600 * (Math.atan(1.6 * e) / Math.PI),
        0.5,
      ]);
      return peaksOf(record(lines, { noise: 1e-3, seed })).families.length;
    });
    expect(counts.reduce((sum, count) => sum + count, 0)).toBe(0);
  });
});
