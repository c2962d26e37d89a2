import type { Calibration, Instrument, InstrumentRef } from '@overtally/contracts';
import { calibrationAt, stateAt } from './calibration-at.js';
import type { CalibrationRow, InstrumentRecord, InstrumentRow } from './instruments.repository.js';

/** A calibration as the contract words it. */
export function toCalibration(row: CalibrationRow): Calibration {
  const { id, instrumentId, calibratedOn, dueOn, certificateNumber, calibratedBy, uncertainty, remark } = row;
  const { certificateName: name, certificateSize: size, certificateSha256: sha256 } = row;
  return {
    ...{ id, instrumentId, calibratedOn, dueOn, certificateNumber, calibratedBy, uncertainty, remark },
    certificate: name === null || size === null || sha256 === null ? null : { name, size, sha256 },
    createdAt: row.createdAt.toISOString(),
  };
}

/** An instrument with the calibration that counts on a day. */
export function toInstrumentRef(
  { id, kind, name, manufacturer, model, serialNumber }: InstrumentRow,
  calibrations: readonly CalibrationRow[],
  day: string,
): InstrumentRef {
  const counting = calibrationAt(calibrations, day);
  return {
    ...{ id, kind, name, manufacturer, model, serialNumber },
    calibration: counting && toCalibration(counting),
    calibrationState: stateAt(counting, day),
  };
}

/** An instrument as the contract words it, as it stands on a day. */
export function toInstrument(
  record: InstrumentRecord,
  calibrations: readonly CalibrationRow[],
  day: string,
): Instrument {
  const { remark, responsibleId, responsibleName } = record;
  return {
    ...toInstrumentRef(record, calibrations, day),
    remark,
    responsible:
      responsibleId === null || responsibleName === null
        ? null
        : { id: responsibleId, name: responsibleName },
    retiredAt: record.retiredAt?.toISOString() ?? null,
    createdAt: record.createdAt.toISOString(),
  };
}
