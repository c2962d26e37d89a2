import { evaluate, evaluateMagnitudes, trimLeadingZeros } from './polynomial.js';
import { COEFFICIENT_PRECISION, type Root } from './polynomial-roots.js';
import { poles, type TransferFunction } from './transfer-function.js';
import { complexAbs } from '../linear/complex.js';

export type StabilityVerdict = 'stable' | 'marginal' | 'unstable';

export interface Stability {
  verdict: StabilityVerdict;
  /** The poles the verdict rests on; empty when stable. */
  offending: Root[];
  /** In plain words. */
  reason: string;
}

/**
 * Stability of a stage by its poles (A. M. Lyapunov; any textbook on control, such as Ogata, Modern Control Engineering):
 * stable when all of them have a negative real part, unstable with one of positive real part or a repeated one on the
 * imaginary axis, marginal with simple ones on the axis.
 *
 * A pole counts as on the axis when a change of the coefficients by 1e-11 could put it there.
 */
export function stability(h: TransferFunction): Stability {
  const all = poles(h);
  const onAxis = all.filter((pole) => isOnAxis(h, pole));
  const right = all.filter((pole) => pole.re > 0 && !onAxis.includes(pole));
  if (right.length > 0) {
    return { verdict: 'unstable', offending: right, reason: `${named(right)} has a positive real part.` };
  }
  const repeated = onAxis.filter((pole) => pole.multiplicity > 1);
  if (repeated.length > 0) {
    return {
      verdict: 'unstable',
      offending: repeated,
      reason: `${named(repeated)} lies on the imaginary axis more than once.`,
    };
  }
  if (onAxis.length > 0) {
    return {
      verdict: 'marginal',
      offending: onAxis,
      reason: `${named(onAxis)} lies on the imaginary axis: an oscillation or a constant, once there, never dies away.`,
    };
  }
  return { verdict: 'stable', offending: [], reason: 'Every pole has a negative real part.' };
}

function isOnAxis(h: TransferFunction, pole: Root): boolean {
  if (pole.re === 0) return true;
  const denominator = trimLeadingZeros(h.denominator);
  const nearest = { re: 0, im: pole.im };
  return (
    complexAbs(evaluate(denominator, nearest)) <=
    COEFFICIENT_PRECISION * evaluateMagnitudes(denominator, Math.abs(pole.im))
  );
}

/** The first of the poles in words, a conjugate pair as one. */
function named(offending: readonly Root[]): string {
  const [{ re, im }] = offending as [Root];
  const real = Number(re.toPrecision(6));
  const imaginary = Number(Math.abs(im).toPrecision(6));
  if (imaginary === 0) return `The pole at s = ${real}`;
  return `The pair of poles at s = ${real} ± j${imaginary}`;
}
