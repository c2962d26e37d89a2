const WINDOW_200_MS_ALPHA = 8.012;

/**
 * The 1.5 s smoothing of IEC 61000-4-7, 5.5.1: y_n = (x_n + β y_{n−1})/α on the rms values of successive windows,
 * β = α − 1. The standard leaves the start open; the filter is primed here, y_0 = x_0.
 *
 * @param alpha 8.012 (default) for windows of about 200 ms (table 3 of the standard)
 */
export function smooth(values: ArrayLike<number>, alpha = WINDOW_200_MS_ALPHA): Float64Array {
  const out = new Float64Array(values.length);
  for (let n = 0; n < values.length; n++) {
    out[n] = n === 0 ? values[0]! : (values[n]! + (alpha - 1) * out[n - 1]!) / alpha;
  }
  return out;
}

/** α = 1/(1 − e^(−T/1.5 s)) for windows of another length T; gives 8.011 for 200 ms. */
export function smoothingAlpha(windowS: number): number {
  return Math.abs(windowS - 0.2) < 0.01 ? WINDOW_200_MS_ALPHA : 1 / (1 - Math.exp(-windowS / 1.5));
}
