import { AnalysisInputError } from '../errors.js';

/** One row of a calibration of a probe, transducer or amplifier. */
export interface CalibrationRow {
  /** 0 (for DC) or more. */
  frequencyHz: number;
  /** Output over input as a ratio, above 0. */
  gain: number;
  /** Output minus input. */
  phaseDeg: number;
  /** Expanded uncertainty of the gain in percent of it. */
  gainUncertaintyPercent?: number;
  /** Expanded uncertainty of the phase in degrees. */
  phaseUncertaintyDeg?: number;
}

/** Gain and phase at a frequency with standard uncertainties. */
export interface ChainResponse {
  gain: number;
  phaseDeg: number;
  /** Relative standard uncertainty of the gain as a ratio. */
  gainStandard: number;
  /** Standard uncertainty of the phase in degrees. */
  phaseStandardDeg: number;
}

export type CalibratedResponse = (frequencyHz: number) => ChainResponse | 'outside-table';

/**
 * Response between the rows of a calibration table: the gain in decibels linear over the logarithm of frequency, since
 * roll-offs of stages are straight lines there; the phase, unwrapped from row to row, linear over frequency, since a delay is
 * a straight line there. Neither can overshoot the rows, as a smooth curve through few rows can. Uncertainties are linear
 * over frequency. A row at 0 Hz serves DC alone. Beyond the first and last row there is no answer.
 *
 * Rows must lie so close that the phase turns by less than 180° from one to the next.
 *
 * @param coverageFactor k of the uncertainties in the rows
 * @throws AnalysisInputError that names the row at fault
 */
export function calibratedResponse(rows: readonly CalibrationRow[], coverageFactor = 2): CalibratedResponse {
  if (!(coverageFactor > 0)) {
    throw new AnalysisInputError(`The coverage factor is ${coverageFactor}; it must be greater than 0.`);
  }
  const sorted = checkedRows(rows);
  const atDc = sorted[0]!.frequencyHz === 0 ? sorted[0]! : null;
  const used = unwrapped(atDc ? sorted.slice(1) : sorted);
  return (frequencyHz) => {
    if (frequencyHz === 0) return atDc ? mixed(atDc, atDc, 0, 0, coverageFactor) : 'outside-table';
    const above = used.findIndex((row) => row.frequencyHz >= frequencyHz);
    const upper = used[above];
    if (upper === undefined) return 'outside-table';
    if (upper.frequencyHz === frequencyHz) return mixed(upper, upper, 0, 0, coverageFactor);
    const lower = used[above - 1];
    if (lower === undefined) return 'outside-table';
    const linear = (frequencyHz - lower.frequencyHz) / (upper.frequencyHz - lower.frequencyHz);
    const logarithmic =
      Math.log(frequencyHz / lower.frequencyHz) / Math.log(upper.frequencyHz / lower.frequencyHz);
    return mixed(lower, upper, linear, logarithmic, coverageFactor);
  };
}

function mixed(
  lower: CalibrationRow,
  upper: CalibrationRow,
  linear: number,
  logarithmic: number,
  coverageFactor: number,
): ChainResponse {
  const between = (a: number, b: number) => a + (b - a) * linear;
  const percent = between(lower.gainUncertaintyPercent ?? 0, upper.gainUncertaintyPercent ?? 0);
  const degrees = between(lower.phaseUncertaintyDeg ?? 0, upper.phaseUncertaintyDeg ?? 0);
  return {
    gain: lower.gain * (upper.gain / lower.gain) ** logarithmic,
    phaseDeg: between(lower.phaseDeg, upper.phaseDeg),
    gainStandard: percent / 100 / coverageFactor,
    phaseStandardDeg: degrees / coverageFactor,
  };
}

function checkedRows(rows: readonly CalibrationRow[]): CalibrationRow[] {
  if (rows.length === 0) throw new AnalysisInputError('The calibration table has no rows.');
  rows.forEach((row, i) => {
    const place = `Row ${i + 1} of the calibration table`;
    if (!(row.frequencyHz >= 0 && row.frequencyHz < Infinity)) {
      throw new AnalysisInputError(`${place}: the frequency is ${row.frequencyHz} Hz; it must be 0 or more.`);
    }
    if (!(row.gain > 0 && row.gain < Infinity)) {
      throw new AnalysisInputError(
        `${place}: the gain is ${row.gain}; it must be a ratio above 0 (decibels as 10^(dB/20), a reversed sign as 180°).`,
      );
    }
    if (!Number.isFinite(row.phaseDeg)) {
      throw new AnalysisInputError(`${place}: the phase is not a finite number of degrees.`);
    }
    for (const name of ['gainUncertaintyPercent', 'phaseUncertaintyDeg'] as const) {
      const value = row[name];
      if (value !== undefined && !(value >= 0 && value < Infinity)) {
        throw new AnalysisInputError(`${place}: ${name} is ${value}; it must be 0 or more, or left out.`);
      }
    }
  });
  const sorted = [...rows].sort((a, b) => a.frequencyHz - b.frequencyHz);
  const twice = sorted.find((row, i) => row.frequencyHz === sorted[i + 1]?.frequencyHz);
  if (twice) {
    throw new AnalysisInputError(
      `The calibration table has ${twice.frequencyHz} Hz twice; keep one of the rows.`,
    );
  }
  return sorted;
}

function unwrapped(rows: readonly CalibrationRow[]): CalibrationRow[] {
  let last: number | null = null;
  return rows.map((row) => {
    const turns: number = last === null ? 0 : Math.round((last - row.phaseDeg) / 360);
    last = row.phaseDeg + 360 * turns;
    return { ...row, phaseDeg: last };
  });
}
