import type { LeakageCurve } from './leakage.js';

/**
 * Leakage by interpolation: what the orders leak together is, but for the sign (−1)^k, a smooth function of the line k, so
 * that a polynomial through a few nodes has it on all lines. See leakage.ts for the terms.
 */
export interface LeakageNodes {
  /** Places between lines 0 and lineCount − 1 where the sum is evaluated. */
  readonly places: Float64Array;
  /**
   * Columns of lineCount numbers, one for each node: what a node takes off each line; null when the nodes are the lines
   * themselves.
   */
  readonly spread: Float64Array | null;
}

/** Relative to the orders, where the leakage itself is small already. */
const TOLERANCE = 1e-14;
/** With more nodes, interpolation would save nothing. */
const MOST_NODES = 24;

/**
 * @param shortestWindow least number of samples of the windows meant
 * @param highestLine line of the highest order
 */
export function leakageNodes(lineCount: number, shortestWindow: number, highestLine: number): LeakageNodes {
  // The curve has a pole a whole sample rate away. Chebyshev nodes converge by the ellipse through it (L. N. Trefethen,
  // "Approximation theory and approximation practice", chapter 8).
  const middle = (lineCount - 1) / 2;
  const pole = (shortestWindow - highestLine - middle) / middle;
  const rate = pole > 1 ? pole + Math.sqrt(pole * pole - 1) : 1;
  const count = Math.max(2, Math.ceil(-Math.log(TOLERANCE) / Math.log(rate)));
  if (!(count <= MOST_NODES && 2 * count <= lineCount)) {
    return { places: Float64Array.from({ length: lineCount }, (_, k) => k), spread: null };
  }
  const angles = Float64Array.from({ length: count }, (_, r) => (Math.PI * (r + 0.5)) / count);
  const places = angles.map((angle) => middle * (1 - Math.cos(angle)));
  const weights = angles.map((angle, r) => (r % 2 === 0 ? 1 : -1) * Math.sin(angle));
  const spread = new Float64Array(count * lineCount);
  for (let k = 0; k < lineCount; k++) {
    const shares = interpolationShares(places, weights, k);
    shares.forEach((share, r) => (spread[r * lineCount + k] = -lineSign(k) * share));
  }
  return { places, spread };
}

/** Shares of the nodes in the value at `place`, by the barycentric formula. */
function interpolationShares(places: Float64Array, weights: Float64Array, place: number): Float64Array {
  const at = places.indexOf(place);
  if (at >= 0) return new Float64Array(places.length).fill(1, at, at + 1);
  const shares = weights.map((weight, r) => weight / (place - places[r]!));
  const sum = shares.reduce((total, share) => total + share, 0);
  return shares.map((share) => share / sum);
}

/** The sign of (−1)^k, halved for DC. */
function lineSign(k: number): number {
  return k === 0 ? 0.5 : k % 2 === 0 ? 1 : -1;
}

/** Columns of as many numbers as there are nodes, one for each order: what an order of amplitude 1 leaks to each. */
export interface LeakageColumns {
  readonly cosine: Float64Array;
  readonly sine: Float64Array;
  /** The value of the curve at 0, which the sums hold in place of the order itself. */
  readonly own: number;
}

export function leakageColumns(
  { places, spread }: LeakageNodes,
  curve: LeakageCurve,
  cycles: number,
  orderCount: number,
): LeakageColumns {
  const cosine = new Float64Array(places.length * orderCount);
  const sine = new Float64Array(places.length * orderCount);
  for (let h = 0; h < orderCount; h++) {
    const sign = (cycles * h) % 2 === 0 ? 1 : -1;
    places.forEach((place, r) => {
      const scale = spread === null ? -sign * lineSign(place) : sign;
      const near = curve(place - cycles * h);
      const far = curve(place + cycles * h);
      cosine[h * places.length + r] = scale * (near + far);
      sine[h * places.length + r] = scale * (near - far);
    });
  }
  return { cosine, sine, own: curve(0) };
}
