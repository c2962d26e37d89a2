import { choleskyFactor, choleskySolve } from '../linear/cholesky.js';

/** Windows this near to a whole number of samples have orthogonal lines, to rounding. */
const WHOLE = 1e-10;
/** Least pivot of a fit, of 1: orders next to half the sample rate hardly show in one of cosine and sine. */
const LEAST_PIVOT = 2e-9;

/**
 * What the orders of a rectangular window leak into its lines when it holds `windowSamples`, no whole number, but is taken
 * over `sampleCount` samples.
 *
 * A line of amplitude 1 leaks d(q) = sin(πqN/W)/(N sin(πq/W)) into the line q lines away, N samples for W; that is
 * d(q) = (−1)^q g(q) for whole q ≠ 0, with the smooth function g that is meant here, and d(0) = 1. With the amplitudes
 * a_h, b_h of the orders h (DC is order 0, order h is line ch), line k has the cosine amplitude
 * Σ_h a_h (d(k − ch) + d(k + ch)), half of that for k = 0, and the sine amplitude Σ_h b_h (d(k − ch) − d(k + ch)).
 */
export type LeakageCurve = (distance: number) => number;

/** @returns null when the lines are orthogonal to rounding */
export function leakageCurve(sampleCount: number, windowSamples: number): LeakageCurve | null {
  const excess = (sampleCount - windowSamples) / windowSamples;
  if (Math.abs(sampleCount - windowSamples) < WHOLE) return null;
  return (distance) => {
    const angle = (Math.PI * distance) / windowSamples;
    return Math.abs(angle) < 1e-12
      ? (excess * windowSamples) / sampleCount
      : Math.sin(Math.PI * distance * excess) / (sampleCount * Math.sin(angle));
  };
}

/** d(q) for a whole number q. */
export function leakageAt(curve: LeakageCurve, lines: number): number {
  return lines === 0 ? 1 : (lines % 2 === 0 ? 1 : -1) * curve(lines);
}

/**
 * Factors (linear/cholesky.ts) of the two systems that give a_h and b_h from the lines ch, that of DC doubled. They are the
 * normal equations of the least-squares fit of all orders: about the centre of the window cosines and sines are
 * orthogonal, and the lines are the projections.
 */
export interface OrderFit {
  /** Orders fitted, DC included. */
  readonly orderCount: number;
  readonly cosineFactor: Float64Array;
  readonly sineFactor: Float64Array;
}

export function orderFit(curve: LeakageCurve, cycles: number, orderCount: number): OrderFit {
  const leaked = Float64Array.from({ length: 2 * orderCount }, (_, h) => leakageAt(curve, cycles * h));
  const cosineFactor = new Float64Array(orderCount * orderCount);
  const sineFactor = new Float64Array(orderCount * orderCount);
  for (let h = 0; h < orderCount; h++) {
    for (let i = 0; i <= h; i++) {
      cosineFactor[h * orderCount + i] = leaked[h - i]! + leaked[h + i]!;
      sineFactor[h * orderCount + i] = leaked[h - i]! - leaked[h + i]!;
    }
  }
  // DC has no sine.
  sineFactor[0] = 1;
  choleskyFactor(cosineFactor, orderCount, LEAST_PIVOT);
  choleskyFactor(sineFactor, orderCount, LEAST_PIVOT);
  return { orderCount, cosineFactor, sineFactor };
}

/** Takes the leakage of the orders out of line amplitudes about the centre of the window, in place. */
export function removeLeakage(
  curve: LeakageCurve,
  { orderCount, cosineFactor, sineFactor }: OrderFit,
  cycles: number,
  cosine: Float64Array,
  sine: Float64Array,
): void {
  const orders = Array.from({ length: orderCount }, (_, h) => h);
  const projected = (lines: Float64Array) => Float64Array.from(orders, (h) => lines[h * cycles]!);
  const leaked = Float64Array.from({ length: 2 * cosine.length }, (_, q) => leakageAt(curve, q));
  const cosines = projected(cosine);
  cosines[0]! *= 2;
  const orderCosine = choleskySolve(cosineFactor, orderCount, cosines);
  const orderSine = choleskySolve(sineFactor, orderCount, projected(sine));
  for (const h of orders) {
    const line = h * cycles;
    for (let k = 0; k < cosine.length; k++) {
      const near = leaked[Math.abs(k - line)]!;
      const far = leaked[k + line]!;
      const share = k === 0 ? 0.5 : 1;
      cosine[k]! -= share * orderCosine[h]! * (near + far);
      sine[k]! -= share * orderSine[h]! * (near - far);
    }
    cosine[line]! += orderCosine[h]!;
    sine[line]! += orderSine[h]!;
  }
}
