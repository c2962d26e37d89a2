import { describe, expect, it } from 'vitest';
import { seededNoise } from '../../test/seeded-noise.js';
import { frequencyTrack } from './frequency-track.js';
import { meanFrequencyHz, regressedFrequencyHz } from './local-frequency.js';

const RATE = 10_000;

function trackOf(phase: (n: number) => number, length: number, noise = 0) {
  const random = seededNoise(length, 3);
  const samples = Float64Array.from(
    { length },
    (_, n) => Math.cos(2 * Math.PI * phase(n)) + noise * random[n]!,
  );
  return frequencyTrack(samples, RATE, 50)!;
}

describe('frequency from a track', () => {
  // Closed form: a ramp from 49.9 Hz by 0.02 Hz/s has 49.9 + 0.02 (t1 + t2)/2 as its mean between t1 and t2.
  it('is the mean between two positions', () => {
    const track = trackOf((n) => (49.9 * n) / RATE + 0.01 * (n / RATE) ** 2, 100_000);
    for (const from of [2000, 30_000, 94_000]) {
      const mean = 49.9 + (0.02 * (from + 1000)) / RATE;
      expect(meanFrequencyHz(track, RATE, from, from + 2000)).toBeCloseTo(mean, 4);
    }
  });

  it('averages the noise of single frames', () => {
    const track = trackOf((n) => (50.02 * n) / RATE, 100_000, 0.1);
    const spread = (values: number[]) =>
      Math.sqrt(values.reduce((sum, x) => sum + (x - 50.02) ** 2, 0) / values.length);
    const windows = Array.from({ length: 48 }, (_, j) =>
      meanFrequencyHz(track, RATE, 2000 * j, 2000 * (j + 1)),
    );
    expect(spread(windows)).toBeLessThan(0.8 * spread(Array.from(track.localHz)));
  });

  it('is regressed over the whole track', () => {
    expect(
      regressedFrequencyHz(
        trackOf((n) => (50.02 * n) / RATE, 100_000),
        RATE,
      ),
    ).toBeCloseTo(50.02, 6);
  });
});
