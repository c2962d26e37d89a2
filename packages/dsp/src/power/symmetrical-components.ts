import { angleDegrees, complexAbs, complexMultiply, fromPolar, type Complex } from '../linear/complex.js';
import { commonOrders, noiseFloor, phasorOf } from './phasors.js';
import { ratio } from './root-of-difference.js';
import type { PhasorSet, SequenceOrder, SequencePhasor, Triple, Unbalance } from './types.js';

const A = fromPolar(1, 120);
const A2 = fromPolar(1, -120);
const ONE: Complex = { re: 1, im: 0 };

/** Zero, positive and negative sequence phasors of one order. */
export interface Sequences {
  zero: Complex;
  positive: Complex;
  negative: Complex;
}

/**
 * Symmetrical components of one order (C. L. Fortescue, Trans. AIEE 37, 1918; IEEE 1459-2010, 3.2.2.3), a = e^(j120°):
 * zero = (A + B + C)/3, positive = (A + aB + a²C)/3, negative = (A + a²B + aC)/3. The same transform for every order, so a
 * balanced 5th comes out as negative, a balanced 3rd as zero sequence.
 *
 * @param phases in phase order 1, 2, 3
 */
export function sequencesOf(phases: Triple<PhasorSet>, order: number): Sequences {
  const [a, b, c] = phases.map((set) => phasorOf(set, order)) as Triple<Complex>;
  return {
    zero: third(a, b, c, ONE, ONE),
    positive: third(a, b, c, A, A2),
    negative: third(a, b, c, A2, A),
  };
}

/**
 * Symmetrical components of every order the three phases hold. The phase is null below 0.1 % of the largest order and
 * within ten standard deviations of noise.
 */
export function symmetricalComponents(phases: Triple<PhasorSet>): SequenceOrder[] {
  const floor = Math.max(...phases.map(noiseFloor));
  const described = (phasor: Complex): SequencePhasor => {
    const rms = complexAbs(phasor);
    return { rms, phaseDeg: rms > 0 && rms >= floor ? angleDegrees(phasor) : null };
  };
  return commonOrders(...phases).map((order) => {
    const { zero, positive, negative } = sequencesOf(phases, order);
    return {
      order,
      zero: described(zero),
      positive: described(positive),
      negative: described(negative),
    };
  });
}

/**
 * Unbalance of order 1: negative and zero over positive sequence (IEC 61000-4-30, 5.7.1).
 *
 * @returns null for both where the positive sequence lies in the noise, as with phases that run backwards
 */
export function unbalance(components: readonly SequenceOrder[]): Unbalance {
  const first = components[0];
  if (!first || first.positive.phaseDeg === null) return { u2: null, u0: null };
  return {
    u2: ratio(first.negative.rms, first.positive.rms),
    u0: ratio(first.zero.rms, first.positive.rms),
  };
}

function third(a: Complex, b: Complex, c: Complex, turnB: Complex, turnC: Complex): Complex {
  const turnedB = complexMultiply(turnB, b);
  const turnedC = complexMultiply(turnC, c);
  return { re: (a.re + turnedB.re + turnedC.re) / 3, im: (a.im + turnedB.im + turnedC.im) / 3 };
}
