import { describe, expect, it } from 'vitest';
import { seededNoise } from '../../test/seeded-noise.js';
import { windowSamples } from '../windows/window-samples.js';
import { createKernelSegmentPower } from './kernel-segment-power.js';
import { createPlainSegmentPower } from './plain-segment-power.js';

describe('createKernelSegmentPower', () => {
  it.each([
    [1024, false, 4],
    [1024, true, 5],
    [75, true, 3],
    [500, false, 1],
    [202, true, 2],
    [101, false, 3],
  ])(
    'sums the powers of the plain transform: length %i, without mean %s, %i segments',
    (length, removeMean, count) => {
      const samples = seededNoise(length * 3, length).map((x) => x + 2);
      const window = windowSamples('hann', length);
      const plain = createPlainSegmentPower(window, removeMean);
      const compiled = createKernelSegmentPower(window, removeMean)!;
      for (let s = 0; s < count; s++) {
        plain.add(samples, Math.floor((s * length) / 3));
        compiled.add(samples, Math.floor((s * length) / 3));
        // What has been read must not disturb what comes after it.
        if (s === 1) void compiled.sum;
      }
      const expected = plain.sum;
      const got = compiled.sum;
      expect(got).toHaveLength(expected.length);
      // Noise of unit variance: lines of about length times the mean square of the window.
      got.forEach((value, k) => expect(Math.abs(value - expected[k]!) / length / count).toBeLessThan(1e-12));
      expect(compiled.sum).toEqual(got);
    },
  );

  // Parseval: Σ|x w|² = (1/N) Σ|X|².
  it('keeps the energy', () => {
    const window = windowSamples('hann', 4096);
    const samples = seededNoise(4096, 1);
    const power = createKernelSegmentPower(window, false)!;
    power.add(samples, 0);
    const energy = samples.reduce((sum, x, i) => sum + (x * window[i]!) ** 2, 0);
    const lines = power.sum.reduce((sum, p, k) => sum + (k === 0 || k === 2048 ? p : 2 * p), 0);
    expect(lines / 4096 / energy).toBeCloseTo(1, 12);
  });

  it('keeps sums of one length apart that are made in turns', () => {
    const samples = seededNoise(2000, 3);
    const windows = ['hann', 'hamming'] as const;
    const alone = windows.map((name) => {
      const power = createKernelSegmentPower(windowSamples(name, 500), false)!;
      for (let s = 0; s < 5; s++) power.add(samples, 100 * s);
      return power.sum;
    });
    const together = windows.map((name) => createKernelSegmentPower(windowSamples(name, 500), false)!);
    for (let s = 0; s < 5; s++) for (const power of together) power.add(samples, 100 * s);
    together.forEach((power, i) => expect(power.sum).toEqual(alone[i]));
  });
});
