import { AnalysisInputError } from '../errors.js';
import {
  constantSeries,
  divideSeries,
  EPSILON,
  isZeroSeries,
  multiplySeries,
  signOf,
  subtractSeries,
  type EpsilonSeries,
} from './epsilon-series.js';
import { trimLeadingZeros } from './polynomial.js';

/** An element for a small positive ε: value · ε^epsilonPower. */
export interface RouthElement {
  value: number;
  /** 0 for a plain number. */
  epsilonPower: number;
}

export interface RouthRow {
  /** Power of s that the row belongs to. */
  power: number;
  elements: RouthElement[];
  /**
   * `zero-first-element`: a zero at the head was replaced by ε; `zero-row`: the row vanished and was replaced by the
   * derivative of the auxiliary polynomial of the row above.
   */
  special: 'zero-first-element' | 'zero-row' | null;
}

export interface RouthTable {
  rows: RouthRow[];
  /** Sign changes of the first column: the number of roots with positive real part. */
  signChanges: number;
  /** True where a row vanished: roots lie symmetrically about the origin, perhaps on the imaginary axis. */
  hasZeroRow: boolean;
  /**
   * False where a zero at the head and roots on the imaginary axis come together: ε may then have moved those roots to the
   * right, and the count be too large. Poles decide.
   */
  isConclusive: boolean;
}

/**
 * Routh-Hurwitz table of a polynomial (E. J. Routh 1877; Ogata, Modern Control Engineering, 5-6). A zero at the head of a
 * row becomes a small positive ε, in which all further elements are carried on exactly; a row of zeros is replaced by the
 * derivative of the auxiliary polynomial.
 *
 * @param coefficients in descending powers
 * @throws AnalysisInputError for the zero polynomial
 */
export function routhTable(coefficients: readonly number[]): RouthTable {
  const polynomial = trimLeadingZeros(coefficients);
  const degree = polynomial.length - 1;
  if (degree < 0) throw new AnalysisInputError('All coefficients are zero.');
  const width = Math.floor(degree / 2) + 1;
  const everySecond = (from: number) =>
    Array.from({ length: width }, (_, j) => constantSeries(polynomial[from + 2 * j] ?? 0));
  const rows: { elements: EpsilonSeries[]; special: RouthRow['special'] }[] = [
    { elements: everySecond(0), special: null },
  ];
  for (let power = degree - 1; power >= 0; power--) {
    const above = rows[rows.length - 1]!.elements;
    const elements = rows.length === 1 ? everySecond(1) : nextRow(rows[rows.length - 2]!.elements, above);
    rows.push(withoutZeros(elements, above, power));
  }
  const hasZeroRow = rows.some(({ special }) => special === 'zero-row');
  const hasEpsilon = rows.some(({ special }) => special === 'zero-first-element');
  // A head that vanishes with ε without having been put there shows a row that vanishes.
  const vanishes = rows.some(({ elements: [head], special }) => special === null && head!.power > 0);
  const heads = rows.map(({ elements }) => signOf(elements[0]!)).filter((sign) => sign !== 0);
  return {
    rows: rows.map(({ elements, special }, i) => describeRow(elements, special, degree - i)),
    signChanges: heads.slice(1).filter((sign, i) => sign !== heads[i]).length,
    hasZeroRow,
    isConclusive: !(hasEpsilon && (hasZeroRow || vanishes)),
  };
}

/** (b1 a2 − a1 b2)/b1 and so on along the row. */
function nextRow(upper: readonly EpsilonSeries[], lower: readonly EpsilonSeries[]): EpsilonSeries[] {
  return upper.map((_, j) => {
    const next = upper[j + 1] ?? constantSeries(0);
    const below = lower[j + 1] ?? constantSeries(0);
    return subtractSeries(next, divideSeries(multiplySeries(upper[0]!, below), lower[0]!));
  });
}

function withoutZeros(
  elements: EpsilonSeries[],
  above: readonly EpsilonSeries[],
  power: number,
): { elements: EpsilonSeries[]; special: RouthRow['special'] } {
  if (!isZeroSeries(elements[0]!)) return { elements, special: null };
  if (!elements.every(isZeroSeries)) {
    return { elements: [EPSILON, ...elements.slice(1)], special: 'zero-first-element' };
  }
  const slopes = above.map((element, j) =>
    multiplySeries(element, constantSeries(Math.max(0, power + 1 - 2 * j))),
  );
  return { elements: slopes, special: 'zero-row' };
}

function describeRow(elements: EpsilonSeries[], special: RouthRow['special'], power: number): RouthRow {
  return {
    power,
    elements: elements
      .slice(0, Math.floor(power / 2) + 1)
      .map((series) => ({ value: series.terms[0] ?? 0, epsilonPower: series.power })),
    special,
  };
}
