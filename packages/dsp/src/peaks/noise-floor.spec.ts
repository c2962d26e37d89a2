import { describe, expect, it } from 'vitest';
import { seededNoise } from '../../test/seeded-noise.js';
import { noiseFloor } from './noise-floor.js';

/** Mean of `averages` exponentially distributed powers of mean 1 per line: half the squares of two normal deviates. */
function noiseLines(count: number, averages: number): Float64Array {
  const deviates = seededNoise(2 * count * averages, 21);
  return Float64Array.from({ length: count }, (_, k) => {
    let sum = 0;
    for (let i = 0; i < 2 * averages; i++) sum += deviates[2 * averages * k + i]! ** 2 / 2;
    return sum / averages;
  });
}

describe('noiseFloor', () => {
  // Closed form: the power of a line of noise is exponentially distributed, its mean is what the floor stands for.
  it.each([1, 3, 20])('is the mean of noise of %i averages', (averages) => {
    const floor = noiseFloor(noiseLines(20_000, averages), averages);
    const mean = floor.reduce((sum, x) => sum + x, 0) / floor.length;
    expect(Math.abs(mean - 1)).toBeLessThan(0.03);
  });

  it('is not moved by lines', () => {
    const noise = noiseLines(4096, 1);
    const plain = noiseFloor(noise);
    const lines = noise.map((p, k) => (k % 10 < 3 ? p + 1e6 : p));
    noiseFloor(lines).forEach((p, k) => expect(p / plain[k]!).toBeLessThan(3));
  });

  it('follows a slope', () => {
    // Noise that falls with the square of frequency over four decades.
    const floor = noiseFloor(
      noiseLines(20_000, 20).map((p, k) => p / Math.max(1, k) ** 2),
      20,
    );
    for (const k of [200, 1000, 5000, 15_000]) {
      expect(floor[k]! * k ** 2).toBeGreaterThan(0.7);
      expect(floor[k]! * k ** 2).toBeLessThan(1.4);
    }
  });
});
