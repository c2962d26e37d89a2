import { describe, expect, it } from 'vitest';
import { analyseRecord, thdF, thdR, type AnalysisSettings, type ChannelAnalysis } from '../src/index.js';
import { judge } from './judge.js';
import { readRecord, referenceCases, type ReferenceCase } from './reference-cases.js';

const cases = [1, 2, 3].flatMap(referenceCases).filter((c) => c.files.length > 0);

describe.each(cases)('$id $title', (reference) => {
  // Tones far from the mains are no matter for 200 ms windows.
  const profiles = Number(reference.analysis.nominal_hz) > 200 ? ['general', 'tone'] : ['general', 'mains'];

  it.each(profiles)('meets the closed form in the %s profile', (profile) => {
    const channel = analyse(reference, {
      profile: profile as AnalysisSettings['profile'],
      nominalFrequencyHz: Number(reference.analysis.nominal_hz),
    });
    expectWithin(reference, channel);
  });

  it('finds the fundamental without a hint', () => {
    const channel = analyse(reference, { profile: 'general', nominalFrequencyHz: 'auto' });
    expect(judge(reference.expected.f0_hz!, channel.fundamental?.frequencyHz)).toBeNull();
  });
});

function analyse(reference: ReferenceCase, settings: AnalysisSettings): ChannelAnalysis {
  const record = readRecord(reference);
  const channel = { index: 0, name: 'x', quantity: 'other', ...record };
  return analyseRecord({ sampleRateHz: record.sampleRateHz, channels: [channel], settings }).channels[0]!;
}

function expectWithin(reference: ReferenceCase, channel: ChannelAnalysis): void {
  const results = quantities(channel, reference.family);
  const misses = Object.entries(reference.expected).flatMap(([name, expected]) => {
    const miss = judge(expected, results[name]);
    return miss === null ? [] : [`${name}: ${miss}`];
  });
  expect(misses).toEqual([]);
}

function quantities(channel: ChannelAnalysis, family: number): Record<string, unknown> {
  const padded = Array.from({ length: 50 }, (_, i) => channel.harmonics[i]);
  const rms = padded.map((h) => h?.rms ?? 0);
  const total = Math.sqrt(rms.reduce((sum, x) => sum + x * x, channel.mean! ** 2));
  return {
    f0_hz: channel.fundamental?.frequencyHz,
    amplitude: channel.fundamental && Math.SQRT2 * channel.fundamental.rms,
    fundamental_rms: channel.fundamental?.rms,
    phase_deg: family === 1 ? channel.fundamental?.phaseDeg : padded.map((h) => h?.phaseDeg),
    phase_zc_deg: padded.map((h) => h?.phaseZeroCrossingDeg),
    dc: channel.mean,
    record_rms: channel.rms,
    harmonic_rms: rms,
    total_rms: total,
    crest_factor: channel.crestFactor,
    form_factor: channel.formFactor,
    thd_f_10: thdF(rms, 10),
    thd_f_40: thdF(rms, 40),
    thd_r_40: thdR(rms, 40),
    thd_f_50: thdF(rms, 50),
    thd_r_50: thdR(rms, 50),
  };
}
