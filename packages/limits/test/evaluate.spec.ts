import type { DecisionRule } from '@overtally/contracts';
import { describe, expect, it } from 'vitest';
import { classA, en50160, failing, judge, measured, orderOf, setOf } from './measured.js';

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
    expect(evaluation.reason).toMatch(/^Over at THD\. /);
  });

  // EN 50160, 4.2.5: 95 % of the 10 min mean values of each week; clause from memory.
  it('says with each decision that the standard takes a week', () => {
    const condition = /10 min values of one week; .* states no conformity$/;
    for (const id of ['en50160.lv', 'iec61000-2-2.lv']) {
      expect(judge(setOf(id), voltage({ 3: 1 })).reason).toMatch(condition);
      expect(judge(setOf(id), voltage({ 3: 40 })).reason).toMatch(condition);
    }
    expect(judge(classA, measured({ 1: 1 })).reason).not.toMatch(condition);
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
      reason: 'The set limits voltage; the channel holds current',
      orders: [],
    });
    expect(judge(classA, measured({ 1: 1 }, { quantity: 'dimensionless', unit: '' })).reason).toBe(
      'The set limits current; the channel holds a quantity without dimension',
    );
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
