import { complexAbs, type Complex } from '../linear/complex.js';
import { turningPoint } from '../search/turning-point.js';
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

const STEPS_PER_RADIAN = 20;
const MAX_STEPS = 400_000;
/** A term counts while it can reach this share of the level looked for. */
const COUNTS = 1e-3;

/**
 * Times from 0 to an end between which a decaying sum cannot leave and reach a level unseen: steps of a twentieth of a radian
 * (of a twentieth of a time constant for a real pole) of the fastest term that still counts.
 *
 * @returns null when that would take more than 400 000 steps
 */
export function scanTimes(terms: readonly ExponentialTerm[], end: number, level: number): number[] | null {
  const least = (COUNTS * level) / Math.max(1, terms.length);
  // Each term counts until its envelope, past its top, has fallen below the least; the fastest come first.
  const spans = terms
    .map((term) => ({ rate: complexAbs(term.pole), until: timeBelow(term, least) }))
    .sort((a, b) => b.rate - a.rate);
  const slowest = end > 0 ? 1 / end : 0;
  const times = [0];
  for (let t = 0; t < end;) {
    const rate = Math.max(slowest, spans.find(({ until }) => until > t)?.rate ?? 0);
    t = Math.min(end, t + 1 / (STEPS_PER_RADIAN * rate));
    times.push(t);
    if (times.length > MAX_STEPS) return null;
  }
  return times;
}

/** Time, past the top of its envelope, after which a term stays below a value. */
function timeBelow(term: ExponentialTerm, value: number): number {
  const decay = -term.pole.re;
  let to = term.power / decay;
  if (envelope(term, to) <= value) return 0;
  const from = to;
  while (envelope(term, to) > value) to += 1 / decay;
  return turningPoint((t) => envelope(term, t) <= value, to, from);
}

/**
 * Last time at which a decaying sum is larger in magnitude than a band. Once the envelopes of the terms together fit into
 * the band it cannot be any more; up to there it is looked at from the end backwards at the times of `scanTimes`, and the
 * last crossing is found by bisection.
 *
 * @returns 0 when it never is; null when a term does not decay or the search would take too many steps
 */
export function lastTimeOutside(terms: readonly ExponentialTerm[], band: number): number | null {
  if (!(band > 0) || terms.some(({ pole }) => pole.re >= 0)) return null;
  const end = Math.max(0, ...terms.map((term) => timeBelow(term, band / terms.length)));
  const times = scanTimes(terms, end, band);
  if (times === null) return null;
  const last = times.findLastIndex((t) => Math.abs(sumAt(terms, t)) > band);
  return last < 0
    ? 0
    : turningPoint((t) => Math.abs(sumAt(terms, t)) <= band, times[last + 1] ?? end, times[last]!);
}
