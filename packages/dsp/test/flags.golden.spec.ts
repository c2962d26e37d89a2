import { describe, expect, it } from 'vitest';
import { analyseRecord, type ProfileName } from '../src/index.js';
import { judge } from './judge.js';
import { readRecord, referenceCases } from './reference-cases.js';

/** Gaps are read from the time column, which the engine never sees; here the jump in the waveform must be found. */
const GAP_IN_TIME_COLUMN = ['F10-P13', 'F10-P14'];

describe.each(referenceCases(10))('$id $title', (reference) => {
  it.each<ProfileName>(['mains', 'tone'])('raises the right flags in the %s profile', (profile) => {
    const record = readRecord(reference);
    const { channels } = analyseRecord({
      sampleRateHz: record.sampleRateHz,
      channels: [{ index: 0, name: 'x', quantity: 'other', ...record }],
      settings: { profile, nominalFrequencyHz: Number(reference.analysis.nominal_hz) },
    });
    const codes = channels[0]!.flags.map((flag) => flag.code);
    const flags = reference.expected.flags!;
    const expected = GAP_IN_TIME_COLUMN.includes(reference.id)
      ? { ...flags, must: ['discontinuity'] }
      : flags;
    expect(judge(expected, codes)).toBeNull();
  });

  it('finds no jump where none was made', () => {
    const record = readRecord(reference);
    const { channels } = analyseRecord({
      sampleRateHz: record.sampleRateHz,
      channels: [{ index: 0, name: 'x', quantity: 'other', ...record }],
      settings: { profile: 'general', nominalFrequencyHz: 'auto' },
    });
    const jumped = channels[0]!.flags.some((flag) => flag.code === 'discontinuity');
    expect(jumped).toBe([...GAP_IN_TIME_COLUMN, 'F10-P15'].includes(reference.id));
  });
});
