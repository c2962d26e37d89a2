import { complexAbs } from '../linear/complex.js';
import { stagesOf, type StageChain } from './frequency-response.js';
import { evaluate, evaluateMagnitudes, trimLeadingZeros } from './polynomial.js';
import { COEFFICIENT_PRECISION, type Root } from './polynomial-roots.js';
import { poles, type StabilityVerdict, type TransferFunction } from './transfer-function.js';

export interface Stability {
  verdict: StabilityVerdict;
  /** The poles the verdict rests on; empty when stable, or when the Nyquist criterion decided. */
  offending: Root[];
  /** In plain words. */
  reason: string;
}

/**
 * Stability of a stage, or of stages in series, by their poles (A. M. Lyapunov; any textbook on control, such as Ogata,
 * Modern Control Engineering): stable when all of them have a negative real part, unstable with one of positive real part
 * or a repeated one on the imaginary axis, marginal with simple ones on the axis.
 *
 * Poles are never cancelled against zeros, not against those of another stage either: a mode that a zero hides from the
 * output is still there. A pole counts as on the axis when a change of the coefficients of its stage by 1e-11 could put it
 * there. A delay in series changes nothing; a closed loop with a delay is judged by the Nyquist criterion.
 */
export function stability(chain: StageChain): Stability {
  const stages = stagesOf(chain);
  const loops = stages.flatMap(({ exact }) => (exact ? [exact.stability] : []));
  const unstable = loops.find(({ verdict }) => verdict === 'unstable');
  if (unstable) return { verdict: 'unstable', offending: [], reason: unstable.reason };
  const all = stages.filter(({ exact }) => !exact).flatMap(judgedPoles);
  const right = all.filter(({ place }) => place === 'right').map(({ pole }) => pole);
  if (right.length > 0) {
    return { verdict: 'unstable', offending: right, reason: `${named(right)} has a positive real part.` };
  }
  const onAxis = all.filter(({ place }) => place === 'axis').map(({ pole }) => pole);
  const repeated = onAxis.filter((pole) => timesThere(onAxis, pole) > 1);
  if (repeated.length > 0) {
    return {
      verdict: 'unstable',
      offending: repeated,
      reason: `${named(repeated)} lies on the imaginary axis more than once.`,
    };
  }
  const marginal = loops.find(({ verdict }) => verdict === 'marginal');
  if (marginal) return { verdict: 'marginal', offending: [], reason: marginal.reason };
  if (onAxis.length > 0) {
    return {
      verdict: 'marginal',
      offending: onAxis,
      reason: `${named(onAxis)} lies on the imaginary axis: an oscillation or a constant, once there, never dies away.`,
    };
  }
  return { verdict: 'stable', offending: [], reason: 'Every pole has a negative real part.' };
}

interface JudgedPole {
  pole: Root;
  place: 'left' | 'axis' | 'right';
}

function judgedPoles(h: TransferFunction): JudgedPole[] {
  return poles(h).map((pole) => {
    if (isOnAxis(h, pole)) return { pole, place: 'axis' };
    return { pole, place: pole.re > 0 ? 'right' : 'left' };
  });
}

/** How often a pole on the axis occurs, in one stage or in several. */
function timesThere(onAxis: readonly Root[], pole: Root): number {
  const near = 1e-9 * Math.abs(pole.im);
  return onAxis.reduce(
    (sum, { im, multiplicity }) => sum + (Math.abs(im - pole.im) <= near ? multiplicity : 0),
    0,
  );
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
