import type { Instrument } from '@overtally/contracts';
import { standingOf, type CalibrationStanding } from '../../lib/calibration-words.js';

export const instrumentFilterStates: readonly CalibrationStanding[] = [
  'overdue',
  'none',
  'due-soon',
  'valid',
];

/** What the list of instruments shows. */
export interface InstrumentFilter {
  q: string;
  state: CalibrationStanding | '';
  retired: boolean;
}

/** Instruments that the filter lets through, those that need somebody first. */
export function filtered(
  instruments: readonly Instrument[],
  { q, state, retired }: InstrumentFilter,
  now: Date,
): Instrument[] {
  const words = q.trim().toLowerCase();
  const urgency = (instrument: Instrument) =>
    instrument.retiredAt
      ? instrumentFilterStates.length
      : instrumentFilterStates.indexOf(standingOf(instrument, now));
  return instruments
    .filter((each) => retired || each.retiredAt === null)
    .filter((each) => state === '' || standingOf(each, now) === state)
    .filter(({ name, manufacturer, model, serialNumber }) =>
      [name, manufacturer, model, serialNumber].some((text) => text.toLowerCase().includes(words)),
    )
    .toSorted((one, other) => urgency(one) - urgency(other) || one.name.localeCompare(other.name));
}
