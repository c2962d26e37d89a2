import { choleskyFactor, choleskySolve } from '../linear/cholesky.js';

/** Kernel values below this are rounding: the lines are orthogonal then. */
const ROUNDING = 1e-10;
/** Least pivot of a fit, of 1: orders next to half the sample rate hardly show in one of cosine and sine. */
const LEAST_PIVOT = 2e-9;

/**
 * What the orders of a window of a broken number of samples leak into its lines. With amplitudes a_h, b_h of the orders
 * h < orderCount (DC is order 0, order h is line ch), line k has the cosine amplitude Σ_h a_h (d(k − ch) + d(k + ch)), half
 * of that for k = 0, and the sine amplitude Σ_h b_h (d(k − ch) − d(k + ch)).
 */
export interface Leakage {
  readonly orderCount: number;
  /** d(q), q = 0, 1, …; even in q. */
  readonly kernel: Float64Array;
  /**
   * Factors (linear/cholesky.ts) of the two systems that give a_h and b_h from the lines ch, that of DC doubled. These are
   * the normal equations of the least-squares fit of all orders: about the centre of the window cosines and sines are
   * orthogonal, and the lines are the projections.
   */
  readonly cosineFactor: Float64Array;
  readonly sineFactor: Float64Array;
}

/**
 * Leakage of the orders up to maxOrder of a rectangular window of `sampleCount` samples into lines spaced by 1/windowSamples.
 *
 * @returns null when the lines are orthogonal to rounding
 */
export function windowLeakage(
  sampleCount: number,
  windowSamples: number,
  cycles: number,
  maxOrder: number,
  lineCount: number,
): Leakage | null {
  const kernel = new Float64Array(2 * lineCount);
  const excess = (sampleCount - windowSamples) / windowSamples;
  let largest = 0;
  kernel[0] = 1;
  for (let q = 1; q < kernel.length; q++) {
    // sin(πq(1 + excess)) without the rounding of its whole turns.
    const numerator = Math.sin(Math.PI * q * excess) / sampleCount;
    kernel[q] = ((q % 2 === 0 ? 1 : -1) * numerator) / Math.sin((Math.PI * q) / windowSamples);
    largest = Math.max(largest, Math.abs(kernel[q]!));
  }
  if (largest < ROUNDING) return null;
  const orderCount = Math.min(maxOrder, Math.floor((lineCount - 1) / cycles)) + 1;
  const cosineFactor = new Float64Array(orderCount * orderCount);
  const sineFactor = new Float64Array(orderCount * orderCount);
  for (let h = 0; h < orderCount; h++) {
    for (let i = 0; i <= h; i++) {
      const near = kernel[cycles * (h - i)]!;
      const far = kernel[cycles * (h + i)]!;
      cosineFactor[h * orderCount + i] = near + far;
      sineFactor[h * orderCount + i] = near - far;
    }
  }
  sineFactor[0] = 1;
  choleskyFactor(cosineFactor, orderCount, LEAST_PIVOT);
  choleskyFactor(sineFactor, orderCount, LEAST_PIVOT);
  return { orderCount, kernel, cosineFactor, sineFactor };
}

/** Takes the leakage of the orders out of line amplitudes about the centre of the window, in place. */
export function removeLeakage(
  { orderCount, kernel, cosineFactor, sineFactor }: Leakage,
  cycles: number,
  cosine: Float64Array,
  sine: Float64Array,
): void {
  const orders = Array.from({ length: orderCount }, (_, h) => h);
  const projected = (lines: Float64Array) => Float64Array.from(orders, (h) => lines[h * cycles]!);
  const cosines = projected(cosine);
  cosines[0]! *= 2;
  const orderCosine = choleskySolve(cosineFactor, orderCount, cosines);
  const orderSine = choleskySolve(sineFactor, orderCount, projected(sine));
  for (const h of orders) {
    const line = h * cycles;
    for (let k = 0; k < cosine.length; k++) {
      const near = kernel[Math.abs(k - line)]!;
      const far = kernel[k + line]!;
      const share = k === 0 ? 0.5 : 1;
      cosine[k]! -= share * orderCosine[h]! * (near + far);
      sine[k]! -= share * orderSine[h]! * (near - far);
    }
    cosine[line]! += orderCosine[h]!;
    sine[line]! += orderSine[h]!;
  }
}
