import { describe, expect, it } from 'vitest';
import { planWaveform } from './waveform.js';

describe('plan of a waveform', () => {
  it('reads the samples where they are few enough', () => {
    expect(planWaveform(1000, 100, 300, 200)).toEqual({ kind: 'samples', first: 100, end: 300 });
  });

  it.each([
    [100_000_000, 0, 100_000_000, 2000],
    [100_000_000, 12_345, 99_000_001, 8000],
    [1_000_000, 500_000, 500_900, 700],
    [1_000_000, 1, 129_000, 2000],
    [1000, 0, 1000, 2],
  ])(
    'of %i samples, %i to %i in %i: few values are read and few points come back',
    (count, first, end, points) => {
      const plan = planWaveform(count, first, end, points);
      if (plan.kind !== 'envelope') throw new Error('an envelope was expected');
      const bins = Math.ceil((end - plan.first) / plan.binSamples);
      expect(bins).toBeLessThanOrEqual(points);
      expect(plan.first).toBeLessThanOrEqual(first);
      const sourceValues = (end - plan.first) / (plan.level?.factor ?? 1);
      expect(sourceValues).toBeLessThanOrEqual(64 * points);
      expect(plan.binSamples).toBe(plan.ratio * (plan.level?.factor ?? 1));
    },
  );
});
