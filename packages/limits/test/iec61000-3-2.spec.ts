import { describe, expect, it } from 'vitest';
import { limitForOrder } from '../src/limit-for-order.js';
import type { Measurement } from '../src/measurement.js';
import { classA, classB, classD, failing, judge, measured, orderOf } from './measured.js';

/**
 * Resistor of 52.9 ohm on 230 V behind a symmetrical phase cut at 90 deg, from the Fourier integral of the sine over
 * the second quarter: I1 = (V/R) sqrt(1/4 + 1/pi^2) = 2.57706 A; odd n >= 3: (V/R)/(pi m), m = 1 at 3, 3 at 5 and 7,
 * 5 at 9 and 11, and so on (I3 = 1.38396 A, I15 = 0.19771 A, I39 = 0.07284 A).
 */
function phaseCut90(scale = 1): Measurement {
  const amounts: Record<number, number> = { 1: 2.57706 * scale };
  for (let n = 3; n <= 49; n += 2) {
    amounts[n] = ((230 / 52.9) * scale) / (Math.PI * (2 * Math.floor((n + 3) / 4) - 1));
  }
  return measured(amounts);
}

describe('class A on a phase-cut resistor of 1 kW at 90 deg', () => {
  it('fails at 15, 17, 19 and at every odd order from 21, because POHC is over as well', () => {
    const evaluation = judge(classA, phaseCut90());
    expect(evaluation.result).toBe('fail');
    expect(failing(evaluation)).toEqual([15, 17, 19, 21, 23, 25, 27, 29, 31, 33, 35, 37, 39]);
    expect(evaluation.reason).toBe('Over at 15, 17, 19 and 10 more');
    const [pohc] = evaluation.totals;
    expect(pohc).toMatchObject({ name: 'POHC', result: 'fail', unit: 'A' });
    expect(pohc?.value).toBeCloseTo(0.30857, 5);
    expect(pohc?.limit).toBeCloseTo(0.251375, 6);
  });

  it.each([
    [3, 60.2],
    [5, 40.5],
    [7, 59.9],
    [9, 69.2],
    [11, 83.9],
    [13, 94.1],
    [15, 131.8],
    [17, 116.2],
    [19, 129.8],
    [21, 117.4],
    [23, 128.6],
    [39, 126.3],
  ])('order %i uses %f percent of its limit', (order, share) => {
    // The shares are those of the closed form, printed to one decimal.
    const actual = orderOf(judge(classA, phaseCut90()), order).sharePercent ?? NaN;
    expect(Math.abs(actual - share)).toBeLessThan(0.06);
  });

  it('scaled by 0.80 fails only at 15 (105.4 %) and 19 (103.9 %): POHC of 0.24686 A saves the rest', () => {
    const evaluation = judge(classA, phaseCut90(0.8));
    expect(failing(evaluation)).toEqual([15, 19]);
    expect(orderOf(evaluation, 15).sharePercent).toBeCloseTo(105.4, 1);
    expect(orderOf(evaluation, 19).sharePercent).toBeCloseTo(103.9, 1);
    expect(evaluation.totals[0]?.value).toBeCloseTo(0.24686, 5);
    expect(evaluation.totals[0]?.result).toBe('pass');
    expect(orderOf(evaluation, 23).reason).toMatch(/POHC is within its limit/);
  });

  it('scaled by 0.75 passes', () => {
    expect(judge(classA, phaseCut90(0.75)).result).toBe('pass');
  });
});

// Rules of IEC 61000-3-2, clauses 6.2 and 6.3; numbers constructed from the limits of Table 1.
describe('procedure of IEC 61000-3-2', () => {
  it('passes a single I23 of 0.12 A, 122.7 % of its limit, by the POHC relief', () => {
    const evaluation = judge(classA, measured({ 1: 1, 23: 0.12 }));
    expect(evaluation.result).toBe('pass');
    expect(orderOf(evaluation, 23).sharePercent).toBeCloseTo(122.7, 1);
    expect(evaluation.reason).toMatch(/^Above the limit at 23 as the POHC relief allows/);
  });

  it('fails a single I23 of 0.15 A, 153 % of its limit', () => {
    const evaluation = judge(classA, measured({ 1: 1, 23: 0.15 }));
    expect(failing(evaluation)).toEqual([23]);
    expect(orderOf(evaluation, 23).reason).toMatch(/153 % of the limit, 150 % is allowed/);
  });

  it('gives the relief to odd orders from 21 only', () => {
    expect(failing(judge(classA, measured({ 1: 1, 19: 0.12 })))).toEqual([19]);
    expect(failing(judge(classA, measured({ 1: 1, 22: 0.09 })))).toEqual([22]);
  });

  it('refuses the relief when a smoothed value of another order is above 150 %', () => {
    const five = { mean: 0.9, smoothedMax: 1.6 * 1.14 };
    const evaluation = judge(classA, measured({ 1: 2, 5: five, 23: 0.12 }));
    expect(failing(evaluation)).toEqual([23]);
    expect(orderOf(evaluation, 5).result).toBe('not-decidable');
  });

  it('passes a mean exactly at the limit and smoothed values exactly at 150 %', () => {
    const evaluation = judge(classA, measured({ 1: 5, 3: { mean: 2.3, smoothedMax: 3.45 } }));
    expect(orderOf(evaluation, 3)).toMatchObject({ result: 'pass', margin: 0, sharePercent: 100 });
  });

  it('class A above 150 %: open up to 200 % with a mean below 90 %, fail otherwise', () => {
    const third = (mean: number, smoothedMax: number) =>
      orderOf(judge(classA, measured({ 1: 5, 3: { mean, smoothedMax } })), 3).result;
    expect(third(2, 3.6)).toBe('not-decidable');
    expect(third(2.2, 3.6)).toBe('fail');
    expect(third(2, 4.7)).toBe('fail');
  });

  it('class B fails above 150 % whatever the mean', () => {
    const evaluation = judge(classB, measured({ 1: 5, 3: { mean: 3, smoothedMax: 5.2 } }));
    expect(failing(evaluation)).toEqual([3]);
  });

  it('disregards currents below 5 mA and below 0.6 % of the input current', () => {
    // A limit below the floor, so that only the floor can save the order.
    const strict = { ...classA, orders: [{ order: 39, limit: 0.002 }] };
    expect(orderOf(judge(strict, measured({ 1: 0.4, 39: 0.0049 })), 39).result).toBe('disregarded');
    expect(orderOf(judge(strict, measured({ 1: 0.4, 39: 0.0051 })), 39).result).toBe('fail');
    const large = judge(classA, measured({ 1: 15, 40: 0.089, 38: 0.091 }));
    expect(orderOf(large, 40).result).toBe('disregarded');
    expect(orderOf(large, 38).result).toBe('fail');
  });

  it('judges even orders by their own limits', () => {
    expect(failing(judge(classA, measured({ 1: 3, 2: 1.09, 4: 0.43, 6: 0.31 })))).toEqual([2, 6]);
  });

  it('cannot decide single values without smoothed values, yet a mean over the limit fails', () => {
    const evaluation = judge(
      classA,
      measured({ 1: 5, 3: { mean: 2, smoothedMax: null }, 5: { mean: 1.2, smoothedMax: null } }),
    );
    expect(orderOf(evaluation, 3).result).toBe('not-decidable');
    expect(orderOf(evaluation, 3).reason).toMatch(/ten cycles with the mains profile/);
    expect(failing(evaluation)).toEqual([5]);
  });

  it('works in the unit of the channel: limits in A, channel in mA', () => {
    const evaluation = judge(classA, measured({ 1: 5000, 3: 2400 }, { unit: 'mA' }));
    expect(orderOf(evaluation, 3)).toMatchObject({ limit: 2300, result: 'fail' });
    expect(orderOf(evaluation, 39).result).toBe('disregarded');
  });
});

describe('class D', () => {
  // Cap: 3.85 P/n mA meets 2250/n mA at P = 584.4 W; at 600 W the fifth just reaches 1.14 A.
  it('multiplies mA/W by the power and holds it to the cap', () => {
    const at = (powerW: number, order: number) =>
      limitForOrder(classD, order, { fundamentalRms: 1, parameters: { powerW } });
    expect(at(100, 3)).toBeCloseTo(0.34, 9);
    expect(at(584, 15)).toBeCloseTo((3.85 * 0.584) / 15, 9);
    expect(at(600, 15)).toBeCloseTo(0.15, 9);
    expect(at(600, 5)).toBeCloseTo(1.14, 9);
    expect(at(600, 2)).toBeNull();
  });

  it('derives a POHC limit of 0.430130 mA/W', () => {
    const [pohc] = judge(classD, measured({ 1: 1 }), { powerW: 100 }).totals;
    expect(pohc?.limit).toBeCloseTo(0.043013, 6);
  });

  it('is not decidable without the power and says so', () => {
    const evaluation = judge(classD, measured({ 1: 1, 3: 5 }));
    expect(evaluation).toMatchObject({ result: 'not-decidable', reason: 'The set needs powerW' });
    expect(evaluation.orders.every(({ limit, result }) => limit === null && result === 'not-decidable')).toBe(
      true,
    );
  });
});
