import {
  complexAbs,
  complexAdd,
  complexDivide,
  complexMultiply,
  complexSubtract,
  type Complex,
} from '../linear/complex.js';
import { derivative, evaluate, evaluateMagnitudes, type Polynomial } from './polynomial.js';

const MAX_ROUNDS = 500;

/**
 * All roots of a polynomial at once by the Ehrlich-Aberth iteration (O. Aberth, Math. Comp. 27, 1973), started on the
 * circles that the Newton polygon of the coefficients gives (D. A. Bini, Numer. Algorithms 13, 1996). A root is done when
 * p(z) is within its rounding error or the step no longer counts. An m-fold root comes out as m values close to each other.
 *
 * @param polynomial of degree 1 or more, without a root at the origin
 */
export function aberthRoots(polynomial: Polynomial): Complex[] {
  const degree = polynomial.length - 1;
  const slope = derivative(polynomial);
  const roots = startingPoints(polynomial);
  const done = roots.map(() => false);
  for (let round = 0; round < MAX_ROUNDS && done.includes(false); round++) {
    for (let i = 0; i < degree; i++) {
      if (done[i]) continue;
      const z = roots[i]!;
      const value = evaluate(polynomial, z);
      const rounding = 2 * degree * Number.EPSILON * evaluateMagnitudes(polynomial, complexAbs(z));
      done[i] = complexAbs(value) <= rounding;
      if (done[i]) continue;
      const step = aberthStep(value, evaluate(slope, z), roots, i);
      roots[i] = complexSubtract(z, step);
      done[i] = complexAbs(step) <= Number.EPSILON * complexAbs(z);
    }
  }
  return roots;
}

/** p/p' with the other roots divided out: 1/(p'/p − Σ 1/(z − z_k)). */
function aberthStep(value: Complex, slope: Complex, roots: readonly Complex[], i: number): Complex {
  let repulsion: Complex = { re: 0, im: 0 };
  roots.forEach((other, k) => {
    const apart = complexSubtract(roots[i]!, other);
    if (k !== i && complexAbs(apart) > 0) {
      repulsion = complexAdd(repulsion, complexDivide({ re: 1, im: 0 }, apart));
    }
  });
  return complexDivide(value, complexSubtract(slope, complexMultiply(value, repulsion)));
}

/** One circle per edge of the upper convex hull of (k, log |c_k|), with as many points as the edge is long. */
function startingPoints(polynomial: Polynomial): Complex[] {
  const ascending = [...polynomial].reverse();
  const hull = upperHull(ascending.map((c) => Math.log(Math.abs(c))));
  return hull.slice(1).flatMap((end, edge) => {
    const start = hull[edge]!;
    const count = end - start;
    const radius = Math.abs(ascending[start]! / ascending[end]!) ** (1 / count);
    return Array.from({ length: count }, (_, j) => {
      // Turned from circle to circle and off the real axis, since a symmetric start would stay symmetric.
      const angle = 2 * Math.PI * (j / count + edge / polynomial.length) + 0.7;
      return { re: radius * Math.cos(angle), im: radius * Math.sin(angle) };
    });
  });
}

/** Abscissae of the upper convex hull of the points (k, y_k); −∞ stands for a point that is not there. */
function upperHull(heights: readonly number[]): number[] {
  const hull: number[] = [];
  heights.forEach((height, k) => {
    if (height === -Infinity) return;
    while (hull.length >= 2) {
      const a = hull[hull.length - 2]!;
      const b = hull[hull.length - 1]!;
      if ((heights[b]! - heights[a]!) * (k - a) > (height - heights[a]!) * (b - a)) break;
      hull.pop();
    }
    hull.push(k);
  });
  return hull;
}
