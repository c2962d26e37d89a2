import { AnalysisInputError } from '../errors.js';
import { angleDegrees, complexAbs } from '../linear/complex.js';
import { responseOf } from '../transfer/frequency-response.js';
import { stability } from '../transfer/stability.js';
import type { TransferFunction } from '../transfer/transfer-function.js';
import {
  calibratedResponse,
  type CalibratedResponse,
  type CalibrationRow,
  type ChainResponse,
} from './calibration-table.js';

/** Expanded uncertainties of a stage at every frequency. */
export interface StageUncertainty {
  gainUncertaintyPercent?: number;
  phaseUncertaintyDeg?: number;
  /** k, default 2. */
  coverageFactor?: number;
}

/** A stage between the quantity and the recorded samples: probe, transducer, filter, amplifier. */
export type MeasuringStage =
  | ({ kind: 'gain'; /** Output over input; negative: reversed. */ gain: number } & StageUncertainty)
  | ({ kind: 'transfer'; transfer: TransferFunction } & StageUncertainty)
  | { kind: 'table'; rows: readonly CalibrationRow[]; /** k, default 2. */ coverageFactor?: number };

/**
 * Response of a measuring chain: gains multiplied, phases added, relative uncertainties of the gain and uncertainties of the
 * phase combined in quadrature, as of independent stages (JCGM 100:2008, 5.1.6).
 *
 * @returns a function of frequency in Hz; `outside-table` where a calibration table does not reach
 * @throws AnalysisInputError with the number of the stage in front, for a gain of 0, a table with a fault, an unstable stage
 */
export function measuringChainResponse(stages: readonly MeasuringStage[]): CalibratedResponse {
  const responses = stages.map((stage, i) => {
    try {
      return stageResponse(stage);
    } catch (error) {
      if (!(error instanceof AnalysisInputError)) throw error;
      throw new AnalysisInputError(`Stage ${i + 1} of the measuring chain: ${error.message}`);
    }
  });
  return (frequencyHz) => {
    const whole: ChainResponse = { gain: 1, phaseDeg: 0, gainStandard: 0, phaseStandardDeg: 0 };
    for (const response of responses) {
      const part = response(frequencyHz);
      if (part === 'outside-table') return part;
      whole.gain *= part.gain;
      whole.phaseDeg += part.phaseDeg;
      whole.gainStandard = Math.hypot(whole.gainStandard, part.gainStandard);
      whole.phaseStandardDeg = Math.hypot(whole.phaseStandardDeg, part.phaseStandardDeg);
    }
    return whole;
  };
}

function stageResponse(stage: MeasuringStage): CalibratedResponse {
  if (stage.kind === 'table') return calibratedResponse(stage.rows, stage.coverageFactor);
  const { gainUncertaintyPercent = 0, phaseUncertaintyDeg = 0, coverageFactor = 2 } = stage;
  if (!(gainUncertaintyPercent >= 0 && phaseUncertaintyDeg >= 0 && coverageFactor > 0)) {
    throw new AnalysisInputError('Uncertainties must be 0 or more, and the coverage factor greater than 0.');
  }
  const uncertainty = {
    gainStandard: gainUncertaintyPercent / 100 / coverageFactor,
    phaseStandardDeg: phaseUncertaintyDeg / coverageFactor,
  };
  if (stage.kind === 'gain') {
    const { gain } = stage;
    if (!Number.isFinite(gain) || gain === 0) {
      throw new AnalysisInputError(`the gain is ${gain}; it must be a finite number other than 0.`);
    }
    return () => ({ gain: Math.abs(gain), phaseDeg: gain < 0 ? 180 : 0, ...uncertainty });
  }
  const { verdict, reason } = stability(stage.transfer);
  if (verdict !== 'stable') {
    throw new AnalysisInputError(
      `it is ${verdict}, so that no record of it can be in steady state. ${reason}`,
    );
  }
  const response = responseOf(stage.transfer);
  return (frequencyHz) => {
    const value = response(frequencyHz)!;
    return { gain: complexAbs(value), phaseDeg: angleDegrees(value), ...uncertainty };
  };
}
