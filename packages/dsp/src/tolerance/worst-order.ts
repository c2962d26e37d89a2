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

/**
 * How far figures stay below their limits, as the smallest share of a limit that is left: 0.1 when the worst stands at 90 %
 * of it, negative when it is exceeded. For `smallestMeeting` and the condition of `drawStudy`.
 *
 * @returns NaN when a figure with a limit does not exist; Infinity without limits
 */
export function marginToLimits(figures: ArrayLike<number>, limits: readonly (number | null)[]): number {
  return limits.reduce<number>((least, limit, i) => {
    if (limit === null || !(limit > 0)) return least;
    const left = 1 - (figures[i] ?? NaN) / limit;
    return Number.isNaN(left) || left < least ? left : least;
  }, Infinity);
}
