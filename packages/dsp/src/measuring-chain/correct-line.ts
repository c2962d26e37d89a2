import { AnalysisInputError } from '../errors.js';
import { wrapDegrees } from '../model/fit-sinusoids.js';
import type { CalibratedResponse } from './calibration-table.js';

/** A line of a spectrum or an order, as recorded. */
export interface RecordedLine {
  /** 0 for DC, whose value then keeps its sign. */
  frequencyHz: number;
  rms: number;
  /** null where it is not known. */
  phaseDeg: number | null;
}

/** A line as it stood in front of the measuring chain, or why it cannot be told. */
export type CorrectedLine = {
  frequencyHz: number;
  /** Of the chain; null outside a table. */
  gain: number | null;
} & (
  | {
      flag: null;
      rms: number;
      phaseDeg: number | null;
      /** Expanded uncertainties that the correction brings, with the coverage factor asked for. */
      uncertainty: { rmsPercent: number; phaseDeg: number; coverageFactor: number };
    }
  | { flag: 'outside-table' | 'below-floor'; reason: string }
);

export interface CorrectionOptions {
  /** Least gain by which a line is divided, as a ratio: below it, noise would be lifted more than signal. */
  floor: number;
  /** k of the uncertainties in the result, default 2. */
  coverageFactor?: number;
}

/**
 * Lines divided by the response of the measuring chain. A line at which the gain lies below the floor, or which a
 * calibration table does not reach, is flagged and not divided.
 *
 * @throws AnalysisInputError for a floor or coverage factor that is not greater than 0
 */
export function correctLines(
  lines: readonly RecordedLine[],
  chain: CalibratedResponse,
  { floor, coverageFactor = 2 }: CorrectionOptions,
): CorrectedLine[] {
  if (!(floor > 0 && floor < Infinity)) {
    throw new AnalysisInputError(`The floor is ${floor}; it must be a gain greater than 0.`);
  }
  if (!(coverageFactor > 0)) {
    throw new AnalysisInputError(`The coverage factor is ${coverageFactor}; it must be greater than 0.`);
  }
  return lines.map(({ frequencyHz, rms, phaseDeg }) => {
    const response = chain(frequencyHz);
    const at = `${Number(frequencyHz.toPrecision(6))} Hz`;
    if (response === 'outside-table') {
      return {
        ...{ frequencyHz, gain: null, flag: response },
        reason: `The calibration table does not reach ${at}; add a row, or leave the line out.`,
      };
    }
    const { gain } = response;
    if (gain < floor) {
      return {
        ...{ frequencyHz, gain, flag: 'below-floor' },
        reason: `At ${at} the chain passes ${Number(gain.toPrecision(4))} of the signal, less than the floor of ${floor}; the line is not corrected.`,
      };
    }
    // DC has a sign and no phase: a reversed chain turns it.
    const isReversed = frequencyHz === 0 && Math.abs(wrapDegrees(response.phaseDeg)) > 90;
    return {
      ...{ frequencyHz, gain, flag: null },
      rms: (isReversed ? -rms : rms) / gain,
      phaseDeg: phaseDeg === null || frequencyHz === 0 ? null : wrapDegrees(phaseDeg - response.phaseDeg),
      uncertainty: {
        rmsPercent: 100 * coverageFactor * response.gainStandard,
        phaseDeg: coverageFactor * response.phaseStandardDeg,
        coverageFactor,
      },
    };
  });
}
