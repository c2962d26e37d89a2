import { AnalysisInputError } from '../errors.js';
import { stagesOf, totalDelay, type StageChain } from './frequency-response.js';
import { multiplyPolynomials } from './polynomial.js';
import { transferFunction, type TransferFunction } from './transfer-function.js';

/** Highest order of the Padé approximant; above it its coefficients no longer carry enough digits. */
export const MAX_PADE_ORDER = 10;

/**
 * Stages in series as one transfer function: numerators and denominators multiplied, delays added, nothing cancelled, so
 * that a hidden mode keeps its pole.
 *
 * @throws AnalysisInputError when the degree exceeds what can be computed
 */
export function inSeries(chain: StageChain): TransferFunction {
  const stages = stagesOf(chain);
  return transferFunction(
    multiplyPolynomials(...stages.map(({ numerator }) => numerator)),
    multiplyPolynomials(...stages.map(({ denominator }) => denominator)),
    totalDelay(chain),
  );
}

/**
 * Padé approximant of e^(−sT) with numerator and denominator of equal order n: Σ (∓1)^k c_k (sT)^k,
 * c_k = (2n − k)! n!/((2n)! k! (n − k)!) (G. H. Golub and C. F. Van Loan, Matrix Computations, 11.3). All-pass: its gain is 1
 * everywhere; its phase is right within 1° up to ωT = 0.60 (order 1), 1.72 (2), 3.07 (3), 4.55 (4).
 *
 * @throws AnalysisInputError for an order that is not 1 to 10 or a delay that is not positive
 */
export function padeDelay(delayS: number, order: number): TransferFunction {
  if (!(Number.isInteger(order) && order >= 1 && order <= MAX_PADE_ORDER)) {
    throw new AnalysisInputError(
      `The Padé order is ${order}; it must be a whole number from 1 to ${MAX_PADE_ORDER}.`,
    );
  }
  if (!(delayS > 0)) throw new AnalysisInputError(`The delay is ${delayS} s; it must be positive.`);
  const ascending = [1];
  for (let k = 1; k <= order; k++) {
    ascending.push((ascending[k - 1]! * (order - k + 1) * delayS) / ((2 * order - k + 1) * k));
  }
  const denominator = ascending.reverse();
  return transferFunction(
    denominator.map((c, i) => ((order - i) % 2 === 0 ? c : -c)),
    denominator,
  );
}

/** The same stage with its delay, if it has one, replaced by the Padé approximant of given order. */
export function withPadeDelay(h: TransferFunction, order: number): TransferFunction {
  const { numerator, denominator, delayS = 0 } = h;
  return delayS === 0 ? h : inSeries([{ numerator, denominator }, padeDelay(delayS, order)]);
}
