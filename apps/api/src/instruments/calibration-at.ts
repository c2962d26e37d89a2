import type { CalibrationState } from '@overtally/contracts';

/** The days of a calibration, YYYY-MM-DD. */
export interface CalibrationDays {
  calibratedOn: string;
  dueOn: string;
  createdAt: Date;
}

/** The day of a moment in UTC, YYYY-MM-DD. */
export function dayOf(moment: Date): string {
  return moment.toISOString().slice(0, 10);
}

/** The day so many days later, YYYY-MM-DD. */
export function daysLater(day: string, days: number): string {
  return dayOf(new Date(Date.parse(day) + days * 24 * 3600 * 1000));
}

/**
 * The calibration that counts on a day: the newest one done by then; of several on one day the one entered last.
 * @param calibrations of one instrument, in any order
 */
export function calibrationAt<C extends CalibrationDays>(calibrations: readonly C[], day: string): C | null {
  let found: C | null = null;
  for (const each of calibrations) {
    if (each.calibratedOn <= day && (found === null || isNewer(each, found))) found = each;
  }
  return found;
}

/** How the calibration that counts stands on a day. The day on which the next one is due belongs to its validity. */
export function stateAt(calibration: CalibrationDays | null, day: string): CalibrationState {
  if (calibration === null) return 'none';
  return day <= calibration.dueOn ? 'valid' : 'overdue';
}

const severity: readonly CalibrationState[] = ['valid', 'overdue', 'none'];

/** The worst of several states; a chain without instruments was never calibrated. */
export function worstState(states: readonly CalibrationState[]): CalibrationState {
  if (states.length === 0) return 'none';
  return severity[Math.max(...states.map((state) => severity.indexOf(state)))]!;
}

function isNewer(one: CalibrationDays, other: CalibrationDays): boolean {
  if (one.calibratedOn !== other.calibratedOn) return one.calibratedOn > other.calibratedOn;
  return one.createdAt.getTime() >= other.createdAt.getTime();
}
