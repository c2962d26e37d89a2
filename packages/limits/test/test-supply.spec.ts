import type { ChannelAnalysis } from '@overtally/contracts';
import { describe, expect, it } from 'vitest';
import { supplyVerdict } from '../src/supply-verdict.js';
import { checkTestSupply } from '../src/test-supply.js';
import { classA, classD, en50160 } from './measured.js';

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

// IEC 61000-3-2, A.2; usual voltages of IEC 60038:2009, table 1.
describe('the supply of a verdict', () => {
  const ofClassA = (channel: ChannelAnalysis, stated: Parameters<typeof supplyVerdict>[2] = {}) =>
    supplyVerdict(classA, { ...channel, index: 1, name: 'u' }, stated);

  it('takes the nearest usual nominal values and says so, or those that were stated', () => {
    const assumed = ofClassA(supply({}));
    expect(assumed).toMatchObject({ nominalV: 230, frequencyHz: 50, result: 'pass', channelName: 'u' });
    expect(assumed?.assumption).toMatch(/230 V, the usual one nearest .*; a nominal frequency of 50 Hz/);
    const stated = ofClassA(supply({}), { nominalV: 240, frequencyHz: 50 });
    expect(stated).toMatchObject({ nominalV: 240, assumption: null, result: 'fail' });
    expect(stated?.summary).toMatch(/misses .*: voltage\. .*this result holds for the supply as it was/);
  });

  it('reads a voltage between lines as that to neutral where the channel is so', () => {
    // 400 V / sqrt 3 = 230.94 V.
    const verdict = ofClassA(supply({}), { nominalV: 400, frequencyHz: 50 });
    expect(verdict?.nominalV).toBeCloseTo(230.94, 2);
    expect(verdict).toMatchObject({ result: 'pass' });
    expect(verdict?.assumption).toMatch(/400 V as the voltage between lines, 230.9 V to neutral/);
  });

  it('asks for the peak only where the class does, and for nothing of other standards', () => {
    const flat = supply({}, { crestFactor: 1.3 });
    expect(ofClassA(flat)?.result).toBe('pass');
    expect(supplyVerdict(classD, { ...flat, index: 1, name: 'u' }, {})).toMatchObject({
      result: 'fail',
      summary: expect.stringMatching(/: peak over rms\./),
    });
    expect(supplyVerdict(en50160, flat, {})).toBeNull();
    expect(ofClassA(supply({}, { fundamental: null }))).toBeNull();
  });

  it('is open where an order was not analysed', () => {
    const short = supply({});
    short.harmonics = short.harmonics.slice(0, 30);
    expect(ofClassA(short)).toMatchObject({ result: 'not-decidable' });
    expect(ofClassA(short)?.summary).toMatch(
      /is open: harmonic 31, harmonic 32, harmonic 33 and 7 more not measured/,
    );
  });
});
