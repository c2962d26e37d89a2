import { describe, expect, it } from 'vitest';
import { seededNoise } from '../../test/seeded-noise.js';
import { harmonicCombs, type PeakPlace } from './harmonic-comb.js';
import { harmonicFamilies } from './harmonic-families.js';

const BAND_HZ = 5000;
const RANGE = { lowHz: 2, highHz: BAND_HZ, bandHz: BAND_HZ };

/** Normal deviates turned into values evenly spread from 0 to 1. */
function evenly(count: number, seed: number): number[] {
  const [a, b] = [seededNoise(count, seed), seededNoise(count, seed + 5000)];
  return Array.from(a, (x, i) => 0.5 + Math.atan2(x, b[i]!) / (2 * Math.PI));
}

function placesAt(frequenciesHz: number[], uncertaintyHz: number): PeakPlace[] {
  return frequenciesHz.map((frequencyHz, i) => ({ frequencyHz, uncertaintyHz, power: 1 / (i + 1) }));
}

const bestOf = (peaks: PeakPlace[]) =>
  harmonicCombs(peaks, RANGE).reduce((best, comb) => (comb.evidence > best.evidence ? comb : best));

describe('harmonicCombs', () => {
  it('fits the fundamental to all orders by least squares', () => {
    // Weighted mean of f/h with weights h²: closed form of the least-squares line through the origin.
    const peaks = placesAt([100.1, 199.8, 500.5, 700.1], 0.3);
    const best = bestOf(peaks);
    const slope = (100.1 + 2 * 199.8 + 5 * 500.5 + 7 * 700.1) / (1 + 4 + 25 + 49);
    expect(best.orders).toEqual([1, 2, 5, 7]);
    expect(Math.abs(best.fundamentalHz - slope)).toBeLessThan(0.01);
    expect(best.share).toBeCloseTo(1, 12);
  });

  it('prefers the fundamental to its halves and doubles', () => {
    const best = bestOf(placesAt([330, 110, 220, 550, 660], 0.05));
    expect(best.fundamentalHz).toBeCloseTo(110, 2);
  });

  it('gives a dense comb no credit for what it meets by chance', () => {
    // 40 places at random, so uncertain that a comb of some 20 Hz meets many of them.
    const found = Array.from({ length: 20 }, (_, i) =>
      bestOf(
        placesAt(
          evenly(40, 60 + i).map((x) => BAND_HZ * x),
          1,
        ),
      ),
    );
    expect(Math.max(...found.map((comb) => comb.evidence))).toBeLessThan(5);
  });

  it('takes the stronger of two peaks on one multiple', () => {
    const best = bestOf(placesAt([100, 200, 300, 400.02, 399.98], 0.05));
    expect(best.orders).toEqual([1, 2, 3, 4, 0]);
  });
});

describe('harmonicFamilies', () => {
  it('takes two series apart and leaves the rest', () => {
    const [first, second] = [[1, 2, 3, 4, 5].map((h) => 113.7 * h), [1, 3, 5, 7].map((h) => 271.9 * h)];
    const peaks = placesAt([...first, ...second, 4365.3], 0.05);
    const families = harmonicFamilies(peaks, RANGE, { leastEvidence: 5, most: 6 });
    expect(families.map((f) => Math.round(10 * f.fundamentalHz) / 10)).toEqual([113.7, 271.9]);
    expect(families[0]!.orders).toEqual([1, 2, 3, 4, 5, 0, 0, 0, 0, 0]);
    expect(families[1]!.orders).toEqual([0, 0, 0, 0, 0, 1, 3, 5, 7, 0]);
    const total = peaks.reduce((sum, peak) => sum + peak.power, 0);
    expect(families[0]!.share).toBeCloseTo((1 + 1 / 2 + 1 / 3 + 1 / 4 + 1 / 5) / total, 12);
  });

  it('finds no more than asked for', () => {
    const peaks = placesAt(
      [...[1, 2, 3, 4, 5].map((h) => 113.7 * h), ...[1, 3, 5, 7].map((h) => 271.9 * h)],
      0.05,
    );
    expect(harmonicFamilies(peaks, RANGE, { leastEvidence: 5, most: 1 })).toHaveLength(1);
    expect(harmonicFamilies([], RANGE, { leastEvidence: 5, most: 1 })).toEqual([]);
  });
});
