import { AnalysisInputError } from '../errors.js';
import type { FourierSeries } from './types.js';

/**
 * Checks a series that somebody entered.
 *
 * @throws AnalysisInputError for a frequency that is not positive, orders that are no positive whole numbers or occur twice,
 *   and values that are no finite numbers
 */
export function checkSeries({ frequencyHz, dc, components }: FourierSeries): void {
  if (!(frequencyHz > 0 && frequencyHz < Infinity)) {
    throw new AnalysisInputError(
      `The fundamental frequency is ${frequencyHz} Hz; it must be greater than 0.`,
    );
  }
  if (!Number.isFinite(dc)) throw new AnalysisInputError('The DC value is not a finite number.');
  const seen = new Set<number>();
  for (const { order, rms, phaseDeg } of components) {
    if (!(Number.isInteger(order) && order >= 1)) {
      throw new AnalysisInputError(
        `The order ${order} is not a whole number of at least 1; DC is given apart.`,
      );
    }
    if (seen.has(order)) throw new AnalysisInputError(`The order ${order} is given twice.`);
    seen.add(order);
    if (!(rms >= 0 && rms < Infinity)) {
      throw new AnalysisInputError(`The rms value of order ${order} is ${rms}; it must be 0 or more.`);
    }
    if (phaseDeg !== null && !Number.isFinite(phaseDeg)) {
      throw new AnalysisInputError(
        `The phase of order ${order} is not a finite number; leave it out if it is not known.`,
      );
    }
  }
}
