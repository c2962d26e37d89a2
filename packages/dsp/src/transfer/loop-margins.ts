import { angleDegrees, complexAbs } from '../linear/complex.js';
import { turningPoint } from '../search/turning-point.js';
import { inSeries } from './compose.js';
import { responseOf, totalDelay, type StageChain } from './frequency-response.js';
import { addPolynomials, multiplyPolynomials, scalePolynomial, type Polynomial } from './polynomial.js';
import { polynomialRoots } from './polynomial-roots.js';
import { scanFrequencies } from './resonance.js';

/** Where abs(L) = 1. */
export interface GainCrossing {
  frequencyHz: number;
  /** 180° + arg L, (−180, 180]. */
  phaseMarginDeg: number;
  /** Further delay that would bring L to −1 there, in seconds. */
  delayMarginS: number;
}

/** Where arg L = −180°. */
export interface PhaseCrossing {
  frequencyHz: number;
  /** −20 log10 abs(L): how much more gain brings L to −1 there; negative: how much less. */
  gainMarginDb: number;
}

export interface LoopMargins {
  gainCrossings: GainCrossing[];
  phaseCrossings: PhaseCrossing[];
  /** The smallest in magnitude; null without a crossing, the margin is then without bound. */
  phaseMarginDeg: number | null;
  gainMarginDb: number | null;
  delayMarginS: number | null;
}

/** With a delay, phase crossings are looked for until the gain has fallen by this for good. */
const NEGLIGIBLE_GAIN = 1e-3;
const MAX_STEPS = 200_000;

/**
 * Gain and phase margins of an open loop L, to be closed by unity negative feedback, at all crossings (Ogata, Modern Control
 * Engineering, 7-7). Margins say how far from −1 the curve of L stays; whether the closed loop is stable at all, `nyquist`
 * or the poles of `closeLoop` tell.
 *
 * Gain crossings are the roots of abs(N)² − abs(D)² in ω², which no delay changes. Phase crossings are found on a scan of
 * Im L = 0 with Re L < 0, refined by bisection; with a delay the steps turn it by at most 0.1 rad, up to where the gain
 * stays below 0.001.
 */
export function loopMargins(loop: StageChain): LoopMargins {
  const response = responseOf(loop);
  const gainCrossings = gainCrossingFrequencies(loop).flatMap((frequencyHz) => {
    const value = response(frequencyHz);
    if (value === null) return [];
    const margin = angleDegrees({ re: -value.re, im: -value.im });
    const turns = (margin < 0 ? margin + 360 : margin) / 360;
    return [{ frequencyHz, phaseMarginDeg: margin, delayMarginS: turns / frequencyHz }];
  });
  const phaseCrossings = phaseCrossingFrequencies(loop, gainCrossings.at(-1)?.frequencyHz ?? 0).flatMap(
    (frequencyHz) => {
      const value = response(frequencyHz);
      const gain = value === null ? 0 : complexAbs(value);
      return gain === 0 ? [] : [{ frequencyHz, gainMarginDb: -20 * Math.log10(gain) }];
    },
  );
  return {
    gainCrossings,
    phaseCrossings,
    phaseMarginDeg: smallest(gainCrossings.map(({ phaseMarginDeg }) => phaseMarginDeg)),
    gainMarginDb: smallest(phaseCrossings.map(({ gainMarginDb }) => gainMarginDb)),
    delayMarginS: smallest(gainCrossings.map(({ delayMarginS }) => delayMarginS)),
  };
}

/** Frequencies in Hz, in order, at which abs(L) = 1. */
export function gainCrossingFrequencies(loop: StageChain): number[] {
  const { numerator, denominator } = inSeries(loop);
  const difference = addPolynomials(
    squaredMagnitude(numerator),
    scalePolynomial(squaredMagnitude(denominator), -1),
  );
  if (difference.length <= 1) return [];
  return polynomialRoots(difference)
    .filter(({ re, im }) => im === 0 && re > 0)
    .map(({ re }) => Math.sqrt(re) / (2 * Math.PI))
    .sort((a, b) => a - b);
}

/** abs(p(jω))² as a polynomial in ω². */
function squaredMagnitude(polynomial: Polynomial): Polynomial {
  const mirrored = polynomial.map((c, k) => ((polynomial.length - 1 - k) % 2 === 0 ? c : -c));
  const inS = multiplyPolynomials(polynomial, mirrored);
  // Only even powers of s are left; s² = −ω².
  const degree = (inS.length - 1) / 2;
  return Array.from(
    { length: Math.max(0, degree + 1) },
    (_, k) => ((degree - k) % 2 === 0 ? 1 : -1) * inS[2 * k]!,
  );
}

function phaseCrossingFrequencies(loop: StageChain, lastGainCrossingHz: number): number[] {
  const response = responseOf(loop);
  const frequencies = phaseScan(loop, lastGainCrossingHz);
  const found: number[] = [];
  const atZero = response(0);
  if (atZero !== null && atZero.re < 0) found.push(0);
  let before: { frequencyHz: number; im: number } | null = null;
  for (const frequencyHz of frequencies) {
    const value = response(frequencyHz);
    if (value === null) {
      before = null;
      continue;
    }
    if (before !== null && before.im * value.im < 0) {
      const sign = Math.sign(before.im);
      const hasSameSign = (f: number) => Math.sign(response(f)?.im ?? 0) === sign;
      const crossing = turningPoint(hasSameSign, before.frequencyHz, frequencyHz);
      // Im L also changes its sign through a pole, where it does not vanish.
      const there = response(crossing);
      if (there !== null && there.re < 0 && Math.abs(there.im) < 1e-6 * Math.abs(there.re))
        found.push(crossing);
    }
    if (value.im !== 0) before = { frequencyHz, im: value.im };
  }
  return found;
}

function phaseScan(loop: StageChain, lastGainCrossingHz: number): number[] {
  const base = scanFrequencies(loop);
  const delayS = totalDelay(loop);
  if (delayS === 0) return base;
  const response = responseOf(loop);
  const isStrong = (f: number) => complexAbs(response(f) ?? { re: Infinity, im: 0 }) > NEGLIGIBLE_GAIN;
  let end = Math.max(lastGainCrossingHz * 2, base.at(-1) ?? 0, 1 / delayS);
  while (isStrong(end) && end < 1e3 / delayS) end *= 2;
  const step = 0.1 / (2 * Math.PI * delayS);
  const count = Math.min(MAX_STEPS, Math.ceil(end / step));
  const even = Array.from({ length: count }, (_, i) => (i + 1) * step);
  return [...base.filter((f) => f <= end), ...even].sort((a, b) => a - b);
}

function smallest(values: readonly number[]): number | null {
  return values.reduce<number | null>(
    (best, x) => (best === null || Math.abs(x) < Math.abs(best) ? x : best),
    null,
  );
}
