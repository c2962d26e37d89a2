import { describe, expect, it } from 'vitest';
import { combineTonePowers } from './combine-tone-powers.js';
import type { TonePowers } from './tone-result.js';

const STRETCH: TonePowers = {
  sampleCount: 1000,
  sampleRateHz: 1000,
  frequencyHz: 100,
  dc: 0.5,
  tone: 4,
  harmonics: [{ frequencyHz: 200, power: 0.1 }, null],
  noiseAndDistortion: 0.3,
  noise: 0.2,
  bandNoiseAndDistortion: 0.2,
  noiseDensitySquared: 1e-4,
  spurs: [
    { frequencyHz: 321, power: 0.05 },
    { frequencyHz: 111, power: 0.01 },
  ],
};

// Outside truth: weighted means by arithmetic.
describe('combineTonePowers', () => {
  it('weighs stretches by their samples', () => {
    const combined = combineTonePowers([
      STRETCH,
      {
        ...STRETCH,
        sampleCount: 3000,
        frequencyHz: 104,
        dc: 0.1,
        tone: 8,
        noiseAndDistortion: 0.7,
        noise: 0.6,
      },
    ]);
    expect(combined.sampleCount).toBe(4000);
    expect(combined.frequencyHz).toBeCloseTo(103, 12);
    expect(combined.dc).toBeCloseTo(0.2, 12);
    expect(combined.tone).toBeCloseTo(7, 12);
    expect(combined.noiseAndDistortion).toBeCloseTo(0.6, 12);
    expect(combined.noise).toBeCloseTo(0.5, 12);
    expect(combined.bandNoiseAndDistortion).toBeCloseTo(0.2, 12);
  });

  it('takes a spur that a stretch does not list as strong as the smallest it lists', () => {
    const quiet = { ...STRETCH, spurs: [{ frequencyHz: 444, power: 0.002 }] };
    const { spurs } = combineTonePowers([STRETCH, quiet]);
    expect(spurs[0]!.frequencyHz).toBe(321);
    expect(spurs[0]!.power).toBeCloseTo((0.05 + 0.002) / 2, 12);
  });

  it('knows a spur again within a line and a half', () => {
    const near = { ...STRETCH, spurs: [{ frequencyHz: 322.4, power: 0.03 }] };
    const far = { ...STRETCH, spurs: [{ frequencyHz: 322.6, power: 0.03 }] };
    expect(combineTonePowers([STRETCH, near]).spurs[0]!.power).toBeCloseTo(0.04, 12);
    expect(combineTonePowers([STRETCH, far]).spurs).toContainEqual({
      frequencyHz: 322.6,
      power: (0.03 + 0.01) / 2,
    });
  });

  it('averages a harmonic over the stretches that have it', () => {
    const other = {
      ...STRETCH,
      harmonics: [
        { frequencyHz: 202, power: 0.3 },
        { frequencyHz: 300, power: 0.2 },
      ],
    };
    expect(combineTonePowers([STRETCH, other]).harmonics).toEqual([
      { frequencyHz: 201, power: 0.2 },
      { frequencyHz: 300, power: 0.2 },
    ]);
  });

  it('has no band unless all stretches have', () => {
    const without = { ...STRETCH, bandNoiseAndDistortion: null };
    expect(combineTonePowers([STRETCH, without]).bandNoiseAndDistortion).toBeNull();
  });
});
