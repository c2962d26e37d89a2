import { describe, expect, it } from 'vitest';
import { channelOf, columnFaults, columnOf, ratioOf, sharesUnit, untouchedColumn } from './column-draft.js';

describe('ratio of a probe or transformer', () => {
  it.each([
    ['100', 100],
    ['100:1', 100],
    ['100 : 1', 100],
    ['×10', 10],
    ['1 000:1', Number.NaN],
    ['2000/5', 400],
    ['0,5', 0.5],
    ['', undefined],
  ])('reads %j as %s', (written, ratio) => expect(ratioOf(written)).toBe(ratio));

  it('takes no ratio that is written for both directions', () => {
    expect(ratioOf('1:100')).toBeNaN();
    expect(columnFaults({ ...untouchedColumn, probeRatio: '1:100' }).probeRatio).toMatch(/100 : 1/);
  });
});

describe('fields of a column', () => {
  it('give back the options they were filled with', () => {
    const channel = {
      ...{ column: 1, name: 'u1', quantity: 'voltage' as const, unit: 'V', gain: -2, offset: 0.5 },
      ...{ fullScale: 10, probeRatio: 0.01, inverted: true },
    };
    expect(channelOf(1, columnOf(channel))).toEqual(channel);
    expect(channelOf(1, columnOf({ column: 1, probeRatio: 100 }))).toEqual({ column: 1, probeRatio: 100 });
  });

  it('are told what they cannot hold', () => {
    const faults = columnFaults({ ...untouchedColumn, gain: '0', offset: 'x', fullScale: '-1' });
    expect(Object.keys(faults).toSorted()).toEqual(['fullScale', 'gain', 'offset']);
    expect(columnFaults({ ...untouchedColumn, gain: '-1', offset: '0,25', fullScale: '1e1' })).toEqual({});
  });

  it('are alike where the unit is the same, or was it in the file', () => {
    const column = (unit: string) => ({ index: 0, name: 'c', unit, quantity: 'other' as const });
    const volts = { column: column(''), draft: { ...untouchedColumn, unit: 'V' } };
    expect(sharesUnit(volts, { column: column(''), draft: untouchedColumn })).toBe(true);
    expect(sharesUnit(volts, { column: column('V'), draft: untouchedColumn })).toBe(true);
    expect(sharesUnit(volts, { column: column(''), draft: { ...untouchedColumn, unit: 'A' } })).toBe(false);
    expect(sharesUnit(volts, { column: column('A'), draft: untouchedColumn })).toBe(false);
  });
});
