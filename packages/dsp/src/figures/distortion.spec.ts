import { describe, expect, it } from 'vitest';
import { thdF, thdR } from './distortion.js';

// Fourier series in closed form (textbook; e.g. Bronstein, "Taschenbuch der Mathematik", Fourier tables), peak values;
// THD is a ratio, so peak or rms does not matter.
const WAVES: Record<string, (order: number) => number> = {
  square: (h) => (h % 2 === 1 ? 1 / h : 0),
  triangle: (h) => (h % 2 === 1 ? 1 / h ** 2 : 0),
  sawtooth: (h) => 1 / h,
  'six-pulse': (h) => (h % 2 === 1 ? Math.abs(Math.cos((h * Math.PI) / 6)) / h : 0),
  'half-rectified': (h) => (h === 1 ? Math.PI / 4 : h % 2 === 0 ? 1 / (h * h - 1) : 0),
  'full-rectified': (k) => 1 / (4 * k * k - 1),
};

describe('thdF', () => {
  it.each([
    ['square', 0.470322391588, 0.472971333934, Math.sqrt(Math.PI ** 2 / 8 - 1)],
    ['triangle', 0.121142192013, 0.121147428103, Math.sqrt(Math.PI ** 4 / 96 - 1)],
    ['sawtooth', 0.787555688829, 0.790653358699, Math.sqrt(Math.PI ** 2 / 6 - 1)],
    ['six-pulse', 0.296794315664, 0.30015290994, Math.sqrt(Math.PI ** 2 / 9 - 1)],
    ['half-rectified', 0.435231676743, 0.435233839034, Math.sqrt(1 - 8 / Math.PI ** 2)],
    ['full-rectified', 0.227265601097, 0.227268607251, Math.sqrt((9 * Math.PI ** 2) / 16 - 5.5)],
  ])('of a %s wave', (wave, upTo40, upTo50, full) => {
    const series = Float64Array.from({ length: 200_000 }, (_, i) => WAVES[wave]!(i + 1));
    expect(thdF(series, 40)).toBeCloseTo(upTo40, 9);
    expect(thdF(series, 50)).toBeCloseTo(upTo50, 9);
    expect(thdF(series, series.length)).toBeCloseTo(full, 5);
  });

  it('relates to THD_R by THD_F/√(1 + THD_F²)', () => {
    const series = [10, 3, 2, 1];
    const f = thdF(series, 4)!;
    expect(thdR(series, 4)).toBeCloseTo(f / Math.sqrt(1 + f * f), 12);
  });

  it('is null without a fundamental', () => {
    expect(thdF([], 40)).toBeNull();
    expect(thdF([0, 1], 40)).toBeNull();
    expect(thdR([0, 0], 40)).toBeNull();
  });
});
