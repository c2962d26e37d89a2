import { AnalysisInputError } from '../errors.js';
import type { Complex } from '../linear/complex.js';
import { rootsAtOrigin, trimLeadingZeros } from './polynomial.js';
import { polynomialRoots, type Root } from './polynomial-roots.js';

/**
 * H(s) = numerator/denominator · e^(−s delayS) of a linear, time-invariant stage; real coefficients in descending powers of
 * s (1/s).
 */
export interface TransferFunction {
  numerator: readonly number[];
  denominator: readonly number[];
  /** Pure delay in seconds, default 0. It has no poles and changes the phase alone. */
  delayS?: number;
  /**
   * Of a closed loop with a delay, for which the coefficients stand by a Padé approximant: what holds exactly. Not plain data:
   * between threads, send the description of the stage.
   */
  exact?: { response: Response; stability: { verdict: StabilityVerdict; reason: string } };
}

/** H(j2πf); null at a pole on the imaginary axis. */
export type Response = (frequencyHz: number) => Complex | null;

export type StabilityVerdict = 'stable' | 'marginal' | 'unstable';

const MAX_DEGREE = 50;

/**
 * A checked transfer function without leading zeros.
 *
 * @throws AnalysisInputError when a coefficient is no finite number, the denominator is zero, the degree exceeds 50, or
 *   the delay is negative or no finite number
 */
export function transferFunction(
  numerator: readonly number[],
  denominator: readonly number[],
  delayS = 0,
): TransferFunction {
  if (!(delayS >= 0 && delayS < Infinity)) {
    throw new AnalysisInputError(
      `The delay is ${delayS} s; it must be zero or a positive number of seconds.`,
    );
  }
  const checked = {
    ...(delayS > 0 && { delayS }),
    numerator: checkedPolynomial(numerator, 'numerator'),
    denominator: checkedPolynomial(denominator, 'denominator'),
  };
  if (checked.denominator.length === 0) {
    throw new AnalysisInputError('The denominator of the transfer function is zero.');
  }
  return checked;
}

function checkedPolynomial(coefficients: readonly number[], where: string): readonly number[] {
  const wrong = coefficients.findIndex((c) => !Number.isFinite(c));
  if (wrong >= 0) {
    throw new AnalysisInputError(`Coefficient ${wrong + 1} of the ${where} is not a finite number.`);
  }
  const polynomial = trimLeadingZeros(coefficients);
  if (polynomial.length > MAX_DEGREE + 1) {
    throw new AnalysisInputError(
      `The ${where} has degree ${polynomial.length - 1}; up to ${MAX_DEGREE} can be computed.`,
    );
  }
  return polynomial;
}

/** Roots of the denominator; common factors with the numerator are not cancelled. */
export function poles(h: TransferFunction): Root[] {
  return polynomialRoots(h.denominator);
}

/** Roots of the numerator. */
export function zeros(h: TransferFunction): Root[] {
  return polynomialRoots(h.numerator);
}

/**
 * H(0), a common factor s cancelled.
 *
 * @returns null when a pole lies at the origin
 */
export function dcGain(h: TransferFunction): number | null {
  const numerator = trimLeadingZeros(h.numerator);
  const denominator = trimLeadingZeros(h.denominator);
  if (numerator.length === 0) return 0;
  const common = Math.min(rootsAtOrigin(numerator), rootsAtOrigin(denominator));
  const divisor = denominator[denominator.length - 1 - common]!;
  return divisor === 0 ? null : numerator[numerator.length - 1 - common]! / divisor;
}

/**
 * Degree of the denominator minus that of the numerator. Below zero H is improper: its gain grows without bound with
 * frequency, and its answer to a step holds an impulse; null for H = 0.
 */
export function relativeDegree(h: TransferFunction): number | null {
  const numerator = trimLeadingZeros(h.numerator);
  return numerator.length === 0 ? null : trimLeadingZeros(h.denominator).length - numerator.length;
}
