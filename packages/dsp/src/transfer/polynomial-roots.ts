import { complexAbs, complexDivide, complexSubtract, type Complex } from '../linear/complex.js';
import { aberthRoots } from './aberth.js';
import {
  derivative,
  evaluate,
  evaluateMagnitudes,
  rootsAtOrigin,
  trimLeadingZeros,
  type Polynomial,
} from './polynomial.js';

/** A root with the number of times it occurs. */
export interface Root extends Complex {
  multiplicity: number;
}

/** Coefficients are taken to be known to this relative precision, about what is left after printing 11 digits. */
export const COEFFICIENT_PRECISION = 1e-11;
const POLISH_STEPS = 20;

/**
 * Roots of a real polynomial, complex ones in exact conjugate pairs, ordered by distance from the origin, then by real
 * and imaginary part.
 *
 * Roots of second degree come from the quadratic formula, others from the Ehrlich-Aberth iteration. Values that a change
 * of the coefficients by 1e-11 could unite are reported as one root with its multiplicity, found as a simple root of the
 * derivative that many orders up.
 *
 * @param coefficients in descending powers; leading zeros are passed over
 * @returns empty for a constant
 */
export function polynomialRoots(coefficients: readonly number[]): Root[] {
  const polynomial = trimLeadingZeros(coefficients);
  const atOrigin = polynomial.length > 1 ? rootsAtOrigin(polynomial) : 0;
  const reduced = polynomial.slice(0, polynomial.length - atOrigin);
  const origin = atOrigin > 0 ? [{ re: 0, im: 0, multiplicity: atOrigin }] : [];
  if (reduced.length <= 1) return origin;
  const { scaled, unit } = toUnitScale(reduced);
  const values = scaled.length <= 3 ? quadraticRoots(scaled) : paired(aberthRoots(scaled));
  const roots = withMultiplicities(scaled, values).map(({ re, im, multiplicity }) => ({
    re: re * unit,
    im: im * unit,
    multiplicity,
  }));
  return [...origin, ...roots].sort(byDistance);
}

/** The roots one by one, each as often as it occurs. */
export function expandRoots(roots: readonly Root[]): Complex[] {
  return roots.flatMap(({ re, im, multiplicity }) =>
    Array.from({ length: multiplicity }, () => ({ re, im })),
  );
}

/** Replaces s by unit·s, so that the roots have about 1 as their geometric mean; a power of two keeps all digits. */
function toUnitScale(polynomial: Polynomial): { scaled: Polynomial; unit: number } {
  const degree = polynomial.length - 1;
  const first = polynomial[0]!;
  const unit = 2 ** Math.round(Math.log2(Math.abs(polynomial[degree]! / first)) / degree);
  return { scaled: polynomial.map((c, k) => c / unit ** k / first), unit };
}

/** Degree 1 or 2, monic, without cancellation in −b ± √(b² − 4c). */
function quadraticRoots(polynomial: Polynomial): Complex[] {
  const [, b, c] = polynomial as [number, number, number | undefined];
  if (c === undefined) return [{ re: -b, im: 0 }];
  const discriminant = b * b - 4 * c;
  if (discriminant < 0) {
    const im = Math.sqrt(-discriminant) / 2;
    return [
      { re: 0 - b / 2, im },
      { re: 0 - b / 2, im: -im },
    ];
  }
  const larger = -(b + (b < 0 ? -1 : 1) * Math.sqrt(discriminant)) / 2;
  return [
    { re: larger, im: 0 },
    { re: c / larger, im: 0 },
  ];
}

/** Joins each value with the one nearest to its conjugate; one that is nearest to itself is real. */
function paired(values: readonly Complex[]): Complex[] {
  const left = [...values];
  const out: Complex[] = [];
  while (left.length > 0) {
    const value = left[0]!;
    const distances = left.map((other) => Math.hypot(other.re - value.re, other.im + value.im));
    const nearest = distances.indexOf(Math.min(...distances));
    const other = left[nearest]!;
    if (nearest === 0) {
      out.push({ re: value.re, im: 0 });
    } else {
      const re = (value.re + other.re) / 2;
      const im = (value.im - other.im) / 2;
      out.push({ re, im }, { re, im: -im });
      left.splice(nearest, 1);
    }
    left.shift();
  }
  return out;
}

/** Unites the values of multiple roots, the largest multiplicity first. */
function withMultiplicities(polynomial: Polynomial, values: readonly Complex[]): Root[] {
  const left = [...values];
  const roots: Root[] = [];
  while (left.length > 0) {
    const value = left[0]!;
    const near = [...left].sort((a, b) => distance(a, value) - distance(b, value));
    const found = clusterAround(polynomial, near);
    const members = near.slice(0, found.multiplicity);
    const mirrored = found.im !== 0 ? members.map(({ re, im }) => ({ re, im: -im })) : [];
    roots.push(found, ...(found.im !== 0 ? [{ ...found, im: -found.im }] : []));
    for (const member of [...members, ...mirrored]) {
      left.splice(
        left.findIndex(({ re, im }) => re === member.re && im === member.im),
        1,
      );
    }
  }
  return roots;
}

/** The multiple root that the first m of the values, sorted by distance, stand for; m as large as possible. */
function clusterAround(polynomial: Polynomial, near: readonly Complex[]): Root {
  for (let m = near.length; m > 1; m--) {
    const members = near.slice(0, m);
    const centre = centroid(members);
    const reach = 4 * (m * COEFFICIENT_PRECISION) ** (1 / m) * complexAbs(centre);
    const isOneSided = members.every(({ im }) => im * centre.im > 0);
    if ((centre.im !== 0 && !isOneSided) || members.some((member) => distance(member, centre) > reach))
      continue;
    const root = polish(derivative(polynomial, m - 1), centre);
    if (isMultiple(polynomial, root, m)) return { ...root, multiplicity: m };
  }
  return { ...near[0]!, multiplicity: 1 };
}

/** Real when the members are real or come in conjugate pairs. */
function centroid(members: readonly Complex[]): Complex {
  const mean = (values: number[]) => values.reduce((sum, x) => sum + x, 0) / values.length;
  const isSymmetric = members.every((a) => members.some((b) => a.re === b.re && a.im === -b.im));
  return {
    re: mean(members.map(({ re }) => re)),
    im: isSymmetric ? 0 : mean(members.map(({ im }) => im)),
  };
}

/** Newton's iteration towards a simple root. */
function polish(polynomial: Polynomial, start: Complex): Complex {
  const slope = derivative(polynomial);
  let z = start;
  for (let i = 0; i < POLISH_STEPS; i++) {
    const step = complexDivide(evaluate(polynomial, z), evaluate(slope, z));
    z = complexSubtract(z, step);
    if (!(complexAbs(step) > Number.EPSILON * complexAbs(z))) break;
  }
  return z;
}

/** True when p and its first m − 1 derivatives vanish within the precision of the coefficients. */
function isMultiple(polynomial: Polynomial, root: Complex, m: number): boolean {
  return Array.from({ length: m }, (_, k) => derivative(polynomial, k)).every(
    (p) => complexAbs(evaluate(p, root)) <= COEFFICIENT_PRECISION * evaluateMagnitudes(p, complexAbs(root)),
  );
}

function distance(a: Complex, b: Complex): number {
  return Math.hypot(a.re - b.re, a.im - b.im);
}

function byDistance(a: Root, b: Root): number {
  return complexAbs(a) - complexAbs(b) || a.re - b.re || a.im - b.im;
}
