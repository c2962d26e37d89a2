import { AnalysisInputError } from '../errors.js';
import { addPolynomials, multiplyPolynomials, type Polynomial } from '../transfer/polynomial.js';
import { transferFunction, type TransferFunction } from '../transfer/transfer-function.js';

/** An impedance in Ω as a ratio of polynomials in s; nothing is cancelled. */
export interface Impedance {
  numerator: Polynomial;
  denominator: Polynomial;
}

/** Resistance, inductance and capacitance in series; each may be left out. */
export interface SeriesBranch {
  resistanceOhm?: number | undefined;
  inductanceH?: number | undefined;
  capacitanceF?: number | undefined;
}

/** R + sL + 1/(sC). */
export function seriesImpedance({
  resistanceOhm = 0,
  inductanceH = 0,
  capacitanceF,
}: SeriesBranch): Impedance {
  return capacitanceF === undefined
    ? { numerator: [inductanceH, resistanceOhm], denominator: [1] }
    : {
        numerator: [inductanceH * capacitanceF, resistanceOhm * capacitanceF, 1],
        denominator: [capacitanceF, 0],
      };
}

export function inSeriesWith(a: Impedance, b: Impedance): Impedance {
  return {
    numerator: addPolynomials(
      multiplyPolynomials(a.numerator, b.denominator),
      multiplyPolynomials(b.numerator, a.denominator),
    ),
    denominator: multiplyPolynomials(a.denominator, b.denominator),
  };
}

export function inParallelWith(a: Impedance, b: Impedance): Impedance {
  return {
    numerator: multiplyPolynomials(a.numerator, b.numerator),
    denominator: addPolynomials(
      multiplyPolynomials(a.numerator, b.denominator),
      multiplyPolynomials(b.numerator, a.denominator),
    ),
  };
}

/** One element of a ladder, in the order from the source to the output. */
export type LadderElement = { series: Impedance } | { shunt: Impedance };

/**
 * Voltage at the open output of a ladder of series and shunt impedances over that of an ideal source at its input. By chain
 * matrices (any textbook on two-ports): the matrices [[1, Z], [0, 1]] and [[1, 0], [1/Z, 1]] are multiplied, and the answer is
 * 1/A. By reciprocity it is also the short-circuit current at the input over a current fed in at the output.
 *
 * @throws AnalysisInputError when the ladder has no solution, as with an ideal source across a shunt of 0 Ω
 */
export function ladderTransfer(elements: readonly LadderElement[]): TransferFunction {
  // [A B; C D] times the common denominator; the first row is enough for A.
  let a: Polynomial = [1];
  let b: Polynomial = [0];
  let common: Polynomial = [1];
  for (const element of elements) {
    const isSeries = 'series' in element;
    const { numerator, denominator } = isSeries ? element.series : element.shunt;
    const scale = isSeries ? denominator : numerator;
    const carried = isSeries ? { from: a, by: numerator } : { from: b, by: denominator };
    const mixed = addPolynomials(
      multiplyPolynomials(isSeries ? b : a, scale),
      multiplyPolynomials(carried.from, carried.by),
    );
    a = isSeries ? multiplyPolynomials(a, scale) : mixed;
    b = isSeries ? mixed : multiplyPolynomials(b, scale);
    common = multiplyPolynomials(common, scale);
  }
  if (a.every((c) => c === 0) || common.every((c) => c === 0)) {
    throw new AnalysisInputError(
      'The circuit has no solution: a branch across the source is a short circuit.',
    );
  }
  return transferFunction(common, a);
}
