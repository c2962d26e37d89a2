import { describe, expect, it } from 'vitest';
import { limitForOrder } from '../src/limit-for-order.js';
import { classA, classB, classD, failing, judge, measured, orderOf, setOf } from './measured.js';

const totalOf = (evaluation: ReturnType<typeof judge>, name: string) =>
  evaluation.totals.find((total) => total.name === name);

// IEC 61000-3-2, clause 6.2.3 (200 % rule), from memory: under 10 % of the observation and 10 min, mean below 90 %.
describe('200 % rule of class A', () => {
  const third = (share: number, observationS: number | null, mean = 2, smoothedMax = 3.6, set = classA) => {
    const channel = measured({ 1: 5 }, { observationS });
    channel.harmonics[2] = { order: 3, mean, smoothedMax, timeAbove150Share: share };
    return orderOf(judge(set, channel), 3);
  };

  it('allows up to 200 % for less than a tenth of a short observation', () => {
    expect(third(0.09, 60)).toMatchObject({ result: 'pass' });
    expect(third(0.09, 60).reason).toMatch(/allowed by the 200 % rule: 9 % of the time/);
    expect(third(0.1, 60).result).toBe('fail');
    expect(third(0.02, 60, 2.07).result).toBe('fail');
    expect(third(0.02, 60, 2, 4.601).result).toBe('fail');
    expect(third(0.02, 60, 2, 4.6).result).toBe('pass');
  });

  it('allows 10 min in a long observation: 5 % of four hours is 12 min', () => {
    expect(third(0.05, 4 * 3600).result).toBe('fail');
    expect(third(0.04, 4 * 3600).result).toBe('pass');
    expect(third(0.05, null).result).toBe('not-decidable');
  });

  it('counts the time from the smoothed values where they are given', () => {
    const channel = measured({ 1: 5 }, { observationS: 4 });
    const smoothed = [...Array.from({ length: 19 }, () => 1.9), 3.5];
    channel.harmonics[2] = { order: 3, mean: 1.98, smoothedMax: 3.5, smoothed };
    expect(orderOf(judge(classA, channel), 3).result).toBe('pass');
    channel.harmonics[2] = { order: 3, mean: 1.98, smoothedMax: 3.5, smoothed: [1.9, 1.9, 3.5] };
    expect(orderOf(judge(classA, channel), 3).result).toBe('fail');
  });

  it('is not for class B, and takes the POHC relief from the others', () => {
    // Class B, order 3: 3.45 A; 1.6 times that is 5.52 A.
    expect(third(0.01, 60, 2, 5.52, classB).result).toBe('fail');
    const channel = measured({ 1: 5, 23: 0.12 }, { observationS: 60 });
    channel.harmonics[2] = { order: 3, mean: 2, smoothedMax: 3.6, timeAbove150Share: 0.01 };
    expect(failing(judge(classA, channel))).toEqual([23]);
  });
});

describe('scope of IEC 61000-3-2', () => {
  // Clause 7: no limits up to and including 75 W, lighting excepted; clause 5: class D up to and including 600 W.
  it.each([
    ['iec61000-3-2.classA', 75, 'not-applicable'],
    ['iec61000-3-2.classA', 75.1, 'pass'],
    ['iec61000-3-2.classB', 60, 'not-applicable'],
    ['iec61000-3-2.classD', 75, 'not-applicable'],
    ['iec61000-3-2.classD', 600, 'pass'],
    ['iec61000-3-2.classD', 600.1, 'not-applicable'],
    ['iec61000-3-2.classC.gt25W.ed5', 25, 'not-applicable'],
    ['iec61000-3-2.classC.gt25W.ed5', 25.1, 'pass'],
    ['iec61000-3-2.classC.le25W.ed4', 25, 'pass'],
    ['iec61000-3-2.classC.le25W.ed4', 25.1, 'not-applicable'],
    ['iec61000-3-2.classC.5to25W.ed5', 4.9, 'not-applicable'],
    ['iec61000-3-2.classC.5to25W.ed5', 5, 'pass'],
  ])('%s at %f W: %s', (id, powerW, result) => {
    const evaluation = judge(setOf(id), measured({ 1: 1 }), { powerW });
    expect(evaluation.result).toBe(result);
    if (result === 'not-applicable') expect(evaluation.reason).toMatch(/\d W/);
  });

  it('says when the input current is above 16 A, as the rated current decides', () => {
    expect(judge(classA, measured({ 1: 16 })).reason).not.toMatch(/16 A/);
    expect(judge(classA, measured({ 1: 17 })).reason).toMatch(/17 A is above 16 A/);
    expect(judge(classA, measured({ 1: 17000 }, { unit: 'mA' })).reason).toMatch(/17 A is above 16 A/);
  });
});

describe('class C', () => {
  // IEC 61000-3-2 edition 4, Table 2: 30 times the power factor in percent of I1.
  it('takes order 3 from the power factor in edition 4 and asks for it', () => {
    const set = setOf('iec61000-3-2.classC.gt25W.ed4');
    const at = (powerFactor: number) =>
      limitForOrder(set, 3, { fundamentalRms: 0.2, parameters: { powerFactor } });
    expect(at(0.95)).toBeCloseTo(0.2 * 0.285, 9);
    expect(judge(set, measured({ 1: 0.2, 3: 0.058 }), { powerFactor: 0.9 }).result).toBe('fail');
    expect(judge(set, measured({ 1: 0.2, 3: 0.058 }), { powerFactor: 0.98 }).result).toBe('pass');
    expect(judge(set, measured({ 1: 0.2 })).reason).toBe('The set needs powerFactor');
  });

  const lamp = setOf('iec61000-3-2.classC.5to25W.ed5');
  // 10 W: alternative 1 allows 34 mA at order 3; alternative 2 86 % and alternative 3 35 % of I1.
  it('one alternative is enough, and the reason says which', () => {
    const first = judge(lamp, measured({ 1: 0.044, 3: 0.034 }), { powerW: 10 });
    expect(first.result).toBe('pass');
    expect(first.reason).toMatch(/One alternative is enough; these are the limits of alternative 1 \(mA\/W/);
    // 35 mA at order 3 of 0.2 A: over 34 mA, 17.5 % of I1.
    const third = judge(lamp, measured({ 1: 0.2, 3: 0.035 }), { powerW: 10 });
    expect(third.result).toBe('pass');
    expect(third.reason).toMatch(/One alternative is enough; these are the limits of alternative 3/);
    expect(third.totals.map(({ name }) => name)).toEqual(['THD']);
  });

  it('is open as long as the shape of the current may save it, and fails when it does not', () => {
    // Order 3 at 80 % of I1: over alternatives 1 and 3, within 86 % of alternative 2.
    const channel = measured({ 1: 0.05, 3: 0.04 });
    const open = judge(lamp, channel, { powerW: 10 });
    expect(open.result).toBe('not-decidable');
    expect(open.reason).toMatch(/shape of the current .* is not known/);
    const shaped = (startsDeg: number, peakDeg: number, endsDeg: number) =>
      judge(lamp, { ...channel, currentShape: { startsDeg, peakDeg, endsDeg } }, { powerW: 10 });
    expect(shaped(60, 65, 90).result).toBe('pass');
    expect(shaped(60.1, 65, 90).result).toBe('fail');
    expect(shaped(60, 65.1, 90).result).toBe('fail');
    expect(shaped(60, 65, 89.9).result).toBe('fail');
    // Order 3 at 90 % of I1 is over every alternative.
    const lost = judge(lamp, measured({ 1: 0.05, 3: 0.045 }), { powerW: 10 });
    expect(lost.result).toBe('fail');
    expect(lost.reason).toMatch(/No alternative is shown to be met; these are the limits of alternative 1/);
  });
});

describe('class D', () => {
  it('saves an order from 21 up by POHC: 0.43013 mA/W of IEC 61000-3-2, Table 3', () => {
    // 100 W: order 21 is limited to 18.33 mA, POHC to 43.01 mA.
    const evaluation = judge(classD, measured({ 1: 0.5, 21: 0.02 }), { powerW: 100 });
    expect(evaluation.result).toBe('pass');
    expect(orderOf(evaluation, 21).sharePercent).toBeCloseTo(109.09, 2);
    expect(totalOf(evaluation, 'POHC')?.limit).toBeCloseTo(0.043013, 7);
  });
});

/** Ideal six-pulse current: 1/h at 6k +- 1; Iref is its total rms (orders to 49). */
function sixPulse() {
  const amounts: Record<number, number> = { 1: 30 };
  for (let h = 5; h <= 49; h++) if (h % 6 === 1 || h % 6 === 5) amounts[h] = 30 / h;
  return measured(amounts);
}

describe('IEC 61000-3-12', () => {
  const table3 = setOf('iec61000-3-12.table3');
  // Total rms of the ideal wave: I1 times pi/3 (Fourier series of the 120 degree block).
  const irefA = 30 * (Math.PI / 3);

  it('an ideal six-pulse current has THC 28.3418 % and PWHC 53.7883 % of Iref', () => {
    const evaluation = judge(table3, sixPulse(), { rsce: 350, irefA });
    expect(totalOf(evaluation, 'THC')?.value).toBeCloseTo(28.3418, 4);
    expect(totalOf(evaluation, 'PWHC')?.value).toBeCloseTo(53.7883, 4);
    expect(totalOf(evaluation, 'PWHC')).toMatchObject({ unit: '%', limit: 46, result: 'fail' });
    expect(evaluation.result).toBe('fail');
    expect(failing(evaluation)).toEqual([]);
  });

  // Worked out by hand from Table 3: the Rsce at which the interpolated limit equals the value.
  it.each([
    [5, 121.07],
    [7, 146.68],
    [11, 163.71],
    [13, 261.52],
  ])('its order %i needs Rsce %f by linear interpolation', (order, rsce) => {
    const at = (value: number) => orderOf(judge(table3, sixPulse(), { rsce: value, irefA }), order).result;
    expect(at(rsce - 0.02)).toBe('fail');
    expect(at(rsce + 0.02)).toBe('pass');
  });

  it('interpolates totals, keeps the last row above it and begins at 33', () => {
    const limitOfThc = (rsce: number) => totalOf(judge(table3, sixPulse(), { rsce, irefA }), 'THC')?.limit;
    // Between 120 (22 %) and 250 (37 %): 185 is half way.
    expect(limitOfThc(185)).toBeCloseTo(29.5, 9);
    expect(limitOfThc(5000)).toBe(48);
    expect(judge(table3, sixPulse(), { rsce: 120, irefA }).reason).toMatch(/Limits of Rsce 120$/);
    expect(judge(table3, sixPulse(), { rsce: 32.9, irefA })).toMatchObject({ result: 'not-applicable' });
    expect(judge(table3, sixPulse(), { rsce: 33, irefA: 16 }).reason).toMatch(
      /above 16 A up to and including 75 A/,
    );
    expect(judge(table3, sixPulse(), { rsce: 185, irefA }).reason).toMatch(
      /linear interpolation between Rsce 120 and Rsce 250/,
    );
  });

  it('ignores currents below 1 % of Iref and holds single values to 150 %', () => {
    // Iref 50 A: 1 % is 0.5 A; order 12 is limited to 1.3333 % or 0.66667 A, order 2 to 4 A.
    const set = setOf('iec61000-3-12.table2');
    const at = (amounts: Parameters<typeof measured>[0]) =>
      judge(set, measured(amounts), { rsce: 33, irefA: 50 });
    expect(orderOf(at({ 1: 50, 12: 0.49 }), 12).result).toBe('disregarded');
    expect(orderOf(at({ 1: 50, 12: 0.51 }), 12).result).toBe('pass');
    expect(failing(at({ 1: 50, 12: 0.67 }))).toEqual([12]);
    expect(failing(at({ 1: 50, 2: { mean: 3, smoothedMax: 6.01 } }))).toEqual([2]);
    expect(failing(at({ 1: 50, 2: { mean: 4, smoothedMax: 6 } }))).toEqual([]);
  });

  it('leaves a total open that only currents below 1 % of Iref put over its limit', () => {
    // Iref 50 A, Table 3 at Rsce 33: PWHC 22 % is 11 A. 2.6 A at order 17 alone: sqrt(17) 2.6 = 10.72 A; with
    // 0.4 A (0.8 %) at each of 35, 37 and 38: sqrt(17 * 6.76 + 110 * 0.16) = 11.51 A.
    const pwhc = (amounts: Parameters<typeof measured>[0]) =>
      totalOf(judge(table3, measured({ 1: 50, ...amounts }), { rsce: 33, irefA: 50 }), 'PWHC');
    expect(pwhc({ 17: 2.6 })?.result).toBe('pass');
    const open = pwhc({ 17: 2.6, 35: 0.4, 37: 0.4, 38: 0.4 });
    expect(open?.value).toBeCloseTo((100 * Math.sqrt(17 * 6.76 + 110 * 0.16)) / 50, 9);
    expect(open?.result).toBe('not-decidable');
    expect(open?.reason).toMatch(/only with the currents below 1 % of Iref/);
    expect(pwhc({ 17: 2.7 })?.result).toBe('fail');
  });

  it('asks for Rsce and Iref', () => {
    expect(judge(table3, sixPulse())).toMatchObject({
      result: 'not-decidable',
      reason: 'The set needs rsce, irefA',
    });
  });
});

// IEEE 519-2022, Table 2: Isc/IL below 20: 4 % below order 11, TDD 5 %, of IL and not of the fundamental.
describe('IEEE 519', () => {
  const table2 = setOf('ieee519-2022.table2');
  const at = (amounts: Record<number, number>, parameters: object) =>
    judge(table2, measured(amounts), { iscOverIl: 15, ilA: 100, ...parameters });

  it('refers orders and TDD to the demand current', () => {
    const half = at({ 1: 50, 5: 3.9, 7: 3 }, {});
    expect(orderOf(half, 5)).toMatchObject({ limit: 4, result: 'pass' });
    // sqrt(3.9^2 + 3^2) = 4.92037 A of 100 A.
    expect(totalOf(half, 'TDD')?.value).toBeCloseTo(4.92037, 5);
    expect(half.result).toBe('pass');
    expect(at({ 1: 50, 5: 3.9, 7: 3.2 }, {}).reason).toMatch(/^Over at TDD/);
    expect(failing(at({ 1: 50, 5: 3.9 }, { ilA: 50 }))).toEqual([5]);
  });

  it('takes the row of the ratio, its lower end inside', () => {
    expect(orderOf(at({ 1: 50 }, { iscOverIl: 19.99 }), 5).limit).toBe(4);
    expect(orderOf(at({ 1: 50 }, { iscOverIl: 20 }), 5).limit).toBe(7);
    expect(at({ 1: 50 }, { iscOverIl: 20 }).reason).toMatch(/Isc\/IL from 20 to below 50/);
  });

  it('halves even orders up to 6 in 2022 and quarters all of them in 2014', () => {
    const even = (id: string, order: number) =>
      orderOf(judge(setOf(id), measured({ 1: 50 }), { iscOverIl: 15, ilA: 100 }), order).limit;
    expect([even('ieee519-2022.table2', 6), even('ieee519-2022.table2', 8)]).toEqual([2, 4]);
    expect([even('ieee519-2014.table2', 6), even('ieee519-2014.table2', 8)]).toEqual([1, 1]);
  });

  it('says that a short record is compared, and that a place of another voltage has another table', () => {
    expect(at({ 1: 50 }, {}).reason).toMatch(/99th percentile of 3 s values .* states no conformity$/);
    expect(at({ 1: 50 }, { nominalV: 100_000 })).toMatchObject({ result: 'not-applicable' });
    expect(at({ 1: 50 }, { nominalV: 69_000 }).result).toBe('pass');
  });

  const volts = (fundamental: number, fifth: number) =>
    measured({ 1: fundamental, 5: fifth }, { quantity: 'voltage', unit: 'V' });
  const voltage = setOf('ieee519.voltage');

  it('refers voltages to the rated voltage, also of a channel from line to neutral', () => {
    // 5 % of 480 V is 24 V; of 480/sqrt 3 = 277.13 V it is 13.856 V.
    expect(orderOf(judge(voltage, volts(470, 20), { nominalV: 480 }), 5).limit).toBeCloseTo(24, 9);
    const phase = judge(voltage, volts(275, 13.9), { nominalV: 480 });
    expect(orderOf(phase, 5).limit).toBeCloseTo(13.8564, 4);
    expect(failing(phase)).toEqual([5]);
    // The class goes by the voltage between lines: 1200 V is above 1 kV although 693 V is not.
    expect(orderOf(judge(voltage, volts(690, 1), { nominalV: 1200 }), 5).limit).toBeCloseTo(0.03 * 692.82, 2);
  });

  it('THD is of the rated voltage as Table 1 asks', () => {
    expect(totalOf(judge(voltage, volts(460, 24), { nominalV: 480 }), 'THD')?.value).toBeCloseTo(5, 9);
  });
});

describe('supply voltages', () => {
  const supply = (fundamental: number, unit = 'V') =>
    measured({ 1: fundamental }, { quantity: 'voltage', unit });

  // EN 50160: Un +10 % / -15 % covers all 10 min values; farther away the channel is not that supply.
  it('does not apply a set to a channel far from the nominal voltage', () => {
    const lv = setOf('en50160.lv');
    expect(judge(lv, supply(235), { nominalV: 230 }).result).toBe('pass');
    expect(judge(lv, supply(231), { nominalV: 400 }).result).toBe('pass');
    const far = judge(lv, supply(24), { nominalV: 230 });
    expect(far.result).toBe('not-applicable');
    expect(far.reason).toMatch(/fundamental is 24 V, more than 15 % from a nominal voltage of 230 V/);
    expect(judge(lv, supply(24)).result).toBe('pass');
    expect(judge(lv, supply(11_000), { nominalV: 11_000 }).reason).toMatch(/use the set for medium voltage/);
  });

  it('asks medium voltage for its nominal voltage and reads kV', () => {
    const mv = setOf('en50160.mv');
    expect(judge(mv, supply(20, 'kV')).reason).toBe('The set needs nominalV');
    expect(judge(mv, supply(20, 'kV'), { nominalV: 20_000 }).result).toBe('pass');
    expect(judge(mv, supply(230), { nominalV: 230 }).result).toBe('not-applicable');
    expect(judge(mv, supply(20, 'kV'), { nominalV: 40_000 }).result).toBe('not-applicable');
  });
});

// ILAC-G8:09/2019, 4.2, with U of each order; the third of class A is limited to 2.30 A.
describe('uncertainty of each order', () => {
  const third = (mean: number, uncertainty: number | null, parameters = {}) => {
    const channel = measured({ 1: 5 });
    channel.harmonics = channel.harmonics.map((harmonic) => ({ ...harmonic, uncertainty: 0 }));
    channel.harmonics[2] = { order: 3, mean, smoothedMax: mean, uncertainty };
    return judge(classA, channel, parameters, 'non-binary');
  };

  it('guards by the uncertainty of the measurement', () => {
    expect(orderOf(third(2.2, 0.09), 3).result).toBe('pass');
    expect(orderOf(third(2.2, 0.09), 3).uncertainty).toBeCloseTo(0.09, 12);
    expect(orderOf(third(2.2, 0.11), 3).result).toBe('conditional-pass');
    expect(orderOf(third(2.4, 0.11), 3).result).toBe('conditional-fail');
    expect(orderOf(third(2.42, 0.11), 3).result).toBe('fail');
    expect(third(2.2, 0.09).decisionRuleText).toMatch(/U \(k = 2\) of each order:/);
  });

  it('takes the greater of that and the stated percentage, and falls back on the percentage', () => {
    expect(orderOf(third(2.2, 0.01, { expandedUncertaintyPercent: 5 }), 3).uncertainty).toBeCloseTo(0.11, 9);
    expect(orderOf(third(2.2, 0.2, { expandedUncertaintyPercent: 5 }), 3).uncertainty).toBeCloseTo(0.2, 9);
    expect(orderOf(third(2.2, null, { expandedUncertaintyPercent: 5 }), 3).uncertainty).toBeCloseTo(0.11, 9);
  });

  it('an order without uncertainty is not decidable by a rule that needs it', () => {
    const evaluation = third(1, null);
    expect(orderOf(evaluation, 3)).toMatchObject({ result: 'not-decidable', uncertainty: null });
    expect(orderOf(evaluation, 5).result).not.toBe('not-decidable');
    expect(evaluation.reason).toMatch(
      /^Not decidable at 3: The decision rule needs the expanded uncertainty/,
    );
  });

  it('carries over to totals, the orders taken as fully correlated (JCGM 100:2008, 5.2.2)', () => {
    // 4 % each in orders 5 and 7 with U = 0.3 % each: THD 5.65685 %, U = (4*0.3 + 4*0.3)/5.65685 = 0.42426 %.
    const channel = measured({ 1: 100, 5: 4, 7: 4 }, { quantity: 'voltage', unit: 'V' });
    channel.harmonics = channel.harmonics.map((harmonic) => ({
      ...harmonic,
      uncertainty: harmonic.mean > 0 && harmonic.order > 1 ? 0.3 : 0,
    }));
    const limited = (limit: number) => ({
      ...setOf('en50160.lv'),
      totals: [{ name: 'THD' as const, limit, maxOrder: 40 }],
    });
    const result = (limit: number) =>
      totalOf(judge(limited(limit), channel, {}, 'guarded-acceptance'), 'THD')?.result;
    expect(result(6.0812)).toBe('pass');
    expect(result(6.081)).toBe('fail');
  });
});
