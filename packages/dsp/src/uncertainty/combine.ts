import type { Uncertainty, UncertaintySource } from '../types.js';

/** k = 2: a coverage probability of about 95 % (JCGM 100:2008, 6.3.3). */
const COVERAGE_FACTOR = 2;

/** Standard uncertainty that one source brings to a figure, in the unit of the figure. */
export interface Contribution {
  source: UncertaintySource;
  standard: number;
}

/**
 * Combined and expanded uncertainty of a figure: contributions are uncorrelated and add as a root of the sum of their
 * squares (JCGM 100:2008, 5.1.2; U = k u_c, 6.2.1). Several contributions of one source become one; those of nothing
 * are left out.
 *
 * @returns null when nothing contributes: the uncertainty is then not known, not zero
 */
export function combineUncertainty(contributions: readonly Contribution[]): Uncertainty | null {
  const squares = new Map<UncertaintySource, number>();
  for (const { source, standard } of contributions) {
    if (standard > 0) squares.set(source, (squares.get(source) ?? 0) + standard ** 2);
  }
  if (squares.size === 0) return null;
  const contributors = [...squares]
    .map(([source, square]) => ({ source, standard: Math.sqrt(square) }))
    .sort((a, b) => b.standard - a.standard);
  const combined = Math.hypot(...contributors.map(({ standard }) => standard));
  return { expanded: COVERAGE_FACTOR * combined, coverageFactor: COVERAGE_FACTOR, contributors };
}
