import { describe, expect, it } from 'vitest';
import { complexAbs } from '../linear/complex.js';
import { responseOf } from '../transfer/frequency-response.js';
import { resonancePeaks } from '../transfer/resonance.js';
import { stability } from '../transfer/stability.js';
import { fromZerosPolesGain, zerosPolesGain } from '../transfer/zeros-poles-gain.js';
import { designCTypeFilter, designTunedFilter, parallelResonanceOrder } from './filter-design.js';
import { lineReactorInductance } from './line-reactor.js';
import { supplyImpedance, transformerImpedance } from './network-data.js';
import { relativeDegree } from '../transfer/transfer-function.js';
import { chainOf, circuitKinds, stageTransfer, type CircuitName, type StageSpec } from './stage-spec.js';

const circuit = (name: CircuitName, values: Record<string, number>) =>
  stageTransfer({ kind: 'circuit', circuit: name, values });

/** H(s) with the denominator's constant term 1. */
function normalised({ numerator, denominator }: ReturnType<typeof stageTransfer>) {
  const last = denominator.at(-1)!;
  return [numerator.map((c) => c / last), denominator.map((c) => c / last)];
}

describe('stageTransfer', () => {
  it.each<[CircuitName, Record<string, number>, number[], number[]]>([
    // Textbook forms: RC 1/(1 + sRC); RL 1/(1 + sL/R); LC 1/(s²LC + sL/R + 1) (the stage of reference case F8-P04).
    ['rc-low-pass', { resistanceOhm: 1000, capacitanceF: 1e-6 }, [1], [1e-3, 1]],
    ['rc-high-pass', { resistanceOhm: 1000, capacitanceF: 1e-6 }, [1e-3, 0], [1e-3, 1]],
    ['rl-low-pass', { resistanceOhm: 20, inductanceH: 0.1 }, [1], [0.005, 1]],
    ['rl-high-pass', { resistanceOhm: 20, inductanceH: 0.1 }, [0.005, 0], [0.005, 1]],
    ['lc-low-pass', { inductanceH: 1e-3, capacitanceF: 1e-5, loadResistanceOhm: 20 }, [1], [1e-8, 5e-5, 1]],
    ['first-order-low-pass', { gain: 3, timeConstantS: 0.2 }, [3], [0.2, 1]],
    ['first-order-high-pass', { timeConstantS: 0.2 }, [0.2, 0], [0.2, 1]],
    ['integrator', { gain: 3 }, [3], [1, 0]],
    // Rs = Ls = 1 beside a capacitor of 1 F: 1/(s² + s + 1).
    ['shunt-capacitor', { capacitanceF: 1, sourceInductanceH: 1, sourceResistanceOhm: 1 }, [1], [1, 1, 1]],
  ])('%s is its textbook form', (name, values, numerator, denominator) => {
    const h = circuit(name, values);
    const got = denominator.at(-1) === 0 ? [h.numerator, h.denominator] : normalised(h);
    expect(got).toEqual([numerator, denominator].map((p) => p.map((c) => expect.closeTo(c, 14))));
  });

  it('gives second-order forms their gain at the natural frequency', () => {
    // At ω0: K/(2ζ) for low- and high-pass, K for the band-pass, the floor for the notch.
    const values = { gain: 2, naturalFrequencyHz: 300, dampingRatio: 0.1 };
    const at = (name: CircuitName, v: Record<string, number>) =>
      complexAbs(responseOf(circuit(name, v))(300)!);
    expect(at('second-order-low-pass', values)).toBeCloseTo(10, 10);
    expect(at('second-order-high-pass', values)).toBeCloseTo(10, 10);
    expect(at('second-order-band-pass', values)).toBeCloseTo(2, 10);
    expect(at('notch', { notchFrequencyHz: 300, quality: 8 })).toBeCloseTo(0, 10);
    expect(at('notch', { notchFrequencyHz: 300, quality: 8, floor: 0.05 })).toBeCloseTo(0.05, 10);
  });

  it('needs what is physical and names what is wrong', () => {
    expect(() => circuit('rc-low-pass', { resistanceOhm: 1000 })).toThrow(/"rc-low-pass" lacks capacitanceF/);
    expect(() => circuit('rc-low-pass', { resistanceOhm: -1, capacitanceF: 1 })).toThrow(
      /resistanceOhm is -1 Ω; it must be greater than 0/,
    );
    expect(() => circuit('rc-low-pass', { resistanceOhm: 1, capacitanceF: 1, tau: 1 })).toThrow(
      /no value "tau"/,
    );
    const specs: StageSpec[] = [
      { kind: 'coefficients', numerator: [1], denominator: [1, 1] },
      { kind: 'coefficients', numerator: [1], denominator: [0] },
    ];
    expect(() => chainOf(specs)).toThrow(/^Stage 2: The denominator/);
    const unknown = { kind: 'circuit', circuit: 'toString', values: {} } as const;
    expect(() => stageTransfer(unknown)).toThrow(/no kind of stage "toString"/);
  });

  it('closes a loop around stages', () => {
    const loop: StageSpec = {
      ...{ kind: 'closed-loop', controller: { gain: 2, integralTimeS: 1 }, output: 'reference-to-output' },
      plant: [{ kind: 'coefficients', numerator: [1], denominator: [1, 1] }],
    };
    // C G = 2(s + 1)/s · 1/(s + 1): the pole at −1 stays, s² + 3s + 2.
    expect(stageTransfer(loop)).toEqual({ numerator: [2, 2], denominator: [1, 3, 2] });
    const delayed = {
      ...loop,
      plant: [...loop.plant, { kind: 'circuit', circuit: 'delay', values: { delayS: 0.1 } }],
    };
    expect(() => stageTransfer(delayed as StageSpec)).toThrow(/Padé order/);
    expect(stability(stageTransfer({ ...(delayed as typeof loop), padeOrder: 3 })).verdict).toBe('stable');
  });

  it('describes each value of each kind once', () => {
    for (const { parameters } of Object.values(circuitKinds)) {
      const names = parameters.map(({ name }) => name);
      expect(new Set(names).size).toBe(names.length);
    }
  });
});

describe('fromZerosPolesGain', () => {
  it('multiplies out and comes back', () => {
    const h = fromZerosPolesGain({
      zeros: [{ re: 2, im: 0 }],
      poles: [
        { re: -1, im: 3 },
        { re: -4, im: 0 },
        { re: -1, im: -3 },
      ],
      gain: 5,
    });
    // (s² + 2s + 10)(s + 4)
    expect(h).toEqual({ numerator: [5, -10], denominator: [1, 6, 18, 40] });
    expect(zerosPolesGain(h)).toMatchObject({ gain: 5, zeros: [{ re: 2, im: 0 }] });
  });

  it('refuses a root without its conjugate', () => {
    const lone = { zeros: [], poles: [{ re: -1, im: 3 }], gain: 1 };
    expect(() => fromZerosPolesGain(lone)).toThrow(/pole 1 at -1 \+ j3 has no conjugate; add one at -1 − j3/);
  });
});

describe('filter design', () => {
  it('sizes a filter for the fifth harmonic', () => {
    // By hand for a capacitor rated 50 kvar, 480 V, 60 Hz: X_C = 4.608 Ω, X_L = 0.18432 Ω, 575.65 µF, 0.48892 mH.
    // designTunedFilter takes the net power, X_C = h²/(h² − 1) U²/Q: the net of that bank is 50 · 25/24 kvar.
    const net = (50e3 * 25) / 24;
    const filter = designTunedFilter({
      voltageV: 480,
      reactivePowerVar: net,
      frequencyHz: 60,
      tuningOrder: 5,
    });
    expect(filter.capacitanceF).toBeCloseTo(575.65e-6, 8);
    expect(filter.inductanceH).toBeCloseTo(0.48892e-3, 8);
    expect(filter.characteristicImpedanceOhm).toBeCloseTo(4.608 / 5, 10);
    expect(() =>
      designTunedFilter({ voltageV: 1, reactivePowerVar: 1, frequencyHz: 50, tuningOrder: 1 }),
    ).toThrow(/above 1/);
  });

  it('leaves the resistance of a C-type filter without loss at the fundamental', () => {
    const c = designCTypeFilter({ voltageV: 400, reactivePowerVar: 60e3, frequencyHz: 50, tuningOrder: 3 });
    const omega = 2 * Math.PI * 50;
    // Coil and auxiliary capacitor cancel at the fundamental; the whole delivers U² ω C1.
    expect(omega * c.inductanceH - 1 / (omega * c.auxiliaryCapacitanceF)).toBeCloseTo(0, 12);
    expect(400 ** 2 * omega * c.capacitanceF).toBeCloseTo(60e3, 6);
    // Tuned to the third order: the reactance in series vanishes there.
    const third = 3 * omega;
    const reactance =
      third * c.inductanceH - 1 / (third * c.auxiliaryCapacitanceF) - 1 / (third * c.capacitanceF);
    expect(reactance).toBeCloseTo(0, 12);
  });

  it('puts the parallel resonance where short-circuit power and bank say', () => {
    // 100 MVA and 1 Mvar: order 10; the same from X_C/X_sc in the response, without resistance to speak of.
    expect(parallelResonanceOrder(100e6, 1e6)).toBe(10);
    const omega = 2 * Math.PI * 50;
    const reactance = 400 ** 2 / 100e6;
    const h = circuit('shunt-capacitor', {
      capacitanceF: 1e6 / (omega * 400 ** 2),
      sourceInductanceH: reactance / omega,
      sourceResistanceOhm: reactance / 50,
    });
    const [peak] = resonancePeaks(h);
    expect(peak!.frequencyHz / 500).toBeCloseTo(1, 4);
  });

  it('takes supply and transformer from their rating', () => {
    // 10 MVA at 400 V: 16 mΩ; with X/R = 4/3 it is 9.6 mΩ and 12.8 mΩ.
    const supply = {
      voltageV: 400,
      shortCircuitPowerVA: 10e6,
      reactanceToResistance: 4 / 3,
      frequencyHz: 50,
    };
    const { resistanceOhm, inductanceH } = supplyImpedance(supply);
    expect(resistanceOhm).toBeCloseTo(0.0096, 12);
    expect(2 * Math.PI * 50 * inductanceH).toBeCloseTo(0.0128, 12);
    // 630 kVA, 400 V, 6 %: 0.06 · 0.16/0.63 Ω = 15.238 mΩ.
    const transformer = transformerImpedance({
      ...{ ratedPowerVA: 630e3, ratedVoltageV: 400, shortCircuitVoltagePercent: 6 },
      ...{ reactanceToResistance: 5, frequencyHz: 50 },
    });
    const reactance = 2 * Math.PI * 50 * transformer.inductanceH;
    expect(Math.hypot(transformer.resistanceOhm, reactance)).toBeCloseTo(0.0152381, 7);
    expect(reactance / transformer.resistanceOhm).toBeCloseTo(5, 12);
    expect(() => supplyImpedance({ ...supply, shortCircuitPowerVA: 0 })).toThrow(/shortCircuitPowerVA is 0/);
  });

  it('gives the voltage at the bus by the supply impedance behind the filter', () => {
    // 10 A of order 5 into 0.1 Ω + j0.5 Ω at 250 Hz alone: 10 · √0.26 V.
    const h = circuit('series-impedance', { resistanceOhm: 0.1, inductanceH: 0.5 / (2 * Math.PI * 250) });
    expect(10 * complexAbs(responseOf(h)(250)!)).toBeCloseTo(10 * Math.sqrt(0.26), 10);
    expect(relativeDegree(h)).toBe(-1);
    const y = circuit('series-admittance', { resistanceOhm: 2, capacitanceF: 1e-3 });
    expect(complexAbs(responseOf(y)(50)!)).toBeCloseTo(1 / Math.hypot(2, 1 / (100 * Math.PI * 1e-3)), 12);
    expect(() => circuit('series-admittance', {})).toThrow(/short circuit/);
  });

  it('sizes a line reactor by its percent impedance', () => {
    // 4 % of 400 V/(√3 · 32 A) = 7.2169 Ω at 50 Hz: 0.28868 Ω, 0.91888 mH.
    const rating = { impedancePercent: 4, ratedVoltageV: 400, ratedCurrentA: 32, ratedFrequencyHz: 50 };
    expect(lineReactorInductance(rating)).toBeCloseTo(0.91888e-3, 8);
  });
});
