import { describe, expect, it } from 'vitest';
import { orderPowers } from './order-powers.js';
import { powerFigures } from './power-figures.js';
import type { PhasorSet } from './types.js';

/** Phasor set from [rms, degrees] by order; absent orders are zero. */
function phasors(orders: Record<number, [number, number]>, dc = 0): PhasorSet {
  const count = Math.max(...Object.keys(orders).map(Number));
  const at = (i: number) => orders[i + 1] ?? [0, 0];
  const rms = Array.from({ length: count }, (_, i) => at(i)[0]);
  return {
    dc,
    rms,
    phaseDeg: Array.from({ length: count }, (_, i) => at(i)[1]),
    totalRms: Math.sqrt(rms.reduce((sum, x) => sum + x * x, dc * dc)),
  };
}

// IEEE 1459-2010, annex B (single-phase, non-sinusoidal). The angles of I5 and I7 are supported by the published powers
// of their orders (−11.78 W, −1.74 W); figures recomputed from the phasors to nine digits with numpy 1.24.
const VOLTAGE = phasors({ 1: [100, 0], 3: [8, -70], 5: [15, 140], 7: [5, 20] });
const CURRENT = phasors({ 1: [100, -30], 3: [20, -165], 5: [15, 233], 7: [10, 288] });

describe('powerFigures', () => {
  it('gives the figures of the example of IEEE 1459', () => {
    const figures = powerFigures(VOLTAGE, CURRENT);
    const expected = {
      V: 101.557865,
      I: 103.561576,
      V1: 100,
      I1: 100,
      VH: 17.720045,
      IH: 26.925824,
      P: 8632.7886,
      P1: 8660.254,
      PH: -27.4655,
      Q1: 5000,
      S: 10517.4926,
      S1: 10000,
      N: 6007.7127,
      DI: 2692.5824,
      DV: 1772.0045,
      SH: 477.1268,
      DH: 476.3356,
      SN: 3258.4736,
      PF: 0.820803,
      PF1: 0.866025,
      harmonicPollution: 0.325847,
      thdV: 0.1772,
      thdI: 0.26926,
    };
    for (const [name, value] of Object.entries(expected)) {
      const got = figures[name as keyof typeof expected]!;
      expect(Math.abs(got - value), name).toBeLessThan(6e-8 * figures.S + 6e-7);
    }
  });

  it('keeps the identities of the standard', () => {
    const f = powerFigures(VOLTAGE, CURRENT);
    expect(f.SN).toBeCloseTo(Math.sqrt(f.S ** 2 - f.S1 ** 2), 7);
    expect(f.DI).toBeCloseTo(f.S1 * f.thdI!, 8);
    expect(f.DV).toBeCloseTo(f.S1 * f.thdV!, 8);
    expect(f.SH).toBeCloseTo(f.S1 * f.thdI! * f.thdV!, 8);
    const spread = Math.sqrt(1 + f.thdI! ** 2 + f.thdV! ** 2 + (f.thdI! * f.thdV!) ** 2);
    expect(f.PF).toBeCloseTo((f.PF1! * (1 + f.PH / f.P1)) / spread, 12);
  });

  it('counts DC in V, VH, P and PH', () => {
    const f = powerFigures(phasors({ 1: [3, 0] }, 4), phasors({ 1: [1, 60] }, -2));
    expect(f.V).toBe(5);
    expect(f.VH).toBeCloseTo(4, 12);
    expect(f.PH).toBe(-8);
    expect(f.P).toBeCloseTo(3 * 0.5 - 8, 12);
    expect(f.Q1).toBeCloseTo(-3 * Math.sin(Math.PI / 3), 12);
  });

  it('gives PF = 1/√2 and PF1 = 0.8436 for a resistor behind a phase-cut at 90°', () => {
    // Closed form: unit peak, I rms = 1/2, I1 = 0.419118827806 at −32.4816366° (Fourier series of the cut sine).
    const voltage = phasors({ 1: [Math.SQRT1_2, 0] });
    const current = { ...phasors({ 1: [0.419118827806, -32.4816366] }), totalRms: 0.5 };
    const figures = powerFigures(voltage, current);
    expect(figures.PF).toBeCloseTo(Math.SQRT1_2, 8);
    expect(figures.PF1).toBeCloseTo(0.843563608, 8);
    expect(figures.thdI).toBeCloseTo(Math.sqrt((2 * Math.PI ** 2) / (4 + Math.PI ** 2) - 1), 8);
    expect(figures.PH).toBe(0);
  });

  it('has no ratio to zero and no root of what does not belong together', () => {
    const open = powerFigures(VOLTAGE, phasors({ 1: [0, 0] }));
    expect([open.P, open.S, open.N]).toEqual([0, 0, 0]);
    expect([open.PF, open.PF1, open.harmonicPollution, open.thdI]).toEqual([null, null, null, null]);
    const short = powerFigures({ ...VOLTAGE, totalRms: 99 }, CURRENT);
    expect([short.VH, short.DV, short.SH, short.DH, short.SN]).toEqual([null, null, null, null, null]);
    expect(short.harmonicPollution).toBeNull();
  });

  it('takes rounding for zero distortion', () => {
    const sine = { ...phasors({ 1: [230, 0] }), totalRms: 230 * (1 - 1e-14) };
    const figures = powerFigures(sine, sine);
    expect([figures.VH, figures.SN, figures.thdV]).toEqual([0, 0, 0]);
    expect(figures.N).toBe(0);
  });

  it('refuses sets without a fundamental', () => {
    const none = { dc: 1, totalRms: 1, rms: [], phaseDeg: [] };
    expect(() => powerFigures(none, CURRENT)).toThrow(RangeError);
  });
});

describe('orderPowers', () => {
  it('gives the powers by order of the example of IEEE 1459', () => {
    const orders = orderPowers(VOLTAGE, CURRENT);
    const at = (order: number) => orders[order - 1]!;
    expect([1, 3, 5, 7].map((h) => at(h).P.toFixed(4))).toEqual([
      '8660.2540',
      '-13.9449',
      '-11.7756',
      '-1.7450',
    ]);
    expect([1, 3, 5, 7].map((h) => at(h).Q.toFixed(4))).toEqual([
      '5000.0000',
      '159.3912',
      '-224.6916',
      '49.9695',
    ]);
    expect([1, 3, 5, 7].map((h) => at(h).direction)).toEqual([
      'into-load',
      'from-load',
      'from-load',
      'from-load',
    ]);
    expect(at(3).phaseDifferenceDeg).toBeCloseTo(95, 10);
    expect(at(5).phaseDifferenceDeg).toBeCloseTo(-93, 10);
  });

  it('has no direction where there is no power', () => {
    const [first, second] = orderPowers(phasors({ 1: [1, 90], 2: [0.5, 0] }), phasors({ 1: [1, 0] }));
    expect(first).toMatchObject({ direction: null, phaseDifferenceDeg: 90 });
    expect(second).toBeUndefined();
    const absent = orderPowers(phasors({ 1: [1, 0], 3: [0.1, 0] }), phasors({ 1: [1, 0], 3: [0, 0] }))[2]!;
    expect(absent).toMatchObject({ P: 0, Q: 0, direction: null, phaseDifferenceDeg: null });
  });

  it('has no phase below 0.1 % of the largest order or within ten deviations of noise', () => {
    const current = phasors({ 1: [10, 0], 3: [1, 0], 5: [0.009, 0] });
    const voltage = phasors({ 1: [230, 0], 3: [5, 0], 5: [5, 0] });
    const third = (noiseRms: number) => orderPowers(voltage, { ...current, noiseRms })[2]!;
    expect(third(0.09).phaseDifferenceDeg).toBe(0);
    expect(third(0.11).phaseDifferenceDeg).toBeNull();
    expect(third(0.11).P).toBe(5);
    expect(orderPowers(voltage, current)[4]!).toMatchObject({ phaseDifferenceDeg: null, direction: null });
  });

  it('has no direction where noise could turn the sign', () => {
    const voltage = phasors({ 1: [100, 0] });
    const current = (phase: number) => ({ ...phasors({ 1: [10, phase] }), noiseRms: 0.1 });
    // P = 1000 cos θ W against three deviations of 100 · 0.1 W.
    expect(orderPowers(voltage, current(88.5))[0]!.direction).toBeNull();
    expect(orderPowers(voltage, current(88))[0]!.direction).toBe('into-load');
    expect(orderPowers(voltage, current(92))[0]!.direction).toBe('from-load');
  });

  it('names phases from the rising zero crossing of the voltage', () => {
    // Sine form: u = √2·sin(ωt + 0°), i_1 lags by 30°, i_3 at +40°; cosine form with zero time a tenth of a cycle later.
    const shift = (order: number, sinePhase: number) => sinePhase - 90 + order * 36;
    const voltage = phasors({ 1: [1, shift(1, 0)], 3: [0.1, shift(3, 100)] });
    const current = phasors({ 1: [1, shift(1, -30)], 3: [0.5, shift(3, 40)] });
    const [first, , third] = orderPowers(voltage, current);
    expect(first!.currentPhaseZeroCrossingDeg).toBeCloseTo(-30, 10);
    expect(third!.currentPhaseZeroCrossingDeg).toBeCloseTo(40, 10);
    expect(third!.voltagePhaseZeroCrossingDeg).toBeCloseTo(100, 10);
  });
});
