/**
 * A number that depends on a small positive ε: Σ terms[k] ε^(power + k), cut off after a fixed number of terms. The first
 * term is not zero, except in the series of zero, which has none.
 */
export interface EpsilonSeries {
  power: number;
  terms: readonly number[];
}

const TERMS = 12;
/** What is left of a difference below this share of its parts is rounding. */
const CANCELLED = 1e-12;

export const EPSILON: EpsilonSeries = { power: 1, terms: [1] };

export function constantSeries(value: number): EpsilonSeries {
  return value === 0 ? { power: 0, terms: [] } : { power: 0, terms: [value] };
}

export function isZeroSeries(series: EpsilonSeries): boolean {
  return series.terms.length === 0;
}

/** Sign for ε → 0 from above. */
export function signOf(series: EpsilonSeries): number {
  return Math.sign(series.terms[0] ?? 0);
}

export function subtractSeries(a: EpsilonSeries, b: EpsilonSeries): EpsilonSeries {
  if (isZeroSeries(b)) return a;
  const power = isZeroSeries(a) ? b.power : Math.min(a.power, b.power);
  const terms = Array.from({ length: TERMS }, (_, k) => {
    const left = a.terms[power + k - a.power] ?? 0;
    const right = b.terms[power + k - b.power] ?? 0;
    const difference = left - right;
    return Math.abs(difference) <= CANCELLED * Math.max(Math.abs(left), Math.abs(right)) ? 0 : difference;
  });
  return normalised(power, terms);
}

export function multiplySeries(a: EpsilonSeries, b: EpsilonSeries): EpsilonSeries {
  const terms = Array.from({ length: TERMS }, (_, k) =>
    a.terms.slice(0, k + 1).reduce((sum, x, i) => sum + x * (b.terms[k - i] ?? 0), 0),
  );
  return normalised(a.power + b.power, terms);
}

/** a/b for b other than zero, by long division. */
export function divideSeries(a: EpsilonSeries, b: EpsilonSeries): EpsilonSeries {
  const terms: number[] = [];
  for (let k = 0; k < TERMS; k++) {
    const known = terms.reduce((sum, x, i) => sum + x * (b.terms[k - i] ?? 0), 0);
    terms.push(((a.terms[k] ?? 0) - known) / b.terms[0]!);
  }
  return normalised(a.power - b.power, terms);
}

function normalised(power: number, terms: readonly number[]): EpsilonSeries {
  const first = terms.findIndex((x) => x !== 0);
  if (first < 0) return { power: 0, terms: [] };
  const last = terms.findLastIndex((x) => x !== 0);
  return { power: power + first, terms: terms.slice(first, last + 1) };
}
