import { describe, expect, it } from 'vitest';
import { calibrationAt, dayOf, daysLater, stateAt, worstState } from './calibration-at.js';

const calibration = (calibratedOn: string, dueOn: string, enteredOn = calibratedOn) => ({
  calibratedOn,
  dueOn,
  createdAt: new Date(enteredOn),
});

const first = calibration('2025-03-10', '2026-03-10');
const second = calibration('2026-04-02', '2027-04-02');

/**
 * ISO/IEC 17025:2017, 6.4.8, has equipment labelled with the date or criteria when recalibration is due; by common
 * practice of laboratories it may be used on that day and not on the day after.
 */
describe('the calibration of an instrument on a day', () => {
  it.each([
    ['the day before it was done', '2025-03-09', null, 'none'],
    ['the day it was done', '2025-03-10', first, 'valid'],
    ['the day it is due', '2026-03-10', first, 'valid'],
    ['the day after it was due', '2026-03-11', first, 'overdue'],
    ['the day of the next one', '2026-04-02', second, 'valid'],
  ])('%s', (_, day, counting, state) => {
    const found = calibrationAt([second, first], day);
    expect(found).toBe(counting);
    expect(stateAt(found, day)).toBe(state);
  });

  it('is the one entered last where two were done on one day', () => {
    const mended = calibration('2025-03-10', '2025-09-10', '2025-03-20');
    expect(calibrationAt([mended, first], '2025-06-01')).toBe(mended);
    expect(calibrationAt([first, mended], '2025-06-01')).toBe(mended);
  });

  it('counts days in UTC, over ends of months and leap days', () => {
    expect(dayOf(new Date('2026-03-10T23:59:59.999Z'))).toBe('2026-03-10');
    // 2028 is a leap year (Gregorian calendar).
    expect(daysLater('2028-02-28', 2)).toBe('2028-03-01');
  });
});

describe('the calibration of a chain', () => {
  it('is the worst of its instruments', () => {
    expect(worstState(['valid', 'valid'])).toBe('valid');
    expect(worstState(['valid', 'overdue'])).toBe('overdue');
    expect(worstState(['overdue', 'none', 'valid'])).toBe('none');
  });
});
