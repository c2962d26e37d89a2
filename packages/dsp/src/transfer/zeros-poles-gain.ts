import { AnalysisInputError } from '../errors.js';
import type { Complex } from '../linear/complex.js';
import { multiplyPolynomials, scalePolynomial, trimLeadingZeros, type Polynomial } from './polynomial.js';
import { expandRoots } from './polynomial-roots.js';
import { poles, transferFunction, zeros, type TransferFunction } from './transfer-function.js';

/** H(s) = gain · Π(s − zero)/Π(s − pole); zeros and poles in 1/s, each as often as it occurs. */
export interface ZerosPolesGain {
  zeros: readonly Complex[];
  poles: readonly Complex[];
  gain: number;
}

/** How far the members of a conjugate pair may be apart, as a share of their distance from the origin. */
const PAIR_TOLERANCE = 1e-9;

/**
 * Transfer function from zeros, poles and gain. Nothing is cancelled.
 *
 * @throws AnalysisInputError when a number is not finite or a complex root lacks its conjugate, which would make the stage
 *   answer a real signal with a complex one
 */
export function fromZerosPolesGain(
  { zeros: zeroList, poles: poleList, gain }: ZerosPolesGain,
  delayS = 0,
): TransferFunction {
  if (!Number.isFinite(gain))
    throw new AnalysisInputError(`The gain is ${gain}; it must be a finite number.`);
  return transferFunction(
    scalePolynomial(polynomialOf(zeroList, 'zero'), gain),
    polynomialOf(poleList, 'pole'),
    delayS,
  );
}

/** Zeros, poles and gain of a transfer function; its delay is left aside. */
export function zerosPolesGain(h: TransferFunction): ZerosPolesGain {
  return {
    zeros: expandRoots(zeros(h)),
    poles: expandRoots(poles(h)),
    gain: (trimLeadingZeros(h.numerator)[0] ?? 0) / trimLeadingZeros(h.denominator)[0]!,
  };
}

function polynomialOf(roots: readonly Complex[], what: 'zero' | 'pole'): Polynomial {
  const left = roots.map((root, index) => ({ ...root, place: `${what} ${index + 1}` }));
  const factors: Polynomial[] = [];
  while (left.length > 0) {
    const { re, im, place } = left.shift()!;
    if (!Number.isFinite(re) || !Number.isFinite(im)) {
      throw new AnalysisInputError(`The ${place} is not a finite number.`);
    }
    if (im === 0) {
      factors.push([1, 0 - re]);
      continue;
    }
    const reach = PAIR_TOLERANCE * Math.hypot(re, im);
    const partner = left.findIndex((other) => Math.hypot(other.re - re, other.im + im) <= reach);
    if (partner < 0) {
      throw new AnalysisInputError(
        `The ${place} at ${re} ${im < 0 ? '−' : '+'} j${Math.abs(im)} has no conjugate; ` +
          `add one at ${re} ${im < 0 ? '+' : '−'} j${Math.abs(im)}.`,
      );
    }
    left.splice(partner, 1);
    factors.push([1, -2 * re, re * re + im * im]);
  }
  return multiplyPolynomials(...factors);
}
