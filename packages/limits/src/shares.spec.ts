import type { ChannelSummary } from '@overtally/contracts';
import { describe, expect, it } from 'vitest';
import { findPublishedLimitSet } from './sets/index.js';
import { sharesOfSummary } from './shares.js';
import { unitRatio } from './units.js';

const setOf = (id: string) => {
  const set = findPublishedLimitSet(id);
  if (set === undefined) throw new Error(`No set ${id}`);
  return set;
};
const summary: ChannelSummary = {
  channel: 0,
  name: 'i',
  quantity: 'current',
  unit: 'A',
  fundamentalHz: 50,
  rms: 5,
  thdFPercent: 30,
  harmonicRms: [4.8, 0, 1.15],
};

describe('sharesOfSummary', () => {
  it('lists orders 2 to 40, null beyond what was computed: 1.15 A is half of 2.30 A', () => {
    const shares = sharesOfSummary(setOf('iec61000-3-2.classA'), summary);
    expect(shares.map(({ order }) => order)).toEqual(Array.from({ length: 39 }, (_, i) => i + 2));
    expect(shares[0]?.sharePercent).toBe(0);
    expect(shares[1]?.sharePercent).toBeCloseTo(50, 9);
    expect(shares[2]?.sharePercent).toBeNull();
  });

  it('is null throughout for another quantity and for a missing parameter', () => {
    const isNull = ({ sharePercent }: { sharePercent: number | null }) => sharePercent === null;
    expect(sharesOfSummary(setOf('en50160.lv'), summary).every(isNull)).toBe(true);
    expect(sharesOfSummary(setOf('iec61000-3-2.classD'), summary).every(isNull)).toBe(true);
    const third = sharesOfSummary(setOf('iec61000-3-2.classD'), summary, { powerW: 500 })[1];
    expect(third?.sharePercent).toBeCloseTo((100 * 1.15) / 1.7, 9);
  });
});

describe('unitRatio', () => {
  it.each([
    ['A', 'mA', 1000],
    ['mA', 'A', 0.001],
    ['V', 'kV', 0.001],
    ['m/s²', 'm/s²', 1],
    ['A', 'V', null],
    ['A', '', null],
    ['m', '', null],
  ])('%s in %s is %s', (from, to, ratio) => {
    expect(unitRatio(from, to)).toBe(ratio);
  });
});
