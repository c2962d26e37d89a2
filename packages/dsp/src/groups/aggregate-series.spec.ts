import { describe, expect, it } from 'vitest';
import { aggregateSeries, WINDOWS_PER_10_MIN, WINDOWS_PER_3_S } from './aggregate-series.js';

describe('aggregation of IEC 61000-4-30', () => {
  // 4.5.1: square root of the arithmetic mean of the squared inputs; √((9 + 16)/2) = 3.5355…
  it('takes the root of the mean square and drops an incomplete interval', () => {
    const { values, flagged } = aggregateSeries([3, 4, 1, 7, 5], [0, 0, 0, 0, 1], 2);
    expect(Array.from(values)).toEqual([Math.sqrt(12.5), 5]);
    expect(Array.from(flagged)).toEqual([0, 0]);
  });

  it('flags an interval that holds a flagged window', () => {
    expect(Array.from(aggregateSeries([1, 1, 1, 1], [0, 1, 0, 0], 2).flagged)).toEqual([1, 0]);
  });

  // 4.5.2: 150 cycles at 50 Hz are 15 windows of 10 cycles; 10 min at 50 Hz are 3000 of them.
  it('knows the intervals of the standard', () => {
    expect(WINDOWS_PER_3_S * 10).toBe(150);
    expect((WINDOWS_PER_10_MIN * 10) / 50).toBe(600);
  });

  it('keeps what does not apply', () => {
    expect(aggregateSeries([1, NaN, 2, 2], [0, 0, 0, 0], 2).values[0]).toBeNaN();
  });

  it.each([0, 1.5, -1])('refuses the factor %d', (factor) => {
    expect(() => aggregateSeries([1, 2], [0, 0], factor)).toThrow(RangeError);
  });
});
