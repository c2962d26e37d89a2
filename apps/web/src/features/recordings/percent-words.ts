import { formatPercent, formatSi } from '../../lib/format.js';

/** One part in a million: 120 dB down, below what a recorder resolves. */
const leastPercent = 1e-4;

/** A percentage with `decimals`; below 0.1 % to three significant digits, so that it does not read as none: 0.00512 %. */
export function percentWords(value: number | null, decimals = 1): string {
  if (value === null || value <= 0 || value >= 0.1) return formatPercent(value, decimals);
  if (value < leastPercent) return `<\u00a0${formatPercent(leastPercent, 4)}`;
  return formatSi(value, '%', { digits: 3 });
}
