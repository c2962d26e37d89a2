import { AnalysisInputError } from '../errors.js';

/** How a component may differ from its nominal value. */
export interface ComponentSpread {
  /** As it is shown, such as `Stage 1: C`. */
  name: string;
  nominal: number;
  /** ± tolerance in percent of the nominal value. */
  tolerancePercent: number;
  /**
   * For draws: `uniform` over the tolerance, or `normal` with a third of the tolerance as standard deviation, cut off at the
   * tolerance (sorted components do not exceed it). Default uniform.
   */
  distribution?: 'uniform' | 'normal';
}

/**
 * Figures for one set of values of the components, in the order of the spreads: always as many, such as the rms of each
 * order and the gain at each frequency. NaN stands for a figure that does not exist, as behind an unstable stage.
 */
export type Figures = (values: Float64Array) => ArrayLike<number>;

/** @throws AnalysisInputError for a tolerance that is negative or 100 % and more, or a nominal value that is not finite */
export function checkSpreads(spreads: readonly ComponentSpread[]): void {
  for (const { name, nominal, tolerancePercent } of spreads) {
    if (!Number.isFinite(nominal)) {
      throw new AnalysisInputError(`${name}: the nominal value is not a finite number.`);
    }
    if (!(tolerancePercent >= 0 && tolerancePercent < 100)) {
      throw new AnalysisInputError(
        `${name}: the tolerance is ${tolerancePercent} %; it must be 0 or more and below 100 %.`,
      );
    }
  }
}

export function nominalValues(spreads: readonly ComponentSpread[]): Float64Array {
  return Float64Array.from(spreads, ({ nominal }) => nominal);
}
