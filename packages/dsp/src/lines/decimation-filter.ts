import { besselI0 } from '../windows/bessel-i0.js';

/** A low-pass filter of odd length, symmetrical about its middle tap, ahead of taking every `factor`-th sample. */
export interface DecimationFilter {
  factor: number;
  /** Taps to each side of the middle one. */
  reach: number;
  /** The middle tap and those to one side of it. */
  taps: Float64Array;
}

/** a in the damping 2a e^(−a) of what folds onto the highest line: 1.2e-13. */
const DAMPING = 34;
/** Least ratio of the rate of the kept samples to twice the highest frequency. */
const LEAST_RATIO = 2;

/** More would save no time, and the response of a very long filter loses digits. */
const LARGEST_FACTOR = 32;

/**
 * The filter for lines up to `highest` (cycles per sample): what folds onto them is damped to 2e-13. Its
 * taps are a Kaiser-Bessel bell (J. F. Kaiser, R. W. Schafer, IEEE Trans. ASSP-28(1), 1980) rather than a windowed sinc:
 * the lines are divided by its response, so that it need not be flat.
 */
export function decimationFilter(highest: number): DecimationFilter {
  const factor = Math.min(LARGEST_FACTOR, Math.max(1, Math.floor(1 / (2 * LEAST_RATIO * highest))));
  if (factor === 1) return { factor, reach: 0, taps: Float64Array.of(1) };
  // Length in samples that are kept, w: a = πw√(1 − 1/σ) with σ = 1/(2·factor·highest).
  const width = DAMPING / (Math.PI * Math.sqrt(1 - 2 * factor * highest));
  const reach = Math.ceil((width * factor) / 2);
  const beta = ((2 * Math.PI * reach) / factor) * (1 - factor * highest);
  const scale = besselI0(beta);
  const taps = Float64Array.from(
    { length: reach + 1 },
    (_, i) => besselI0(beta * Math.sqrt(1 - (i / reach) ** 2)) / scale,
  );
  return { factor, reach, taps };
}

/** Response Σ h_i cos(2πf i) at `frequency` (cycles per sample), by the recurrence of C. W. Clenshaw (1955). */
export function filterResponse({ taps }: DecimationFilter, frequency: number): number {
  const cosine = Math.cos(2 * Math.PI * frequency);
  let last = 0;
  let before = 0;
  for (let i = taps.length - 1; i > 0; i--) {
    const next = 2 * taps[i]! + 2 * cosine * last - before;
    before = last;
    last = next;
  }
  return taps[0]! + cosine * last - before;
}
