import { AnalysisInputError } from '../errors.js';
import { checkSpreads, nominalValues, type ComponentSpread, type Figures } from './spread.js';

/** Largest number of components whose corners are all computed: 2^12 = 4096 sets of values. */
export const MAX_CORNER_COMPONENTS = 12;

/** The range of one figure over the corners. */
export interface CornerRange {
  nominal: number;
  min: number;
  max: number;
  /** For each component the end of its tolerance, −1 or 1, at which the value arises; 0: the nominal value. */
  minCorner: number[];
  maxCorner: number[];
}

export interface CornerResult {
  /** In the order of the figures. */
  figures: CornerRange[];
  corners: number;
  /** Corners at which a figure does not exist (NaN), as behind a stage that became unstable; they count for no range. */
  cornersWithout: number;
}

/**
 * Range of figures when every component stands at one end of its tolerance: all 2^n corners and the nominal values.
 * Components without tolerance have no corner. Where a figure has an extreme between the ends, as with a resonance that
 * passes an order, corners do not show it; draws do.
 *
 * @throws AnalysisInputError for more than 12 components with a tolerance
 */
export function cornerStudy(spreads: readonly ComponentSpread[], figuresOf: Figures): CornerResult {
  checkSpreads(spreads);
  const moving = spreads.flatMap(({ tolerancePercent }, i) => (tolerancePercent > 0 ? [i] : []));
  if (moving.length > MAX_CORNER_COMPONENTS) {
    throw new AnalysisInputError(
      `${moving.length} components have a tolerance; corners are computed for up to ${MAX_CORNER_COMPONENTS}. ` +
        'Set the tolerance of the less important ones to 0, or use draws.',
    );
  }
  const values = nominalValues(spreads);
  const figures = Array.from(figuresOf(values), (nominal) => ({
    ...{ nominal, min: nominal, max: nominal },
    ...{ minCorner: spreads.map(() => 0), maxCorner: spreads.map(() => 0) },
  }));
  const corners = 2 ** moving.length;
  let cornersWithout = 0;
  for (let corner = 0; corner < corners; corner++) {
    const signs = spreads.map(() => 0);
    moving.forEach((at, bit) => {
      signs[at] = (corner >> bit) & 1 ? 1 : -1;
      values[at] = spreads[at]!.nominal * (1 + (signs[at] * spreads[at]!.tolerancePercent) / 100);
    });
    const at = figuresOf(values);
    let isWhole = true;
    figures.forEach((figure, k) => {
      const value = at[k]!;
      if (Number.isNaN(value)) isWhole = false;
      if (value < figure.min || Number.isNaN(figure.min))
        Object.assign(figure, { min: value, minCorner: signs });
      if (value > figure.max || Number.isNaN(figure.max))
        Object.assign(figure, { max: value, maxCorner: signs });
    });
    if (!isWhole) cornersWithout++;
  }
  return { figures, corners, cornersWithout };
}
