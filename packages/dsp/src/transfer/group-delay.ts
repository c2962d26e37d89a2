import { complexDivide, type Complex } from '../linear/complex.js';
import { stagesOf, totalDelay, type StageChain } from './frequency-response.js';
import { trimLeadingZeros, type Polynomial } from './polynomial.js';
import type { ResponsePoint } from './frequency-response.js';

/**
 * Group delay −dφ/dω in seconds at each of the frequencies: −Re(N'(jω)/N(jω) − D'(jω)/D(jω)), exact, without differences of
 * phases; delays add.
 *
 * @returns null at a zero or pole on the imaginary axis
 */
export function groupDelay(chain: StageChain, frequenciesHz: ArrayLike<number>): (number | null)[] {
  const stages = stagesOf(chain).map(({ numerator, denominator }) => ({
    numerator: trimLeadingZeros(numerator),
    denominator: trimLeadingZeros(denominator),
  }));
  const pure = totalDelay(chain);
  return Array.from(frequenciesHz, (frequencyHz) => {
    const s = { re: 0, im: 2 * Math.PI * frequencyHz };
    let delay = pure;
    for (const { numerator, denominator } of stages) {
      const above = logarithmicSlope(numerator, s);
      const below = logarithmicSlope(denominator, s);
      if (above === null || below === null) return null;
      delay += below - above;
    }
    return delay;
  });
}

/** Re p'(s)/p(s), in powers of 1/s for large s so that nothing overflows; null where p(s) = 0. */
function logarithmicSlope(polynomial: Polynomial, s: Complex): number | null {
  const degree = polynomial.length - 1;
  const isHigh = Math.abs(s.im) > 1;
  const z = isHigh ? { re: 0, im: -1 / s.im } : s;
  const value: Complex = { re: 0, im: 0 };
  const slope: Complex = { re: 0, im: 0 };
  for (let k = 0; k <= degree; k++) {
    // High: Σ c_power z^(degree − power) and the same with each term times its power.
    const power = isHigh ? k : degree - k;
    const c = polynomial[degree - power] ?? 0;
    if (!isHigh) step(slope, z, value.re, value.im);
    step(value, z, c, 0);
    if (isHigh) step(slope, z, power * c, 0);
  }
  if (value.re === 0 && value.im === 0) return null;
  const ratio = complexDivide(slope, value);
  return isHigh ? complexDivide(ratio, s).re : ratio.re;
}

/** One step of Horner's rule: out = out z + (re + j im). */
function step(out: Complex, z: Complex, re: number, im: number): void {
  const next = out.re * z.re - out.im * z.im + re;
  out.im = out.re * z.im + out.im * z.re + im;
  out.re = next;
}

/**
 * Phases made continuous from point to point: each is moved by whole turns so that it is nearest to the one before. Points
 * must lie so close that the phase turns by less than 180° between them; a null stays null and begins anew.
 */
export function unwrappedPhase(points: readonly ResponsePoint[]): (number | null)[] {
  let last: number | null = null;
  return points.map(({ phaseDeg }) => {
    if (phaseDeg !== null) {
      const turns: number = last === null ? 0 : Math.round((last - phaseDeg) / 360);
      phaseDeg += 360 * turns;
    }
    last = phaseDeg;
    return phaseDeg;
  });
}
