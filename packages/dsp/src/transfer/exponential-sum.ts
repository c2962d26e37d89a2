import { complexAbs, type Complex } from '../linear/complex.js';
import type { PartialFraction } from './partial-fractions.js';

/** One term of a real function for t ≥ 0: Re(coefficient e^(pole t)) t^power/power!. */
export interface ExponentialTerm {
  pole: Complex;
  power: number;
  coefficient: Complex;
}

/**
 * Inverse Laplace transform of partial fractions: r/(s − p)^(k + 1) becomes r t^k/k! e^(pt). Of a conjugate pair one term is
 * kept, twice as large, whose real part is the sum of the two.
 */
export function exponentialTerms(fractions: readonly PartialFraction[]): ExponentialTerm[] {
  return fractions.flatMap(({ pole, residues }) => {
    if (pole.im < 0) return [];
    const share = pole.im > 0 ? 2 : 1;
    return residues.map((residue, power) => ({
      ...{ pole, power },
      coefficient: { re: share * residue.re, im: pole.im > 0 ? share * residue.im : 0 },
    }));
  });
}

/** Value at a time t ≥ 0 in seconds. */
export function sumAt(terms: readonly ExponentialTerm[], t: number): number {
  let sum = 0;
  for (const { pole, power, coefficient } of terms) {
    const growth = Math.exp(pole.re * t) * overFactorial(t, power);
    const angle = pole.im * t;
    sum += growth * (coefficient.re * Math.cos(angle) - coefficient.im * Math.sin(angle));
  }
  return sum;
}

/** Bound on the magnitude of each term at a time. */
function envelope({ pole, power, coefficient }: ExponentialTerm, t: number): number {
  return complexAbs(coefficient) * overFactorial(t, power) * Math.exp(pole.re * t);
}

function overFactorial(t: number, power: number): number {
  let value = 1;
  for (let k = 1; k <= power; k++) value *= t / k;
  return value;
}

/** Rounding that the sum may hold: the precision of a number times the largest values of the terms. */
export function roundingOf(terms: readonly ExponentialTerm[]): number {
  return terms.reduce((sum, term) => {
    const top = term.pole.re < 0 ? term.power / -term.pole.re : 0;
    return sum + Number.EPSILON * envelope(term, top);
  }, 0);
}

const STEPS_PER_RADIAN = 10;
const MAX_STEPS = 400_000;

/**
 * Last time at which a decaying sum is larger in magnitude than a band. Beyond the time at which the envelopes of the terms
 * together fit into the band it cannot be; from there the sum is walked backwards in steps of a tenth of a radian of the
 * fastest term that still counts, and the last crossing is found by bisection.
 *
 * @param terms all with negative real part of the pole
 * @returns 0 when it never is; null when a term does not decay or the walk would take too many steps
 */
export function lastTimeOutside(terms: readonly ExponentialTerm[], band: number): number | null {
  if (!(band > 0) || terms.some(({ pole }) => pole.re >= 0)) return null;
  const total = (t: number) => terms.reduce((sum, term) => sum + envelope(term, t), 0);
  // From there on every envelope falls.
  const falling = Math.max(0, ...terms.map(({ pole, power }) => power / -pole.re));
  const slowest = Math.max(0, ...terms.map(({ pole }) => 1 / -pole.re));
  let end = falling;
  while (total(end) > band) end += slowest;
  let inside = end;
  for (let i = 0; i < MAX_STEPS; i++) {
    if (inside <= 0) return 0;
    const active = terms.filter((term) => envelope(term, inside) > (1e-3 * band) / terms.length);
    const rate = Math.max(1 / slowest, ...active.map(({ pole }) => complexAbs(pole)));
    const next = Math.max(0, inside - 1 / (STEPS_PER_RADIAN * rate));
    if (Math.abs(sumAt(terms, next)) > band) return crossing(terms, band, next, inside);
    inside = next;
  }
  return null;
}

function crossing(terms: readonly ExponentialTerm[], band: number, from: number, to: number): number {
  let [outside, inside] = [from, to];
  for (let i = 0; i < 60; i++) {
    const middle = (outside + inside) / 2;
    if (Math.abs(sumAt(terms, middle)) > band) outside = middle;
    else inside = middle;
  }
  return inside;
}
