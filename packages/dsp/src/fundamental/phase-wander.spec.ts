import { describe, expect, it } from 'vitest';
import { analyseRecord } from '../analyse-record.js';
import { seededNoise } from '../../test/seeded-noise.js';
import { frequencyTrack } from './frequency-track.js';
import { keepsPhase } from './phase-wander.js';

const rate = 1000;
const seconds = 200;

/** 1 V peak at 50 Hz with 2 % of order 3, its phase swinging by `swingRad` once in 100 s. */
function swinging(swingRad: number, noise = 0): Float64Array {
  const random = seededNoise(rate * seconds, 11);
  return Float64Array.from({ length: rate * seconds }, (_, n) => {
    const angle = (2 * Math.PI * 50 * n) / rate + swingRad * Math.sin((2 * Math.PI * n) / (100 * rate));
    return Math.cos(angle) + 0.02 * Math.cos(3 * angle) + noise * random[n]!;
  });
}

function keeps(samples: Float64Array): boolean {
  return keepsPhase(frequencyTrack(samples, rate, 50), 0, samples.length, 0.02);
}

describe('keepsPhase', () => {
  it('holds for a steady tone, also in noise', () => {
    expect(keeps(swinging(0))).toBe(true);
    expect(keeps(swinging(0, 1))).toBe(true);
  });

  it('does not hold for a phase that swings by more than a hundredth of a turn', () => {
    expect(keeps(swinging(0.5))).toBe(false);
    expect(keeps(swinging(0.5, 0.1))).toBe(false);
  });
});

/*
 * Closed form: the harmonic is locked to the tone, so that its share is 2 % whatever the phase does. A fit of one
 * frequency to the whole record would find J0(3·2)/J0(2) = 0.67 of that for a swing of 2 rad (Abramowitz and Stegun,
 * table 9.1).
 */
describe('a tone that wanders', () => {
  const wandering = {
    sampleRateHz: rate,
    channels: [{ index: 0, name: 'u', quantity: 'voltage', unit: 'V', samples: swinging(2) }],
  };

  it.each(['tone', 'general', 'mains'] as const)('keeps its distortion in the %s profile', (profile) => {
    const { channels } = analyseRecord({ ...wandering, settings: { profile, nominalFrequencyHz: 50 } });
    expect(channels[0]!.thdFPercent).toBeCloseTo(2, 2);
  });

  it('is not counted as noise', () => {
    const { channels } = analyseRecord({
      ...wandering,
      settings: { profile: 'tone', nominalFrequencyHz: 50 },
    });
    // 20 log10(1/0.02) = 33.98 dB: nothing but the harmonic is left.
    expect(channels[0]!.sinadDb).toBeCloseTo(33.98, 1);
  });
});

it('states no uncertainty of a frequency that wanders, as there is no one value of it', () => {
  const uncertaintyHz = (samples: Float64Array) =>
    analyseRecord({
      sampleRateHz: rate,
      channels: [{ index: 0, name: 'u', quantity: 'voltage', unit: 'V', samples }],
      settings: { profile: 'mains', nominalFrequencyHz: 50 },
    }).channels[0]!.fundamental?.frequencyUncertaintyHz;
  expect(uncertaintyHz(swinging(0.5, 0.01))).toBeNull();
  // Cramér-Rao bound (Kay 1993, 3.11) with Σ h² A_h² = 1.0036 V², s = 0.01 V and N = 200 000 samples.
  const bound = (rate / (2 * Math.PI)) * Math.sqrt((24 * 0.01 ** 2) / (1.0036 * 2e5 * (4e10 - 1)));
  expect(uncertaintyHz(swinging(0, 0.01))! / bound).toBeCloseTo(1, 1);
});
