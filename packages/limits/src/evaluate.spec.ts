import type { DecisionRule, LimitSet, VerdictParameters } from '@overtally/contracts';
import { describe, expect, it } from 'vitest';
import { evaluate } from './evaluate.js';
import { limitForOrder } from './limit-for-order.js';
import type { Measurement } from './measurement.js';
import { findPublishedLimitSet } from './sets/index.js';

function setOf(id: string): LimitSet {
  const set = findPublishedLimitSet(id);
  if (set === undefined) throw new Error(`No set ${id}`);
  return set;
}
const classA = setOf('iec61000-3-2.classA');
const classB = setOf('iec61000-3-2.classB');
const classD = setOf('iec61000-3-2.classD');
const en50160 = setOf('en50160.lv');

type Amount = number | { mean: number; smoothedMax: number | null };

/** A channel with the given orders, all others zero, steady unless a largest smoothed value is given. */
function measured(amounts: Record<number, Amount>, rest: Partial<Measurement> = {}): Measurement {
  const harmonics = Array.from({ length: 50 }, (_, i) => {
    const amount = amounts[i + 1] ?? 0;
    return typeof amount === 'number'
      ? { order: i + 1, mean: amount, smoothedMax: amount }
      : { order: i + 1, ...amount };
  });
  const fundamentalRms = harmonics[0]?.mean ?? null;
  const rms = Math.hypot(...harmonics.map(({ mean }) => mean));
  return {
    quantity: 'current',
    unit: 'A',
    rms,
    fundamentalRms,
    harmonics,
    highestMeasurableOrder: 99,
    ...rest,
  };
}

const judge = (
  set: LimitSet,
  measurement: Measurement,
  parameters: VerdictParameters = {},
  decisionRule: DecisionRule = 'simple-acceptance',
) => evaluate(set, measurement, { parameters, decisionRule });
const orderOf = (evaluation: ReturnType<typeof evaluate>, order: number) => {
  const row = evaluation.orders.find((candidate) => candidate.order === order);
  if (row === undefined) throw new Error(`No order ${order}`);
  return row;
};
const failing = (evaluation: ReturnType<typeof evaluate>) =>
  evaluation.orders.filter(({ result }) => result === 'fail').map(({ order }) => order);

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
    expect(orderOf(judge(classD, measured({ 1: 0.4, 39: 0.0049 }), { powerW: 10 }), 39).result).toBe(
      'disregarded',
    );
    expect(orderOf(judge(classD, measured({ 1: 0.4, 39: 0.0051 }), { powerW: 10 }), 39).result).toBe('fail');
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

describe('voltage sets', () => {
  const voltage = (percent: Record<number, number>, fundamental = 230) =>
    measured(
      {
        1: fundamental,
        ...Object.fromEntries(Object.entries(percent).map(([n, p]) => [n, (p / 100) * fundamental])),
      },
      { quantity: 'voltage', unit: 'V' },
    );

  it('converts percent of the fundamental to the unit of the channel: 5 % of 230 V is 11.5 V', () => {
    const evaluation = judge(en50160, voltage({ 3: 5, 5: 6.1 }));
    expect(orderOf(evaluation, 3).limit).toBeCloseTo(11.5, 9);
    expect(orderOf(evaluation, 3).result).toBe('pass');
    expect(failing(evaluation)).toEqual([5]);
  });

  it('judges THD: 5, 4, 4 and 3 % together make 8.12 %, above 8 %, though every order is within', () => {
    const evaluation = judge(en50160, voltage({ 3: 5, 5: 4, 7: 4, 13: 3 }));
    expect(failing(evaluation)).toEqual([]);
    expect(evaluation.totals[0]).toMatchObject({ name: 'THD', unit: '%', limit: 8, result: 'fail' });
    expect(evaluation.totals[0]?.value).toBeCloseTo(Math.sqrt(66), 9);
    expect(evaluation.reason).toBe('Over at THD');
  });

  it('leaves single smoothed values out of account', () => {
    const channel = measured(
      { 1: 230, 5: { mean: 10, smoothedMax: 40 } },
      { quantity: 'voltage', unit: 'V' },
    );
    expect(judge(en50160, channel).result).toBe('pass');
  });
});

describe('what cannot be judged', () => {
  it('orders beyond half the sample rate are not decidable and keep the whole from passing', () => {
    const evaluation = judge(classA, measured({ 1: 1 }, { highestMeasurableOrder: 36 }));
    expect(evaluation.result).toBe('not-decidable');
    expect(evaluation.reason).toMatch(/^Not decidable at 37, 38, 39 and 1 more: Beyond the highest order/);
    expect(orderOf(evaluation, 37)).toMatchObject({ mean: null, margin: null, sharePercent: null });
  });

  it('a fail stays a fail when other orders cannot be decided', () => {
    expect(judge(classA, measured({ 1: 5, 3: 2.4 }, { highestMeasurableOrder: 20 })).result).toBe('fail');
  });

  it('THD is not decidable on a lower bound below the limit, and fails on one above', () => {
    const half = { quantity: 'voltage', unit: 'V', highestMeasurableOrder: 30 } as const;
    expect(judge(en50160, measured({ 1: 230 }, half)).totals[0]).toMatchObject({
      value: null,
      result: 'not-decidable',
    });
    expect(judge(en50160, measured({ 1: 230, 3: 20 }, half)).totals[0]?.result).toBe('fail');
  });

  it('orders that were not analysed say what to do', () => {
    const channel = measured({ 1: 1 });
    channel.harmonics = channel.harmonics.slice(0, 25);
    expect(orderOf(judge(classA, channel), 26).reason).toMatch(/raise the highest order/);
  });

  it('a channel of another quantity or unit is not applicable', () => {
    expect(judge(en50160, measured({ 1: 1 }))).toMatchObject({
      result: 'not-applicable',
      reason: 'The limits are for a voltage; the channel is a current',
      orders: [],
    });
    expect(judge(classA, measured({ 1: 1 }, { unit: '' })).reason).toMatch(/has no unit: set the unit/);
  });

  it('a channel without a fundamental is not decidable', () => {
    const evaluation = judge(classA, measured({}, { fundamentalRms: null, harmonics: [] }));
    expect(evaluation).toMatchObject({
      result: 'not-decidable',
      reason: 'No fundamental was found in the channel',
    });
  });
});

// ILAC-G8:09/2019, 4.2, with U = 5 % of the value on the third of class A (2.30 A).
describe('decision rules', () => {
  const third = (value: number, rule: DecisionRule) =>
    judge(classA, measured({ 1: 5, 3: value }), { expandedUncertaintyPercent: 5 }, rule);

  it('guarded acceptance fails a value inside the guard band', () => {
    expect(third(2.18, 'guarded-acceptance').result).toBe('pass');
    const inside = third(2.2, 'guarded-acceptance');
    expect(inside.result).toBe('fail');
    expect(orderOf(inside, 3).reason).toBe('Mean inside the guard band below the limit');
    expect(orderOf(inside, 3).uncertainty).toBeCloseTo(0.11, 9);
  });

  it('the non-binary statement has four results', () => {
    expect(third(2.18, 'non-binary').result).toBe('pass');
    expect(third(2.2, 'non-binary').result).toBe('conditional-pass');
    expect(third(2.35, 'non-binary').result).toBe('conditional-fail');
    expect(third(2.5, 'non-binary').result).toBe('fail');
    expect(third(2.35, 'non-binary').reason).toBe('Over by less than the uncertainty at 3');
  });

  it.each(['guarded-acceptance', 'non-binary'] as const)('%s names the missing uncertainty', (rule) => {
    expect(judge(classA, measured({ 1: 5, 3: 1 }), {}, rule)).toMatchObject({
      result: 'not-decidable',
      reason: 'The decision rule needs expandedUncertaintyPercent',
    });
  });
});
