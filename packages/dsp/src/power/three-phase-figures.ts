import { complexAbs, complexMultiply } from '../linear/complex.js';
import { combinePhasors } from './phasors.js';
import { powerFigures } from './power-figures.js';
import { ratio, rootOfDifference } from './root-of-difference.js';
import { sequencesOf } from './symmetrical-components.js';
import type { PhasorSet, PowerFigures, ThreePhaseFigures, Triple, Wires } from './types.js';

/** Figures of a three-phase circuit, those of each phase, and the neutral current i1 + i2 + i3. */
export interface ThreePhaseResults {
  figures: ThreePhaseFigures;
  phases: Triple<PowerFigures>;
  neutral: PhasorSet;
}

/**
 * Effective quantities of a three-phase circuit, IEEE 1459-2010, 3.2.2.8 (four-wire) and 3.2.3.1 (three-wire), with equal
 * resistances of line and neutral (ρ = 1) and equal shares of star and delta loads (ξ = 1):
 *
 * - '4w': Ve² = (3(V1² + V2² + V3²) + V12² + V23² + V31²)/18, Ie² = (I1² + I2² + I3² + In²)/3
 * - '3w': Ve² = (V12² + V23² + V31²)/9, Ie² = (I1² + I2² + I3²)/3
 *
 * @param voltages in V, to neutral ('4w') or to the artificial star point ('3w'), phases 1, 2, 3
 * @param currents in A, all at the same fundamental and zero time
 * @throws RangeError when a set holds no order 1
 */
export function threePhaseFigures(
  voltages: Triple<PhasorSet>,
  currents: Triple<PhasorSet>,
  wires: Wires,
): ThreePhaseResults {
  const phases = voltages.map((voltage, k) => powerFigures(voltage, currents[k]!)) as Triple<PowerFigures>;
  const lines = lineVoltages(voltages);
  const neutral = combinePhasors(currents, [1, 1, 1]);
  const effective = (rmsOf: (set: PhasorSet) => number) => ({
    voltage: effectiveVoltage(voltages.map(rmsOf), lines.map(rmsOf), wires),
    current: effectiveCurrent(currents.map(rmsOf), rmsOf(neutral), wires),
  });
  const { voltage: Ve, current: Ie } = effective((set) => set.totalRms);
  const { voltage: Ve1, current: Ie1 } = effective((set) => set.rms[0]!);
  const Se = 3 * Ve * Ie;
  const Se1 = 3 * Ve1 * Ie1;
  const P = phases.reduce((sum, phase) => sum + phase.P, 0);
  const positive = positiveSequencePower(voltages, currents);
  const figures: ThreePhaseFigures = {
    ...{ Ve, Ie, Ve1, Ie1, Se, Se1 },
    SeN: rootOfDifference(Se, Se1, Se),
    P,
    ...positive,
    SU1: rootOfDifference(Se1, positive.S1plus, Se1),
    PFe: ratio(P, Se),
    Sarithmetic: phases.reduce((sum, phase) => sum + phase.S, 0),
    lineToLineRms: lines.map((line) => line.totalRms) as Triple<number>,
    neutralRms: neutral.totalRms,
  };
  return { figures, phases, neutral };
}

/** u1 − u2, u2 − u3, u3 − u1. */
function lineVoltages([u1, u2, u3]: Triple<PhasorSet>): Triple<PhasorSet> {
  const difference = (a: PhasorSet, b: PhasorSet) => combinePhasors([a, b], [1, -1]);
  return [difference(u1, u2), difference(u2, u3), difference(u3, u1)];
}

function effectiveVoltage(phases: number[], lines: number[], wires: Wires): number {
  const lineSquares = sumOfSquares(lines);
  return wires === '4w'
    ? Math.sqrt((3 * sumOfSquares(phases) + lineSquares) / 18)
    : Math.sqrt(lineSquares / 9);
}

function effectiveCurrent(phases: number[], neutral: number, wires: Wires): number {
  return Math.sqrt((sumOfSquares(phases) + (wires === '4w' ? neutral ** 2 : 0)) / 3);
}

/** P1+, Q1+, S1+: 3 V+ I+* of order 1 (IEEE 1459-2010, 3.2.2.4 and following). */
function positiveSequencePower(
  voltages: Triple<PhasorSet>,
  currents: Triple<PhasorSet>,
): Pick<ThreePhaseFigures, 'P1plus' | 'Q1plus' | 'S1plus'> {
  const voltage = sequencesOf(voltages, 1).positive;
  const current = sequencesOf(currents, 1).positive;
  const { re, im } = complexMultiply(voltage, { re: current.re, im: -current.im });
  return { P1plus: 3 * re, Q1plus: 3 * im, S1plus: 3 * complexAbs(voltage) * complexAbs(current) };
}

function sumOfSquares(values: number[]): number {
  return values.reduce((sum, x) => sum + x * x, 0);
}
