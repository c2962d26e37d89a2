import { AnalysisInputError } from '../errors.js';
import { angleDegrees, complexAbs, complexAdd, complexDivide, type Complex } from '../linear/complex.js';
import { axisPolynomial, evaluateOnAxis } from './axis-polynomial.js';
import { chainPoles } from './chain-poles.js';
import { inSeries } from './compose.js';
import { responseOf, type StageChain } from './frequency-response.js';
import { gainCrossingFrequencies } from './loop-margins.js';
import {
  poles,
  relativeDegree,
  transferFunction,
  type Response,
  type StabilityVerdict,
  type TransferFunction,
} from './transfer-function.js';
import { addPolynomials } from './polynomial.js';
import { stability } from './stability.js';
import { scanFrequencies } from './resonance.js';

export interface NyquistResult {
  verdict: StabilityVerdict;
  /** Poles of the closed loop with positive real part; null where they are infinitely many or lie on the axis. */
  closedLoopRightPoles: number | null;
  /** Poles of the open loop with positive real part. */
  openLoopRightPoles: number;
  /** Clockwise encirclements of −1 by L: the difference of the two. */
  encirclements: number | null;
  /** Where a pole of the closed loop lies on the imaginary axis; null when none does. */
  criticalFrequencyHz: number | null;
  reason: string;
}

/** 1 + L below this share of 1 + abs(L) counts as zero. */
const ON_AXIS = 1e-9;
/** Largest change of the curve between points, as a share of its distance from zero. */
const LARGEST_CHANGE = 0.4;
const MAX_HALVINGS = 48;

/**
 * Stability of an open loop L when it is closed by unity negative feedback, delays exact (H. Nyquist, Bell System Technical
 * Journal 11, 1932), counted on the characteristic function F = D + N e^(−sT) itself: over ω = 0 … ∞ its angle grows by
 * (n − 2Z)·90° for degree n and Z zeros on the right (A. W. Mikhailov 1938), so poles of L on the axis need no detour and no
 * pole-zero cancellation hides a mode. The curve is followed in steps that change it by less than 40 %, up to the last
 * frequency with abs(L) = 1; above it the angle follows from the poles of L.
 *
 * @throws AnalysisInputError for an improper loop with a delay: it reacts to ever higher frequencies ever more strongly
 */
export function nyquist(loop: StageChain): NyquistResult {
  const open = inSeries(loop);
  const excess = relativeDegree(open) ?? Infinity;
  const openPoles = chainPoles(loop);
  const openLoopRightPoles = openPoles.reduce((sum, p) => sum + (p.re > 0 ? p.multiplicity : 0), 0);
  const limit = excess > 0 ? 0 : Math.abs((open.numerator[0] ?? 0) / open.denominator[0]!);
  // A rational loop that does not fade away has a finite number of poles all the same.
  if (!open.delayS && (excess < 0 || limit >= 1)) return byPoles(open, openLoopRightPoles);
  if (excess < 0) {
    throw new AnalysisInputError(
      'The loop gain grows without bound with frequency. Add the low-pass that every real loop has, such as a derivative filter.',
    );
  }
  if (limit >= 1) {
    return {
      verdict: limit > 1 ? 'unstable' : 'marginal',
      ...{ closedLoopRightPoles: null, openLoopRightPoles, encirclements: null, criticalFrequencyHz: null },
      reason:
        `The loop gain tends to ${Number(limit.toPrecision(4))} at high frequency, 1 or more, which with a delay gives ` +
        'infinitely many poles that do not decay. Add the low-pass that every real loop has.',
    };
  }
  const walked = walk(open, loop);
  if ('criticalHz' in walked) {
    return {
      verdict: 'marginal',
      ...{ closedLoopRightPoles: null, openLoopRightPoles, encirclements: null },
      criticalFrequencyHz: walked.criticalHz,
      reason: `L passes through −1 at ${Number(walked.criticalHz.toPrecision(6))} Hz: the closed loop oscillates there without end.`,
    };
  }
  const { angle, endHz } = walked;
  const omega = 2 * Math.PI * endHz;
  const beyond = openPoles.reduce((sum, p) => sum + p.multiplicity * angleStillToCome(p, omega), 0);
  const last = responseOf(open)(endHz);
  const bend = last === null ? 0 : Math.atan2(last.im, 1 + last.re);
  const degree = open.denominator.length - 1;
  const counted = Math.round((degree * (Math.PI / 2) - (angle + beyond - bend)) / Math.PI);
  // Not −0.
  const closedLoopRightPoles = Math.max(0, counted);
  return {
    verdict: closedLoopRightPoles === 0 ? 'stable' : 'unstable',
    closedLoopRightPoles,
    openLoopRightPoles,
    encirclements: closedLoopRightPoles - openLoopRightPoles,
    criticalFrequencyHz: null,
    reason:
      closedLoopRightPoles === 0
        ? 'The closed loop has no pole with positive real part.'
        : `The closed loop has ${closedLoopRightPoles} ${closedLoopRightPoles === 1 ? 'pole' : 'poles'} with positive real part.`,
  };
}

function byPoles(open: TransferFunction, openLoopRightPoles: number): NyquistResult {
  const closed = transferFunction(open.numerator, addPolynomials(open.denominator, open.numerator));
  const { verdict, reason, offending } = stability(closed);
  const right = poles(closed).reduce((sum, p) => sum + (p.re > 0 ? p.multiplicity : 0), 0);
  const isOnAxis = verdict !== 'stable' && right === 0;
  return {
    verdict,
    closedLoopRightPoles: isOnAxis ? null : right,
    openLoopRightPoles,
    encirclements: isOnAxis ? null : right - openLoopRightPoles,
    criticalFrequencyHz: isOnAxis ? Math.abs(offending[0]!.im) / (2 * Math.PI) : null,
    reason,
  };
}

/**
 * Response of the loop closed by unity negative feedback, L/(1 + L), delays exact.
 *
 * @returns null where 1 + L = 0
 */
export function closedLoopResponse(loop: StageChain): Response {
  const response = responseOf(loop);
  return (frequencyHz) => {
    const value = response(frequencyHz);
    if (value === null) return { re: 1, im: 0 };
    const below = complexAdd({ re: 1, im: 0 }, value);
    return below.re === 0 && below.im === 0 ? null : complexDivide(value, below);
  };
}

/** Angle that jω − p has left to turn until ω = ∞. */
function angleStillToCome(p: Complex, omega: number): number {
  if (p.re === 0) return 0;
  const left = Math.PI / 2 - Math.atan((omega - p.im) / Math.abs(p.re));
  return p.re < 0 ? left : -left;
}

/** Angle of F from ω = 0 to just above the last frequency with abs(L) = 1. */
function walk(
  open: TransferFunction,
  loop: StageChain,
): { angle: number; endHz: number } | { criticalHz: number } {
  const { relative, value } = characteristic(open);
  const lastHz = gainCrossingFrequencies(open).at(-1) ?? 0;
  if (lastHz === 0) return relative(0) < ON_AXIS ? { criticalHz: 0 } : { angle: 0, endHz: 0 };
  const endHz = lastHz * 1.000001;
  const stepHz = open.delayS === undefined ? Infinity : 0.2 / (2 * Math.PI * open.delayS);
  const grid = [0, ...scanFrequencies(loop).filter((f) => f < endHz), endHz];
  let angle = 0;
  for (let i = 1; i < grid.length; i++) {
    const pieces = Math.max(1, Math.ceil((grid[i]! - grid[i - 1]!) / stepHz));
    for (let k = 0; k < pieces; k++) {
      const from = grid[i - 1]! + ((grid[i]! - grid[i - 1]!) * k) / pieces;
      const to = grid[i - 1]! + ((grid[i]! - grid[i - 1]!) * (k + 1)) / pieces;
      const turned = turnBetween(value, relative, from, to, 0);
      if ('criticalHz' in turned) return turned;
      angle += turned.angle;
    }
  }
  return { angle, endHz };
}

function turnBetween(
  value: (f: number) => Complex,
  relative: (f: number) => number,
  from: number,
  to: number,
  depth: number,
): { angle: number } | { criticalHz: number } {
  if (relative(from) < ON_AXIS) return { criticalHz: from };
  if (relative(to) < ON_AXIS) return { criticalHz: to };
  const middle = (from + to) / 2;
  const [a, m, b] = [value(from), value(middle), value(to)];
  if (isNear(a, m) && isNear(m, b) && isNear(a, b)) {
    return { angle: (angleDegrees(complexDivide(b, a)) * Math.PI) / 180 };
  }
  if (depth >= MAX_HALVINGS) return { criticalHz: middle };
  const first = turnBetween(value, relative, from, middle, depth + 1);
  if ('criticalHz' in first) return first;
  const second = turnBetween(value, relative, middle, to, depth + 1);
  return 'criticalHz' in second ? second : { angle: first.angle + second.angle };
}

function isNear(a: Complex, b: Complex): boolean {
  const change = Math.hypot(a.re - b.re, a.im - b.im);
  return change <= LARGEST_CHANGE * Math.min(complexAbs(a), complexAbs(b));
}

/** F = D + N e^(−sT) on the axis, above ω = 1 over ω^degree, and abs(F) over abs(D) + abs(N). */
function characteristic({ numerator, denominator, delayS = 0 }: TransferFunction) {
  const n = axisPolynomial(numerator);
  const d = axisPolynomial(denominator);
  const above: Complex = { re: 0, im: 0 };
  const below: Complex = { re: 0, im: 0 };
  const fill = (frequencyHz: number) => {
    const omega = 2 * Math.PI * frequencyHz;
    evaluateOnAxis(n, omega, above);
    evaluateOnAxis(d, omega, below);
    const turns = frequencyHz * delayS;
    const angle = -2 * Math.PI * (turns - Math.round(turns));
    const scale = omega > 1 ? omega ** (n.degree - d.degree) : 1;
    const re = (above.re * Math.cos(angle) - above.im * Math.sin(angle)) * scale;
    above.im = (above.re * Math.sin(angle) + above.im * Math.cos(angle)) * scale;
    above.re = re;
  };
  return {
    value: (frequencyHz: number): Complex => {
      fill(frequencyHz);
      return { re: above.re + below.re, im: above.im + below.im };
    },
    relative: (frequencyHz: number): number => {
      fill(frequencyHz);
      const size = complexAbs(above) + complexAbs(below);
      return size === 0 ? 0 : Math.hypot(above.re + below.re, above.im + below.im) / size;
    },
  };
}
