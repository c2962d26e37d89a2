import { describe, expect, it } from 'vitest';
import { daysUntil, standingOf } from './calibration-words.js';

const now = new Date('2026-03-10T23:30:00Z');
const standing = (dueOn: string) => standingOf({ calibration: { dueOn }, calibrationState: 'valid' }, now);

describe('how a calibration stands', () => {
  it('counts whole days in UTC, over the change to summer time', () => {
    expect(daysUntil('2026-03-10', now)).toBe(0);
    expect(daysUntil('2026-04-09', now)).toBe(30);
    expect(daysUntil('2026-03-09', now)).toBe(-1);
  });

  it('is due soon from thirty days before', () => {
    expect(standing('2026-04-10')).toBe('valid');
    expect(standing('2026-04-09')).toBe('due-soon');
    expect(standing('2026-03-10')).toBe('due-soon');
    expect(standingOf({ calibration: null, calibrationState: 'none' }, now)).toBe('none');
  });
});
