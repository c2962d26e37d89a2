import type { ChannelAnalysis } from '@overtally/contracts';
import { describe, expect, it } from 'vitest';
import { checkTestSupply } from '../src/test-supply.js';

/** A voltage channel of 230 V and 50 Hz with harmonics in percent of the fundamental. */
function supply(percents: Record<number, number>, rest: object = {}): ChannelAnalysis {
  const harmonics = Array.from({ length: 40 }, (_, i) => ({
    order: i + 1,
    rms: i === 0 ? 230 : 2.3 * (percents[i + 1] ?? 0),
    subgroupRms: null,
  }));
  const base = {
    unit: 'V',
    rms: 230,
    crestFactor: 1.41,
    fundamental: { frequencyHz: 50, rms: 230 },
    harmonics,
  };
  return { ...base, ...rest } as unknown as ChannelAnalysis;
}
const nominal = { nominalV: 230, frequencyHz: 50, checksPeak: true };
const failing = (channel: ChannelAnalysis, given = nominal) =>
  checkTestSupply(channel, given)
    .filter(({ result }) => result === 'fail')
    .map(({ name }) => name);

// IEC 61000-3-2, A.2: the allowed harmonics of the test voltage; from memory.
const allowed = {
  2: 0.2,
  3: 0.9,
  4: 0.2,
  5: 0.4,
  6: 0.2,
  7: 0.3,
  8: 0.2,
  9: 0.2,
  10: 0.2,
  11: 0.1,
  12: 0.1,
  40: 0.1,
};

describe('test supply of IEC 61000-3-2', () => {
  it('passes exactly at every allowed harmonic and fails a hundredth above it', () => {
    expect(failing(supply(allowed))).toEqual([]);
    const above = Object.fromEntries(Object.entries(allowed).map(([n, percent]) => [n, 1.01 * percent]));
    expect(failing(supply(above))).toEqual(Object.keys(allowed).map((n) => `harmonic ${n}`));
  });

  it('allows 2 % of voltage and 0.5 % of frequency: 225.4 to 234.6 V, 49.75 to 50.25 Hz', () => {
    for (const rms of [225.4, 234.6]) expect(failing(supply({}, { rms }))).toEqual([]);
    for (const rms of [225.3, 234.7]) expect(failing(supply({}, { rms }))).toEqual(['voltage']);
    const at = (frequencyHz: number) => failing(supply({}, { fundamental: { frequencyHz, rms: 230 } }));
    expect([at(49.75), at(50.25), at(49.74), at(50.26)]).toEqual([[], [], ['frequency'], ['frequency']]);
    expect(failing(supply({}, { unit: 'kV', rms: 0.23 }))).toEqual([]);
  });

  it('holds the peak to 1.40 to 1.42 times the rms, except for classes A and B', () => {
    for (const crestFactor of [1.39, 1.43]) {
      expect(failing(supply({}, { crestFactor }))).toEqual(['peak over rms']);
      expect(failing(supply({}, { crestFactor }), { ...nominal, checksPeak: false })).toEqual([]);
    }
    expect(failing(supply({}, { crestFactor: Math.SQRT2 }))).toEqual([]);
  });

  it('cannot decide what was not analysed', () => {
    const channel = supply({});
    channel.harmonics = channel.harmonics.slice(0, 20);
    const open = checkTestSupply(channel, nominal).filter(({ result }) => result === 'not-decidable');
    expect(open.map(({ name }) => name)).toEqual(Array.from({ length: 20 }, (_, i) => `harmonic ${i + 21}`));
  });
});
