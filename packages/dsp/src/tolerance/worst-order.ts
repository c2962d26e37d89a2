/** The order that comes nearest to its limit, or exceeds it most. */
export interface WorstOrder {
  /** Index of the figure. */
  index: number;
  /** Its largest value over its limit. */
  ratio: number;
}

/**
 * Worst figure over a study.
 *
 * @param largest largest value of each figure; null where there is none
 * @param limits limit of each; null where there is none
 * @returns null when no figure has both
 */
export function worstOrder(
  largest: readonly (number | null)[],
  limits: readonly (number | null)[],
): WorstOrder | null {
  return largest.reduce<WorstOrder | null>((worst, value, index) => {
    const limit = limits[index] ?? null;
    if (value === null || Number.isNaN(value) || limit === null || !(limit > 0)) return worst;
    const ratio = value / limit;
    return worst === null || ratio > worst.ratio ? { index, ratio } : worst;
  }, null);
}
