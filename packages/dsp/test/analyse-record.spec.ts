import { describe, expect, it } from 'vitest';
import {
  analyseRecord,
  AnalysisInputError,
  AnalysisStopped,
  type AnalyseOptions,
  type AnalysisSettings,
} from '../src/index.js';
import { seededNoise } from './seeded-noise.js';

const SINE = Float64Array.from({ length: 4000 }, (_, n) => 10 * Math.cos((2 * Math.PI * 50 * n) / 10_000));

function analyse(
  samples: Float64Array,
  settings: Partial<AnalysisSettings> = {},
  sampleRateHz = 10_000,
  options?: AnalyseOptions,
) {
  return analyseRecord(
    {
      sampleRateHz,
      channels: [{ index: 3, name: 'L1', quantity: 'current', unit: 'A', samples }],
      settings: { profile: 'mains', nominalFrequencyHz: 50, ...settings },
    },
    options,
  );
}

describe('analyseRecord', () => {
  it('refuses samples that are no numbers and says where', () => {
    const broken = SINE.slice();
    broken[250] = Number.NaN;
    expect(() => analyse(broken)).toThrow(AnalysisInputError);
    expect(() => analyse(broken)).toThrow("Channel 'L1' has no number at sample 250 (0.025 s)");
  });

  it('refuses values whose squares would be no finite numbers, and stands the largest it takes', () => {
    const broken = SINE.slice();
    broken[250] = -1e101;
    expect(() => analyse(broken)).toThrow("Channel 'L1' holds -1e+101 at sample 250 (0.025 s)");
    for (const profile of ['mains', 'tone', 'general'] as const) {
      const { channels } = analyse(
        SINE.map((x) => x * 1e99),
        { profile },
      );
      // JSON writes null for what is not finite; everything else comes back as it was.
      expect(JSON.parse(JSON.stringify(channels[0]!.harmonics))).toEqual(channels[0]!.harmonics);
      expect((channels[0]!.rms ?? 0) / 1e99).toBeCloseTo(10 / Math.SQRT2, 6);
    }
  });

  it.each([0, -1, Number.NaN, Infinity])('refuses the sample rate %d', (rate) => {
    expect(() => analyse(SINE, {}, rate)).toThrow(AnalysisInputError);
  });

  it('refuses a record of one sample and settings without sense', () => {
    expect(() => analyse(new Float64Array(1))).toThrow('needs at least 2');
    expect(() => analyse(SINE, { nominalFrequencyHz: 0 })).toThrow(AnalysisInputError);
    expect(() => analyse(SINE, { maxOrder: 0 })).toThrow('The highest order must be a whole number');
    expect(() => analyse(SINE, { maxOrder: 10, thdMaxOrder: 11 })).toThrow(AnalysisInputError);
  });

  it.each([
    ['zeros', new Float64Array(500)],
    ['a constant', new Float64Array(500).fill(2.5)],
    ['white noise', seededNoise(5000, 11)],
    ['two samples', Float64Array.of(1, -1)],
  ])('finds no periodic component in %s', (_, samples) => {
    for (const profile of ['mains', 'tone', 'general'] as const) {
      for (const nominalFrequencyHz of [50, 'auto'] as const) {
        const channel = analyse(samples, { profile, nominalFrequencyHz }).channels[0]!;
        expect(channel.fundamental).toBeNull();
        expect(channel.thdFPercent).toBeNull();
        expect(channel.harmonics).toEqual([]);
        expect(channel.flags.map((flag) => flag.code)).toContain('no-periodic-component');
      }
    }
  });

  it('reports progress up to 1 and stops when asked', () => {
    const seen: number[] = [];
    analyse(SINE, {}, 10_000, { onProgress: (fraction) => seen.push(fraction) });
    expect(seen.at(-1)).toBe(1);
    expect(seen).toEqual([...seen].sort((a, b) => a - b));
    expect(() => analyse(SINE, {}, 10_000, { shouldStop: () => true })).toThrow(AnalysisStopped);
  });

  it('lists only the orders below half the sample rate', () => {
    const slow = Float64Array.from({ length: 400 }, (_, n) => 230 * Math.cos((2 * Math.PI * 50 * n) / 400));
    const channel = analyse(slow, {}, 400).channels[0]!;
    expect(channel.harmonics.map((h) => h.order)).toEqual([1, 2, 3]);
    expect(channel.flags.map((flag) => flag.code)).toContain('order-beyond-nyquist');
  });

  it('falls back to the whole record when no window fits', () => {
    const channel = analyse(SINE.subarray(0, 1100)).channels[0]!;
    expect(channel.windows).toBeNull();
    expect(channel.harmonics[0]!.rms).toBeCloseTo(10 / Math.SQRT2, 6);
    expect(channel.harmonics[0]!.groupRms).toBeNull();
    expect(channel.flags.map((flag) => flag.code)).toContain('too-short-ten-cycles');
  });

  // A slow drift of 0.9 Hz over 18 s: the windows follow it, so order 25 keeps its known rms of 2 A within 0.1 %.
  it('keeps whole cycles in the windows while the frequency drifts', () => {
    const drifting = Float64Array.from({ length: 90_000 }, (_, n) => {
      const t = n / 5000;
      const phase = 2 * Math.PI * (49.55 * t + 0.025 * t * t);
      return Math.SQRT2 * (100 * Math.cos(phase) + 2 * Math.cos(25 * phase));
    });
    const channel = analyse(drifting, {}, 5000).channels[0]!;
    expect(channel.windows!.count).toBe(90);
    expect(Math.abs(channel.harmonics[24]!.rms - 2)).toBeLessThan(0.002);
    expect(channel.flags.map((flag) => flag.code)).toContain('frequency-drift');
    expect(channel.harmonics[0]!.phaseDeg).toBeNull();
    // The bound is that of a constant frequency; it says nothing of one that moves.
    expect(channel.fundamental!.frequencyUncertaintyHz).toBeNull();
  });
});
