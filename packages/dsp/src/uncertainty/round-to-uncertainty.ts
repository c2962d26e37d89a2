/** A figure and its uncertainty as they are written. */
export interface RoundedFigure {
  value: string;
  expanded: string;
}

const SIGNIFICANT_DIGITS = 2;
const MOST_DECIMALS = 100;

/**
 * Writes a figure with the digits that its uncertainty supports: the uncertainty with two significant digits, the value
 * rounded to the same place (JCGM 100:2008, 7.2.6). Where that place lies before the decimal point, both are rounded to
 * tens, hundreds and so on.
 *
 * @param expanded above 0
 * @throws RangeError for an uncertainty that is no positive number, or a value that is no number
 */
export function roundToUncertainty(value: number, expanded: number): RoundedFigure {
  if (!(expanded > 0 && Number.isFinite(expanded) && Number.isFinite(value))) {
    throw new RangeError(
      `A finite value and a positive uncertainty are needed, got ${value} and ${expanded}.`,
    );
  }
  // Written in exponent form first: rounding may carry, as from 0.0996 to 0.10.
  const exponent = Number(expanded.toExponential(SIGNIFICANT_DIGITS - 1).split('e')[1]);
  const decimals = Math.min(MOST_DECIMALS, SIGNIFICANT_DIGITS - 1 - exponent);
  return { value: rounded(value, decimals), expanded: rounded(expanded, decimals) };
}

function rounded(value: number, decimals: number): string {
  const place = 10 ** Math.max(0, -decimals);
  const text = (place * Math.round(value / place)).toFixed(0);
  const shown = decimals > 0 ? value.toFixed(decimals) : text;
  return Number(shown) === 0 ? shown.replace('-', '') : shown;
}
