import type { Complex } from '../linear/complex.js';
import type { Polynomial } from './polynomial.js';

/** Coefficients of even and odd powers in ascending order, each with the sign of j^k. */
export interface AxisPolynomial {
  degree: number;
  even: Float64Array;
  odd: Float64Array;
}

/** A polynomial made ready to be evaluated at many points of the imaginary axis. */
export function axisPolynomial(polynomial: Polynomial): AxisPolynomial {
  const degree = polynomial.length - 1;
  const ofParity = (parity: number) =>
    Float64Array.from({ length: Math.max(0, Math.ceil((degree + 1 - parity) / 2)) }, (_, i) => {
      return (i % 2 === 0 ? 1 : -1) * polynomial[degree - parity - 2 * i]!;
    });
  return { degree, even: ofParity(0), odd: ofParity(1) };
}

/**
 * p(jω), above ω = 1 divided by ω^degree. Even and odd powers stay apart, so that real and imaginary part each come from a
 * real polynomial in ω², and in powers of 1/ω above ω = 1, so that high degrees do not overflow.
 */
export function evaluateOnAxis({ degree, even, odd }: AxisPolynomial, omega: number, out: Complex): void {
  if (Math.abs(omega) > 1) {
    const x = 1 / omega;
    out.re = fromLowest(even, x * x) * (degree % 2 === 0 ? 1 : x);
    out.im = fromLowest(odd, x * x) * (degree % 2 === 1 ? 1 : x);
  } else {
    out.re = fromHighest(even, omega * omega);
    out.im = fromHighest(odd, omega * omega) * omega;
  }
}

/** Horner's rule with the lowest power of ω multiplied most often. */
function fromLowest(terms: Float64Array, square: number): number {
  let sum = 0;
  for (const term of terms) sum = sum * square + term;
  return sum;
}

function fromHighest(terms: Float64Array, square: number): number {
  let sum = 0;
  for (let i = terms.length - 1; i >= 0; i--) sum = sum * square + terms[i]!;
  return sum;
}
