import { describe, expect, it } from 'vitest';
import { combineRepeats } from '../src/repeats.js';
import { classA, classD, judge, measured, setOf } from './measured.js';

const repeats = (...thirds: number[]) =>
  combineRepeats(thirds.map((value) => judge(classA, measured({ 1: 5, 3: value }))));
const third = (combined: ReturnType<typeof combineRepeats>) => {
  const isThird = ({ order }: { order: number }) => order === 3;
  const spread = combined.repeatability.orders.find(isThird);
  return { ...combined.orders.find(isThird), ...spread };
};

// IEC 61000-3-2: the means of repeats agree within 5 % of the limit (2.30 A at order 3, so 0.115 A). From memory.
describe('verdict over repeats', () => {
  it('gives the mean and the standard deviation in percent of the limit', () => {
    // 2.0, 2.1, 2.2: mean 2.1, sample standard deviation 0.1, that is 4.3478 % of 2.30 A.
    const order = third(repeats(2, 2.1, 2.2));
    expect(order).toMatchObject({ count: 3, limit: 2.3, result: 'pass' });
    expect(order.mean).toBeCloseTo(2.1, 12);
    expect(order.repeatabilityPercent).toBeCloseTo(4.34783, 5);
    expect(order.deviationPercent).toBeCloseTo(4.34783, 5);
  });

  it('takes the worst result and says in which repeat', () => {
    const combined = repeats(2.2, 2.4, 2.25);
    expect(combined.result).toBe('fail');
    expect(third(combined).result).toBe('fail');
    expect(combined.reason).toMatch(/^Worst of 3 repeats\. Repeat 2: Over at 3/);
  });

  it('keeps the strictest margin, the largest smoothed value and the reason of the repeat that decides', () => {
    const steady = judge(classA, measured({ 1: 5, 3: 2.2 }));
    const lively = judge(classA, measured({ 1: 5, 3: { mean: 2.25, smoothedMax: 4.7 } }));
    const row = third(combineRepeats([steady, lively]));
    // 4.7 A is 204 % of 2.30 A: above 200 %, so it fails whatever the time.
    expect(row).toMatchObject({ smoothedMax: 4.7, limit: 2.3, result: 'fail' });
    expect(row.mean).toBeCloseTo(2.225, 12);
    expect(row.margin).toBeCloseTo(0.075, 12);
    expect(row.reason).toMatch(/^Repeat 2: .*204 % of the limit/);
  });

  it('takes each total from the repeat that it is worst in', () => {
    const set = setOf('en50160.lv');
    const volts = { quantity: 'voltage', unit: 'V' } as const;
    // 18.4 V of 230 V is 8 %, exactly at the limit; 20.7 V is 9 %.
    const [low, high] = [18.4, 20.7].map((third) => judge(set, measured({ 1: 230, 3: third }, volts)));
    const { totals } = combineRepeats([low!, high!]);
    expect(totals).toMatchObject([{ name: 'THD', result: 'fail', reason: 'Repeat 2: THD above the limit' }]);
    expect(totals[0]?.value).toBeCloseTo(9, 9);
  });

  it('tells whether the means repeat within 5 % of the limit', () => {
    expect(repeats(2, 2.2).repeatability.isRepeatable).toBe(true);
    // 0.25 A apart: each 0.125 A or 5.4 % from the mean.
    expect(repeats(2, 2.25).repeatability.isRepeatable).toBe(false);
    expect(repeats(2, 2.25).reason).toMatch(/repeat worse than 5 %/);
    expect(repeats(2).repeatability.isRepeatable).toBeNull();
    expect(third(repeats(2)).repeatabilityPercent).toBeNull();
  });

  it('is not applicable only when no repeat is, and not decidable when some are not', () => {
    const small = judge(classD, measured({ 1: 1 }), { powerW: 60 });
    const large = judge(classD, measured({ 1: 1 }), { powerW: 80 });
    expect(combineRepeats([small, small]).result).toBe('not-applicable');
    expect(combineRepeats([small, large]).result).toBe('not-decidable');
    expect(() => combineRepeats([])).toThrow(RangeError);
  });

  it('takes the strictest of limits that follow the fundamental', () => {
    const set = setOf('iec61000-3-2.classC.gt25W.ed5');
    const combined = combineRepeats([0.2, 0.25].map((i1) => judge(set, measured({ 1: i1, 3: 0.05 }))));
    expect(third(combined).limit).toBeCloseTo(0.054, 9);
  });
});
