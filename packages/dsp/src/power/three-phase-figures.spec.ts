import { describe, expect, it } from 'vitest';
import { symmetricalComponents, unbalance } from './symmetrical-components.js';
import { threePhaseFigures } from './three-phase-figures.js';
import type { PhasorSet, Triple } from './types.js';

function sine(rms: number, phaseDeg: number): PhasorSet {
  return { dc: 0, totalRms: rms, rms: [rms], phaseDeg: [phaseDeg] };
}

function rotating(make: (phaseDeg: number) => PhasorSet): Triple<PhasorSet> {
  return [make(0), make(-120), make(120)];
}

const BALANCED = rotating((phaseDeg) => sine(1, phaseDeg));
const OFF = sine(0, 0);

describe('threePhaseFigures', () => {
  it('gives PFe = 1/√6 for a resistor from one line to neutral', () => {
    // Closed form: In = Ia = 1, so Ie = √(2/3) and Se = √6; S+ = 1.
    const { figures, neutral } = threePhaseFigures(BALANCED, [sine(1, 0), OFF, OFF], '4w');
    expect(figures.Se).toBeCloseTo(Math.sqrt(6), 12);
    expect(figures.PFe).toBeCloseTo(1 / Math.sqrt(6), 12);
    expect(figures.P1plus).toBeCloseTo(1, 12);
    expect(figures.SU1).toBeCloseTo(Math.sqrt(5), 12);
    expect(figures.Sarithmetic).toBeCloseTo(1, 12);
    expect(figures.neutralRms).toBeCloseTo(1, 12);
    expect(neutral.phaseDeg[0]).toBeCloseTo(0, 10);
    expect(figures.SeN).toBe(0);
  });

  it('gives PFe = 1/√2 for a resistor between two lines', () => {
    // Closed form: ia = −ib in phase with u12, P = √3, Ie = √(2/3), Ve = 1.
    const { figures } = threePhaseFigures(BALANCED, [sine(1, 30), sine(1, -150), OFF], '3w');
    expect(figures.P).toBeCloseTo(Math.sqrt(3), 12);
    expect(figures.Ve).toBeCloseTo(1, 12);
    expect(figures.PFe).toBeCloseTo(Math.SQRT1_2, 12);
    expect(figures.lineToLineRms[0]).toBeCloseTo(Math.sqrt(3), 12);
    expect(figures.neutralRms).toBeCloseTo(0, 12);
  });

  it('counts the neutral with four wires only', () => {
    const one: Triple<PhasorSet> = [sine(3, 0), OFF, OFF];
    expect(threePhaseFigures(BALANCED, one, '3w').figures.Ie).toBeCloseTo(Math.sqrt(3), 12);
    expect(threePhaseFigures(BALANCED, one, '4w').figures.Ie).toBeCloseTo(Math.sqrt(6), 12);
  });

  it('adds currents of the third order in the neutral', () => {
    const currents = rotating((phase) => ({
      dc: 0,
      totalRms: Math.hypot(10, 5),
      rms: [10, 0, 5],
      phaseDeg: [phase, 0, 3 * phase + 40],
    }));
    const { neutral, figures } = threePhaseFigures(BALANCED, currents, '4w');
    expect(neutral.rms[2]).toBeCloseTo(15, 12);
    expect(neutral.phaseDeg[2]).toBeCloseTo(40, 10);
    expect(figures.neutralRms).toBeCloseTo(15, 12);
    expect(figures.Ie).toBeCloseTo(Math.sqrt(125 + 75), 12);
    expect(figures.SeN).toBeCloseTo(3 * Math.sqrt(100), 10);
  });

  it('adds what the orders leave over as powers, and signed DC', () => {
    // 3 A of noise in each current beside 4 A of fundamental and 1 A of DC: In² = 3·3² + 3².
    const currents = rotating((phase) => ({
      dc: 1,
      totalRms: Math.sqrt(16 + 9 + 1),
      rms: [4],
      phaseDeg: [phase],
    }));
    expect(threePhaseFigures(BALANCED, currents, '4w').figures.neutralRms).toBeCloseTo(6, 12);
  });
});

describe('symmetricalComponents', () => {
  it('gives the sequences of a line with one conductor open', () => {
    // Grainger and Stevenson, Power System Analysis (1994), example 11.1: Ia = 10∠0°, Ib = 10∠180°, Ic = 0.
    const [order] = symmetricalComponents([sine(10, 0), sine(10, 180), OFF]);
    expect(order!.zero.rms).toBeCloseTo(0, 12);
    expect(order!.zero.phaseDeg).toBeNull();
    expect(order!.positive.rms).toBeCloseTo(5.7735, 4);
    expect(order!.positive.phaseDeg).toBeCloseTo(-30, 10);
    expect(order!.negative.rms).toBeCloseTo(5.7735, 4);
    expect(order!.negative.phaseDeg).toBeCloseTo(30, 10);
    expect(unbalance([order!])).toEqual({
      u2: expect.closeTo(1, 12) as number,
      u0: expect.closeTo(0, 12) as number,
    });
  });

  it('gives order 5 as negative and order 3 as zero sequence', () => {
    const phases = rotating((shift) => ({
      dc: 0,
      totalRms: 1,
      rms: [1, 0, 0.2, 0, 0.1],
      phaseDeg: [1, 2, 3, 4, 5].map((order) => order * shift),
    }));
    const orders = symmetricalComponents(phases);
    expect(orders[0]!.positive.rms).toBeCloseTo(1, 12);
    expect(orders[2]!.zero.rms).toBeCloseTo(0.2, 12);
    expect(orders[2]!.positive.rms).toBeCloseTo(0, 12);
    expect(orders[4]!.negative.rms).toBeCloseTo(0.1, 12);
    expect(orders[4]!.negative.phaseDeg).toBeCloseTo(0, 10);
  });

  it('has no unbalance for phases that run backwards', () => {
    const [a, b, c] = BALANCED;
    expect(unbalance(symmetricalComponents([a, c, b]))).toEqual({ u2: null, u0: null });
    expect(unbalance([])).toEqual({ u2: null, u0: null });
  });
});
