import { describe, expect, it } from 'vitest';
import { makeStampReader } from './stamp-reader.js';
import { parseStamp } from './time-stamp.js';

// 2024-03-21T10:00:00Z is 1711015200 s after 1970 (GNU date -u +%s).
describe('time stamps', () => {
  it.each([
    ['2024-03-21T10:00:00Z', 0],
    ['2024-03-21 10:00:00.000250', 0.00025],
    ['2024/03/21 10:00:00,5', 0.5],
    ['21.03.2024 10:00:00.25', 0.25],
    ['03/21/2024 10:00:00.25 AM', 0.25],
    ['21/03/2024 10:00:00', 0],
  ])('reads %s', (text, fraction) => {
    expect(parseStamp(text)).toEqual({ wholeSeconds: 1711015200, fraction });
  });

  it('reads clocks, with am and pm', () => {
    expect(parseStamp('10:00:01.5')).toEqual({ wholeSeconds: 36001, fraction: 0.5 });
    expect(parseStamp('12:30:00 am')?.wholeSeconds).toBe(1800);
    expect(parseStamp('1:30:00 PM')?.wholeSeconds).toBe(48600);
  });

  it.each(['', '1.5', '2024-03-21', 'overload', '10-20'])('does not read "%s"', (text) => {
    expect(parseStamp(text)).toBeNull();
  });

  it('counts on past midnight', () => {
    const { read, firstText } = makeStampReader();
    expect([read('23:59:59.5'), read('00:00:00.5')]).toEqual([0.5, 1.5]);
    expect(firstText()).toBe('23:59:59.5');
  });
});
