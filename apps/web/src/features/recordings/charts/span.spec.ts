import { describe, expect, it } from 'vitest';
import { clampSpan, firstView, moved, resized, timeUnit } from './span.js';

describe('span of a record', () => {
  it('opens with four cycles in the middle', () => {
    expect(firstView(30, 50)).toEqual({ fromS: expect.closeTo(14.96, 9), toS: expect.closeTo(15.04, 9) });
    expect(firstView(0.05, 50)).toEqual({ fromS: 0, toS: 0.05 });
    expect(firstView(10, null)).toEqual({ fromS: 4.5, toS: 5.5 });
  });

  it('keeps its length when pushed against an end', () => {
    expect(clampSpan(moved({ fromS: 1, toS: 3 }, -5), 10, 0.1)).toEqual({ fromS: 0, toS: 2 });
    expect(clampSpan(moved({ fromS: 1, toS: 3 }, 50), 10, 0.1)).toEqual({ fromS: 8, toS: 10 });
  });

  it('is never shorter than asked nor longer than the record', () => {
    expect(clampSpan({ fromS: 4, toS: 4 }, 10, 0.5)).toEqual({ fromS: 4, toS: 4.5 });
    expect(clampSpan(resized({ fromS: 2, toS: 8 }, 4), 10, 0.5)).toEqual({ fromS: 0, toS: 10 });
  });

  it('is told in the unit that suits its length', () => {
    expect([30, 0.08, 5e-4].map((length) => timeUnit(length).unit)).toEqual(['s', 'ms', 'µs']);
  });
});
