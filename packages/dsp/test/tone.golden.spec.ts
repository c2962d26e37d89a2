import { describe, expect, it } from 'vitest';
import { analyseRecord, toneFigures } from '../src/index.js';
import { judge } from './judge.js';
import { readRecord, referenceCases, type ReferenceCase } from './reference-cases.js';

const cases = referenceCases(6);

describe.each(cases)('$id $title', (reference) => {
  const results = measure(reference);
  const quantities = Object.keys(reference.expected).filter(
    (name) => reference.expected[name]!.need !== 'extra',
  );

  it.each(quantities)('%s', (quantity) => {
    expect(judge(reference.expected[quantity]!, results[quantity])).toBeNull();
  });
});

function measure(reference: ReferenceCase): Record<string, unknown> {
  const record = readRecord(reference);
  const channel = analyseRecord({
    sampleRateHz: record.sampleRateHz,
    channels: [{ index: 0, name: 'x', quantity: 'dimensionless', ...record }],
    settings: { profile: 'tone', nominalFrequencyHz: 'auto' },
  }).channels[0]!;
  const level = 20 * Math.log10(Math.SQRT2 * channel.fundamental!.rms);
  const tone = toneFigures(record.samples, record.sampleRateHz, channel.fundamental!.frequencyHz, 10);
  return {
    f0_hz: channel.fundamental!.frequencyHz,
    level_dbfs: level,
    sinad_db: channel.sinadDb,
    snr_db: channel.snrDb,
    thdn_r_db: 20 * Math.log10(channel.thdPlusNPercent! / 100),
    thdn_f_db: -channel.sinadDb!,
    enob: channel.enobBits,
    enob_fs: channel.enobBits! - level / (20 * Math.log10(2)),
    sfdr_dbc: channel.sfdrDb,
    thd_f_10_db: 20 * Math.log10(channel.thdFPercent! / 100),
    harmonics_dbc: tone.harmonicsDbc.slice(0, 4),
  };
}
