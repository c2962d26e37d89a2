import type { Statistics } from '../types.js';

/**
 * Arithmetic mean, maximum and percentiles of the values that are not flagged. Percentiles are by nearest rank (the
 * smallest value that at least 95 % or 99 % of all values do not exceed; "inverted_cdf" of Hyndman and Fan, The American
 * Statistician 50, 1996): limits are worded as "95 % of the values shall be below", and no value is made up between two
 * that were measured.
 *
 * @param flagged 1 where a value is left out
 * @returns null when no value is left or one is no number
 */
export function statistics(values: Float64Array, flagged: Uint8Array): Statistics | null {
  const kept = values.filter((_, i) => flagged[i] !== 1).sort();
  const max = kept.at(-1);
  // Sorted last, a NaN among the values is found here.
  if (max === undefined || Number.isNaN(max)) return null;
  const mean = kept.reduce((sum, x) => sum + x, 0) / kept.length;
  return { mean, max, p95: nearestRank(kept, 95), p99: nearestRank(kept, 99) };
}

function nearestRank(sorted: Float64Array, percent: number): number {
  return sorted[Math.max(1, Math.ceil((percent * sorted.length) / 100)) - 1]!;
}
