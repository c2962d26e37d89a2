import { calibrationNoticeDays, type Calibration, type CalibrationState } from '@overtally/contracts';
import { formatDate } from './format-date.js';

/** How a calibration stands, with what is about to end told apart from what is good for long. */
export type CalibrationStanding = CalibrationState | 'due-soon';

const dayMs = 24 * 3600 * 1000;

/** Days from the day of `now` (UTC) to a day; negative once it has passed. */
export function daysUntil(day: string, now: Date): number {
  const today = Date.parse(now.toISOString().slice(0, 10));
  return Math.round((Date.parse(day) - today) / dayMs);
}

/** The state as of today, `due-soon` from so many days before the day it is due as people are told of it. */
export function standingOf(
  {
    calibration,
    calibrationState,
  }: { calibration: Pick<Calibration, 'dueOn'> | null; calibrationState: CalibrationState },
  now: Date,
): CalibrationStanding {
  if (calibrationState !== 'valid' || calibration === null) return calibrationState;
  return daysUntil(calibration.dueOn, now) <= calibrationNoticeDays ? 'due-soon' : 'valid';
}

export const standingWords: Record<CalibrationStanding, string> = {
  valid: 'In calibration',
  'due-soon': 'Due soon',
  overdue: 'Calibration overdue',
  none: 'Not calibrated',
};

/** A day of the calendar in the reader's form, whatever their zone. */
export const formatDay = (day: string): string => formatDate(`${day}T12:00:00Z`, { timeZone: 'UTC' });
