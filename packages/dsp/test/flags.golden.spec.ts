import { describe, expect, it } from 'vitest';
import { analyseRecord, type Flag, type ProfileName } from '../src/index.js';
import { judge } from './judge.js';
import { readChannels, readRecord, referenceCases, type ReferenceCase } from './reference-cases.js';

/** Gaps are read from the time column, which the engine never sees; here the jump in the waveform must be found. */
const GAP_IN_TIME_COLUMN = ['F10-P13', 'F10-P14'];

function flagsOf(reference: ReferenceCase, profile: ProfileName, nominal: number | 'auto'): Flag[] {
  const record = readRecord(reference);
  const { channels } = analyseRecord({
    sampleRateHz: record.sampleRateHz,
    channels: [{ index: 0, name: 'x', quantity: 'other', ...record }],
    settings: { profile, nominalFrequencyHz: nominal },
  });
  return channels[0]!.flags;
}

describe.each(referenceCases(10))('$id $title', (reference) => {
  const nominal = Number(reference.analysis.nominal_hz);

  it.each<ProfileName>(['mains', 'tone'])('raises the right flags in the %s profile', (profile) => {
    const raised = flagsOf(reference, profile, nominal);
    const flags = reference.expected.flags!;
    const expected = GAP_IN_TIME_COLUMN.includes(reference.id)
      ? { ...flags, must: ['discontinuity'] }
      : flags;
    expect(
      judge(
        expected,
        raised.map((flag) => flag.code),
      ),
    ).toBeNull();
    if (reference.title.includes('(control)')) {
      expect(raised.filter((flag) => flag.severity !== 'info')).toEqual([]);
    }
  });

  it('finds no jump where none was made', () => {
    const jumped = flagsOf(reference, 'general', 'auto').some((flag) => flag.code === 'discontinuity');
    expect(jumped).toBe([...GAP_IN_TIME_COLUMN, 'F10-P15'].includes(reference.id));
  });

  it('shows what each flag rests on', () => {
    const durationS = readRecord(reference).samples.length / readRecord(reference).sampleRateHz;
    for (const { code, evidence } of flagsOf(reference, 'mains', nominal)) {
      if (code === 'no-periodic-component') continue;
      expect(evidence!.count).toBeGreaterThan(0);
      expect(evidence!.timesS.length).toBeLessThanOrEqual(Math.min(20, evidence!.count));
      for (const t of evidence!.timesS) expect(t >= 0 && t < durationS).toBe(true);
      const below = code.startsWith('too-short');
      if (below) expect(evidence!.value!).toBeLessThan(evidence!.limit!);
      else expect(evidence!.value!).toBeGreaterThanOrEqual(evidence!.limit!);
    }
  });
});

const caseOf = (id: string): ReferenceCase => referenceCases(10).find((reference) => reference.id === id)!;

describe('the times of a jump', () => {
  /** Rows behind which the time column of a table jumps. */
  function gapsInTime(id: string): number[] {
    const times = readChannels({ ...caseOf(id), files: withTime(caseOf(id)) }).samples.time_s!;
    return [...times.keys()].filter((n) => n > 0 && times[n]! - times[n - 1]! > 1.5e-4);
  }

  function withTime(reference: ReferenceCase): ReferenceCase['files'] {
    return reference.files.map((file) => ({
      ...file,
      channels: [{ name: 'time_s', unit: 's', scale: 1 }, ...file.channels],
    }));
  }

  it.each(GAP_IN_TIME_COLUMN)('of %s are where the time column jumps', (id) => {
    const flag = flagsOf(caseOf(id), 'mains', 50).find(({ code }) => code === 'discontinuity')!;
    const rows = gapsInTime(id);
    expect(flag.evidence!.count).toBe(rows.length);
    flag.evidence!.timesS.forEach((t, i) => {
      expect(Math.abs(t - rows[i]! / 10_000)).toBeLessThanOrEqual(2e-4);
    });
  });

  // How the case was made: 64 samples lost after sample 3045, at 8 kHz.
  it('of F10-P15 is where samples were lost', () => {
    const flag = flagsOf(caseOf('F10-P15'), 'mains', 50).find(({ code }) => code === 'discontinuity')!;
    expect(flag.evidence).toMatchObject({ count: 1 });
    expect(Math.abs(flag.evidence!.timesS[0]! - 3045 / 8000)).toBeLessThanOrEqual(3 / 8000);
  });
});
