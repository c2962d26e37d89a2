import { AnalysisInputError } from '../errors.js';
import { transferFunction, type TransferFunction } from '../transfer/transfer-function.js';

/** Settings of a controller in the standard (ISA) form. */
export interface ControllerSettings {
  /** Kp. */
  gain: number;
  /** Ti; none: no integral action. */
  integralTimeS?: number | undefined;
  /** Td; none: no derivative action. */
  derivativeTimeS?: number | undefined;
  /** N: the derivative is limited by a low-pass of Td/N; none: ideal, and improper by one degree. */
  derivativeFilter?: number | undefined;
}

/**
 * P, PI, PD or PID controller Kp (1 + 1/(Ti s) + Td s/(1 + Td s/N)) (K. J. Åström and T. Hägglund, Advanced PID Control).
 *
 * @throws AnalysisInputError for a time or filter factor that is not positive
 */
export function pidController(settings: ControllerSettings): TransferFunction {
  const { gain, integralTimeS, derivativeTimeS, derivativeFilter } = settings;
  for (const name of ['integralTimeS', 'derivativeTimeS', 'derivativeFilter'] as const) {
    const value = settings[name];
    if (value !== undefined && !(value > 0 && value < Infinity)) {
      throw new AnalysisInputError(
        `${name} of the controller is ${value}; it must be greater than 0, or left out.`,
      );
    }
  }
  const td = derivativeTimeS ?? 0;
  const lag = derivativeFilter === undefined ? 0 : td / derivativeFilter;
  if (integralTimeS === undefined) return transferFunction([gain * (td + lag), gain], [lag, 1]);
  // Kp [Ti s (1 + lag s) + (1 + lag s) + Ti Td s²] / [Ti s (1 + lag s)]
  return transferFunction(
    [gain * integralTimeS * (lag + td), gain * (integralTimeS + lag), gain],
    [integralTimeS * lag, integralTimeS, 0],
  );
}
