import { describe, expect, it } from 'vitest';
import { AnalysisInputError } from '../errors.js';
import { fitPhasorSet } from './fit-phasor-set.js';
import { recordPower, type PowerChannel } from './record-power.js';
import { unitFactor } from './unit-factor.js';

function channel(index: number, unit: string, rms: number, phaseDeg: number): PowerChannel {
  return {
    index,
    name: `x${index}`,
    unit,
    phasors: { dc: 0, totalRms: rms, rms: Float64Array.of(rms), phaseDeg: [phaseDeg] },
  };
}

const CHANNELS = [
  channel(3, 'kV', 0.23, 0),
  channel(5, 'mA', 2000, -60),
  channel(7, 'g', 1, 0),
  channel(8, '', 230, 0),
];

describe('recordPower', () => {
  it('gives V, A and W whatever the units of the channels', () => {
    const { power } = recordPower({
      frequencyHz: 50,
      channels: CHANNELS,
      pairs: [
        { voltage: 3, current: 5, phase: 2 },
        { voltage: 8, current: 5 },
      ],
      threePhase: [],
      ratedCurrentA: 4,
    });
    expect(power[0]).toMatchObject({ voltageChannel: 3, currentChannel: 5, phase: 2, frequencyHz: 50 });
    expect(power[0]!.V).toBeCloseTo(230, 10);
    expect(power[0]!.P).toBeCloseTo(230, 10);
    expect(power[0]!.transformer.kFactorRated).toBeCloseTo(0.25, 12);
    expect(power[1]!.phase).toBeNull();
    expect(power[1]!.P).toBeCloseTo(230, 10);
  });

  it('gives plain objects that survive JSON', () => {
    const result = recordPower({
      frequencyHz: 50,
      channels: CHANNELS,
      pairs: [{ voltage: 8, current: 5 }],
      threePhase: [{ voltages: [8, 8, 8], currents: [5, 5, 5], wires: '4w' }],
    });
    expect(JSON.parse(JSON.stringify(result))).toEqual(result);
    expect(result.threePhase[0]!.neutralOrders[0]!.rms).toBeCloseTo(6, 12);
    expect(result.threePhase[0]!.phases[2].P).toBeCloseTo(230, 10);
  });

  it('converts the noise with the unit', () => {
    // 2000 mA stand out of 10 · 150 mA of noise and drown in 10 · 250 mA.
    const phase = (noiseRms: number) =>
      recordPower({
        frequencyHz: 50,
        channels: [CHANNELS[3]!, { ...CHANNELS[1]!, phasors: { ...CHANNELS[1]!.phasors, noiseRms } }],
        pairs: [{ voltage: 8, current: 5 }],
        threePhase: [],
      }).power[0]!.orders[0]!.phaseDifferenceDeg;
    expect(phase(150)).toBe(60);
    expect(phase(250)).toBeNull();
  });

  it.each([
    ['no channel', { voltage: 4, current: 5 }, /no channel 4/],
    ['a unit of something else', { voltage: 3, current: 7 }, /"x7" has the unit "g"/],
    ['a current in place of a voltage', { voltage: 5, current: 5 }, /needs V/],
  ])('refuses %s', (_, pair, message) => {
    const run = () => recordPower({ frequencyHz: 50, channels: CHANNELS, pairs: [pair], threePhase: [] });
    expect(run).toThrow(AnalysisInputError);
    expect(run).toThrow(message);
  });
});

describe('unitFactor', () => {
  it.each([
    ['V', 1],
    ['kV', 1000],
    [' mV ', 1e-3],
    ['µV', 1e-6],
    ['μV', 1e-6],
    ['', 1],
    ['A', null],
    ['constructorV', null],
  ])('of %s in V is %s', (unit, factor) => {
    expect(unitFactor(unit, 'V')).toBe(factor);
  });
});

describe('fitPhasorSet', () => {
  const rate = 10_000;
  const wave = (cycles: number) =>
    Float64Array.from({ length: Math.round((cycles * rate) / 49.3) }, (_, n) => {
      const angle = (2 * Math.PI * 49.3 * n) / rate;
      return 3 + Math.SQRT2 * (10 * Math.cos(angle + 0.5) + Math.cos(3 * angle - 1));
    });

  it('finds DC, orders and total rms of a broken number of cycles', () => {
    const set = fitPhasorSet(wave(10.37), rate, 49.3);
    expect(set.dc).toBeCloseTo(3, 9);
    expect(set.rms[0]).toBeCloseTo(10, 9);
    expect(set.rms[2]).toBeCloseTo(1, 9);
    expect(set.phaseDeg[0]).toBeCloseTo((0.5 * 180) / Math.PI, 7);
    expect(set.totalRms).toBeCloseTo(Math.sqrt(9 + 100 + 1), 9);
    expect(set.rms).toHaveLength(50);
  });

  it('counts what lies between the orders in the total rms', () => {
    const samples = wave(40).map((x, n) => x + Math.SQRT2 * 2 * Math.cos((2 * Math.PI * 172.55 * n) / rate));
    expect(fitPhasorSet(samples, rate, 49.3).totalRms).toBeCloseTo(Math.sqrt(110 + 4), 1);
  });

  it('leaves out orders beyond half the sample rate', () => {
    expect(fitPhasorSet(wave(20), rate, 49.3, 200).rms).toHaveLength(101);
  });
});
