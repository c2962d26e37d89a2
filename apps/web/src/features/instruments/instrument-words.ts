import type { Instrument, InstrumentKind, InstrumentRef } from '@overtally/contracts';
import { formatDay } from '../../lib/calibration-words.js';

export const kindWords: Record<InstrumentKind, string> = {
  recorder: 'Recorder',
  'voltage-transducer': 'Voltage transducer',
  'current-transducer': 'Current transducer',
  'signal-conditioner': 'Signal conditioner',
  'power-source': 'Power source',
  other: 'Other',
};

/** Manufacturer, model and serial number in one line. */
export function identityWords({
  manufacturer,
  model,
  serialNumber,
}: Omit<InstrumentRef, 'calibration'>): string {
  return [[manufacturer, model].filter(Boolean).join(' '), `serial no. ${serialNumber}`]
    .filter(Boolean)
    .join(', ');
}

/** Until when an instrument is calibrated, or since when not any more. */
export function dueWords({
  calibration,
  calibrationState,
}: Pick<Instrument, 'calibration' | 'calibrationState'>): string {
  if (calibration === null) return 'No calibration entered';
  const day = formatDay(calibration.dueOn);
  return calibrationState === 'overdue' ? `was due on ${day}` : `due on ${day}`;
}
