import { describe, expect, it } from 'vitest';
import { findFundamental, toneFigures, type ToneResult } from '../src/index.js';
import { judge } from './judge.js';
import { readRecord, referenceCases, type ReferenceCase } from './reference-cases.js';

const AUDIO_BAND = { fromHz: 20, toHz: 20_000 };

describe.each(referenceCases(6))('$id $title', (reference) => {
  const results = measure(reference);

  it.each(Object.keys(reference.expected))('%s', (quantity) => {
    expect(judge(reference.expected[quantity]!, results[quantity])).toBeNull();
  });
});

function measure(reference: ReferenceCase): Record<string, unknown> {
  const { samples, sampleRateHz } = readRecord(reference);
  const { frequencyHz } = findFundamental(samples, sampleRateHz, { nominalFrequencyHz: 'auto' })!;
  const options = { band: AUDIO_BAND, fullScalePeak: Number(reference.analysis.full_scale_peak) };
  return quantities(toneFigures(samples, sampleRateHz, frequencyHz, options));
}

function quantities(tone: ToneResult): Record<string, unknown> {
  return {
    f0_hz: tone.frequencyHz,
    level_dbfs: tone.levelDbfs,
    sinad_db: tone.sinadDb,
    snr_db: tone.snrDb,
    thdn_r_db: 20 * Math.log10(tone.thdPlusNPercent! / 100),
    thdn_f_db: -tone.sinadDb!,
    thdn_r_20_20k_db: 20 * Math.log10(tone.thdPlusNBandPercent! / 100),
    enob: tone.enobBits,
    enob_fs: tone.enobFullScaleBits,
    sfdr_dbc: tone.sfdrDb,
    thd_f_10_db: 20 * Math.log10(tone.thdFPercent! / 100),
    harmonics_dbc: tone.harmonicsDbc.slice(0, 4),
  };
}
