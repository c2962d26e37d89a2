import { describe, expect, it } from 'vitest';
import { smallestMeeting } from './smallest-meeting.js';

describe('smallestMeeting', () => {
  it('finds where a margin turns positive', () => {
    const result = smallestMeeting((x) => x * x - 2, { from: 0, to: 3 });
    if (!result.isFound) throw new Error('not found');
    expect(result.value).toBeCloseTo(Math.SQRT2, 8);
    expect(result.value).toBeGreaterThanOrEqual(Math.SQRT2);
    expect(result.failsAt!).toBeLessThan(Math.SQRT2);
    expect(result.gridStep).toBeCloseTo(3 / 200, 12);
  });

  it('finds the first of several stretches, where a bisection of the ends would not', () => {
    // sin x ≥ 0.5 from π/6 on; at both ends of the range it is below.
    const result = smallestMeeting((x) => Math.sin(x) - 0.5, { from: 0, to: 10 });
    expect(result).toMatchObject({ isFound: true, value: expect.closeTo(Math.PI / 6, 8) });
  });

  it('works over decades and with a plain condition', () => {
    const result = smallestMeeting((x) => (x >= 3e-6 ? 1 : -1), { from: 1e-9, to: 1, scale: 'logarithmic' });
    if (!result.isFound) throw new Error('not found');
    expect(result.value / 3e-6).toBeCloseTo(1, 8);
  });

  it('says when the condition holds from the start, or nowhere', () => {
    expect(smallestMeeting((x) => x, { from: 1, to: 2 })).toMatchObject({
      value: 1,
      failsAt: null,
      evaluations: 1,
    });
    expect(smallestMeeting((x) => -((x - 1.5) ** 2) - 1, { from: 1, to: 2 })).toEqual({
      ...{ isFound: false, best: { value: 1.5, margin: -1 }, evaluations: 201 },
      gridStep: expect.closeTo(0.005, 12),
    });
    expect(smallestMeeting(() => NaN, { from: 1, to: 2 })).toMatchObject({ isFound: false, best: null });
  });

  it('refuses ranges that are none', () => {
    expect(() => smallestMeeting((x) => x, { from: 2, to: 2 })).toThrow(/empty/);
    expect(() => smallestMeeting((x) => x, { from: 0, to: 2, scale: 'logarithmic' })).toThrow(/above 0/);
    expect(() => smallestMeeting((x) => x, { from: 0, to: 2, intervals: 0 })).toThrow(/0 intervals/);
  });
});
