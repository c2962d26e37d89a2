export interface InterpolatedPeak {
  /** Place on the axis of lines, between k − ½ and k + ½. */
  line: number;
  /** Power at the top, corrected for the place between two lines. */
  power: number;
}

const BISECTIONS = 40;

/**
 * The top of a spectral peak between two lines: the distance δ for which the transform of the window has the ratio that
 * the two highest lines have, and the power that follows from it. This is the interpolated DFT of T. Grandke (IEEE Trans.
 * Instrum. Meas. IM-32(2), 1983: Hann window, in closed form), solved numerically for any window and any zero-padding.
 *
 * @param power of the lines, at least one on either side of `k`
 * @param transform of the window, relative to its peak, by distance in bins
 * @param binsPerLine spacing of the lines in bins: 1, or less for a zero-padded transform (not with a flat-top window,
 *   whose top ripples between such lines)
 */
export function interpolatePeak(
  power: Float64Array,
  k: number,
  transform: (bins: number) => number,
  binsPerLine = 1,
): InterpolatedPeak {
  const left = power[k - 1]!;
  const right = power[k + 1]!;
  const ratio = Math.sqrt(Math.max(left, right) / power[k]!);
  let low = 0;
  let high = 0.5;
  for (let i = 0; i < BISECTIONS; i++) {
    const middle = (low + high) / 2;
    const expected = transform((1 - middle) * binsPerLine) / transform(middle * binsPerLine);
    if (expected < ratio) low = middle;
    else high = middle;
  }
  const offset = (low + high) / 2;
  return {
    line: k + (right > left ? offset : -offset),
    power: power[k]! / transform(offset * binsPerLine) ** 2,
  };
}
