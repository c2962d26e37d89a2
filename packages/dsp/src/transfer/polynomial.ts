import type { Complex } from '../linear/complex.js';

/** Real coefficients in descending powers, without leading zeros. */
export type Polynomial = readonly number[];

/** The coefficients without leading zeros; empty for the zero polynomial. */
export function trimLeadingZeros(coefficients: readonly number[]): Polynomial {
  const first = coefficients.findIndex((c) => c !== 0);
  return first < 0 ? [] : coefficients.slice(first);
}

/** How often s can be taken out: the number of zero coefficients at the end. */
export function rootsAtOrigin(polynomial: Polynomial): number {
  const last = polynomial.findLastIndex((c) => c !== 0);
  return polynomial.length - 1 - last;
}

/** p(z) by Horner's rule. */
export function evaluate(polynomial: Polynomial, { re: x, im: y }: Complex): Complex {
  let re = 0;
  let im = 0;
  for (const c of polynomial) {
    const next = re * x - im * y + c;
    im = re * y + im * x;
    re = next;
  }
  return { re, im };
}

/** Σ |c_k| |z|^k, to which rounding errors of p(z) are relative. */
export function evaluateMagnitudes(polynomial: Polynomial, radius: number): number {
  return polynomial.reduce((sum, c) => sum * radius + Math.abs(c), 0);
}

/** The derivative of given order. */
export function derivative(polynomial: Polynomial, order = 1): Polynomial {
  let current = polynomial;
  for (let i = 0; i < order; i++) {
    const degree = current.length - 1;
    current = current.slice(0, -1).map((c, k) => c * (degree - k));
  }
  return current;
}

/** Product of polynomials; 1 for none. */
export function multiplyPolynomials(...factors: readonly Polynomial[]): Polynomial {
  return factors.reduce<Polynomial>(
    (product, factor) => {
      const out = new Array<number>(Math.max(0, product.length + factor.length - 1)).fill(0);
      product.forEach((a, i) => factor.forEach((b, k) => (out[i + k]! += a * b)));
      return out;
    },
    [1],
  );
}

/** Sum of two polynomials without leading zeros. */
export function addPolynomials(a: Polynomial, b: Polynomial): Polynomial {
  const length = Math.max(a.length, b.length);
  const at = (p: Polynomial, k: number) => p[k - (length - p.length)] ?? 0;
  return trimLeadingZeros(Array.from({ length }, (_, k) => at(a, k) + at(b, k)));
}

/** All coefficients times a factor. */
export function scalePolynomial(polynomial: Polynomial, factor: number): Polynomial {
  return polynomial.map((c) => c * factor);
}
