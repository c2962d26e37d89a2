import {
  complexAdd,
  complexDivide,
  complexMultiply,
  complexSubtract,
  type Complex,
} from '../linear/complex.js';
import { trimLeadingZeros, type Polynomial } from './polynomial.js';
import { polynomialRoots, type Root } from './polynomial-roots.js';

/** Σ residues[j]/(s − pole)^(j + 1). */
export interface PartialFraction {
  pole: Complex;
  /** By power, as many as the multiplicity of the pole. */
  residues: Complex[];
}

export interface PartialFractions {
  fractions: PartialFraction[];
  /** Polynomial part in descending powers; empty for a strictly proper ratio. */
  direct: number[];
}

/**
 * Partial fractions of a ratio of polynomials, repeated poles included. The residues at a pole of multiplicity m are the
 * first m Taylor coefficients of N(s)/Q(s) there, Q being the denominator without the pole (Heaviside's cover-up rule and its
 * derivatives, as power series).
 *
 * @param all roots of the denominator where they are known better than from its coefficients
 */
export function partialFractions(
  numerator: Polynomial,
  denominator: Polynomial,
  all: readonly Root[] = polynomialRoots(denominator),
): PartialFractions {
  const n = trimLeadingZeros(numerator);
  const d = trimLeadingZeros(denominator);
  return {
    fractions: all.map((pole) => ({
      pole: { re: pole.re, im: pole.im },
      residues: residuesAt(n, d[0]!, all, pole, []),
    })),
    direct: quotient(n, d),
  };
}

/**
 * Residues at one of the poles, of N/D times further functions that are given by their Taylor coefficients about it.
 *
 * @param leading coefficient of the highest power of the denominator
 * @param factors ascending Taylor coefficients about the pole, at least as many as its multiplicity
 */
export function residuesAt(
  numerator: Polynomial,
  leading: number,
  all: readonly Root[],
  pole: Root,
  factors: readonly (readonly Complex[])[],
): Complex[] {
  const count = pole.multiplicity;
  let below = constant(leading, count);
  for (const other of all) {
    if (other === pole) continue;
    const distance = complexSubtract(pole, other);
    for (let i = 0; i < other.multiplicity; i++) below = timesLinear(below, distance);
  }
  let series = divideSeries(taylor(numerator, pole, count), below);
  for (const factor of factors) series = multiplySeries(series, factor);
  // Coefficient k of the series belongs to the power m − k of the pole.
  return series.reverse();
}

/** Ascending Taylor coefficients of a polynomial about a point, by repeated synthetic division. */
function taylor(polynomial: Polynomial, at: Complex, count: number): Complex[] {
  let rest: Complex[] = polynomial.map((c) => ({ re: c, im: 0 }));
  return Array.from({ length: count }, () => {
    if (rest.length === 0) return { re: 0, im: 0 };
    const sums: Complex[] = [];
    let sum: Complex = { re: 0, im: 0 };
    for (const c of rest) {
      sum = complexAdd(complexMultiply(sum, at), c);
      sums.push(sum);
    }
    rest = sums.slice(0, -1);
    return sum;
  });
}

function constant(value: number, count: number): Complex[] {
  return Array.from({ length: count }, (_, k) => ({ re: k === 0 ? value : 0, im: 0 }));
}

/** The series times (distance + u). */
function timesLinear(series: readonly Complex[], distance: Complex): Complex[] {
  return series.map((c, k) =>
    complexAdd(complexMultiply(c, distance), k > 0 ? series[k - 1]! : { re: 0, im: 0 }),
  );
}

function multiplySeries(a: readonly Complex[], b: readonly Complex[]): Complex[] {
  return a.map((_, k) =>
    a.slice(0, k + 1).reduce((sum, x, i) => complexAdd(sum, complexMultiply(x, b[k - i]!)), { re: 0, im: 0 }),
  );
}

function divideSeries(a: readonly Complex[], b: readonly Complex[]): Complex[] {
  const out: Complex[] = [];
  a.forEach((x, k) => {
    const known = out.reduce((sum, y, i) => complexAdd(sum, complexMultiply(y, b[k - i]!)), { re: 0, im: 0 });
    out.push(complexDivide(complexSubtract(x, known), b[0]!));
  });
  return out;
}

/** Polynomial part of a ratio, by long division. */
function quotient(numerator: Polynomial, denominator: Polynomial): number[] {
  const rest = [...numerator];
  const out: number[] = [];
  for (let i = 0; i + denominator.length <= numerator.length; i++) {
    const factor = rest[i]! / denominator[0]!;
    out.push(factor);
    denominator.forEach((c, k) => (rest[i + k]! -= factor * c));
  }
  return out;
}
