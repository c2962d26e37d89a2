import { describe, expect, it } from 'vitest';
import { periodicTransient } from './periodic-transient.js';
import { stepFigures, timeResponse } from './time-response.js';
import { transferFunction } from './transfer-function.js';
import { twoLevelSeries } from './two-level-wave.js';

const TIMES = [0, 0.3, 1, 2.5, 7];

describe('timeResponse', () => {
  it.each([
    // Pairs of any table of Laplace transforms.
    ['step of 1/(s + 2)', [1], [1, 2], 'step', (t: number) => (1 - Math.exp(-2 * t)) / 2],
    ['ramp of 1/(s + 1)', [1], [1, 1], 'ramp', (t: number) => t - 1 + Math.exp(-t)],
    ['impulse of 1/(s + 1)⁴', [1], [1, 4, 6, 4, 1], 'impulse', (t: number) => (t ** 3 / 6) * Math.exp(-t)],
    ['impulse of an undamped pair', [3], [1, 0, 9], 'impulse', (t: number) => Math.sin(3 * t)],
    ['step of 1/s²', [1], [1, 0, 0], 'step', (t: number) => t ** 2 / 2],
    ['impulse of 2s/(s² + 1)²', [2, 0], [1, 0, 2, 0, 1], 'impulse', (t: number) => t * Math.sin(t)],
  ] as const)('%s', (_, numerator, denominator, input, exact) => {
    const response = timeResponse(transferFunction(numerator, denominator), input);
    TIMES.forEach((t) => expect(response.at(t)).toBeCloseTo(exact(t), 9));
    expect(response.impulses).toEqual([]);
    expect(response.rounding).toBeLessThan(1e-13);
  });

  it('keeps close poles of several stages apart, and tells the rounding they cost', () => {
    // 1/(s + 1)² 1/(s + 1.001): with d = 0.001 the impulse is e^(−t) (t/d − 1/d²) + e^(−(1 + d)t)/d².
    const stages = [
      [1, 1],
      [1, 1],
      [1, 1.001],
    ].map((denominator) => transferFunction([1], denominator));
    const response = timeResponse(stages, 'impulse');
    for (const t of TIMES) {
      // (e^(−x) − 1 + x)/d² with x = dt by its power series.
      const x = 0.001 * t;
      const exact = Math.exp(-t) * t * t * (1 / 2 - x / 6 + x ** 2 / 24 - x ** 3 / 120);
      expect(Math.abs(response.at(t) - exact)).toBeLessThan(10 * response.rounding);
    }
    expect(response.rounding).toBeLessThan(1e-9);
  });

  it('waits for the delay and tells what passes at once', () => {
    const lead = timeResponse(transferFunction([2, 1], [1, 1], 0.5), 'step');
    expect(lead.at(0.49)).toBe(0);
    expect(lead.at(0.5)).toBeCloseTo(2, 12);
    expect(lead.at(1.5)).toBeCloseTo(1 + Math.exp(-1), 12);
    // s²/(s + 1) = s − 1 + 1/(s + 1): a step comes out as an impulse of area 1 and −e^(−t).
    const improper = timeResponse(transferFunction([1, 0, 0], [1, 1]), 'step');
    expect(improper.impulses).toEqual([1]);
    expect(improper.at(1)).toBeCloseTo(-Math.exp(-1), 12);
  });
});

describe('stepFigures', () => {
  it('finds overshoot, peak, rise and settling of a second-order stage', () => {
    // Overshoot e^(−πζ/√(1 − ζ²)), peak at π/ωd (any textbook on control).
    const [zeta, omega] = [0.3, 20];
    const figures = stepFigures(transferFunction([5 * omega ** 2], [1, 2 * zeta * omega, omega ** 2]), 5)!;
    const root = Math.sqrt(1 - zeta ** 2);
    expect(figures.finalValue).toBe(5);
    expect(figures.overshootPercent).toBeCloseTo(100 * Math.exp((-Math.PI * zeta) / root), 7);
    expect(figures.peakTimeS).toBeCloseTo(Math.PI / (omega * root), 7);
    // It leaves the band of 5 % for the last time on its way from the third extreme; the envelope bounds that.
    const envelope = -Math.log(0.05 * root) / (zeta * omega);
    expect(figures.settlingTimeS!).toBeLessThan(envelope);
    expect(figures.settlingTimeS!).toBeGreaterThan(envelope - Math.PI / (omega * root));
    const response = timeResponse(transferFunction([omega ** 2], [1, 2 * zeta * omega, omega ** 2]), 'step');
    expect(Math.abs(response.at(figures.settlingTimeS!) - 1)).toBeCloseTo(0.05, 8);
  });

  it('knows a first-order stage in closed form', () => {
    const figures = stepFigures(transferFunction([1], [0.2, 1], 0.1))!;
    expect(figures.riseTimeS).toBeCloseTo(0.2 * Math.log(9), 8);
    expect(figures.settlingTimeS).toBeCloseTo(0.1 + 0.2 * Math.log(50), 8);
    expect([figures.overshootPercent, figures.peakTimeS]).toEqual([0, null]);
  });

  it('has none without a final value to refer to', () => {
    expect(stepFigures(transferFunction([1], [1, 0]))).toBeNull();
    expect(stepFigures(transferFunction([1, 0], [1, 1]))).toMatchObject({ finalValue: 0, riseTimeS: null });
  });
});

describe('periodicTransient', () => {
  const tau = 0.05;
  const wave = { high: 1, low: -1, duty: 0.5, frequencyHz: 50 };
  const period = 1 / wave.frequencyHz;

  /** A square wave of ±1 that sets in at t = 0 behind 1/(τs + 1) at rest: exponentials from edge to edge. */
  function exact(t: number): number {
    let value = 0;
    let level = 1;
    let left = t;
    while (left > period / 2) {
      value = level + (value - level) * Math.exp(-period / 2 / tau);
      level = -level;
      left -= period / 2;
    }
    return level + (value - level) * Math.exp(-left / tau);
  }

  it('follows the exponentials of a square wave switched on, within the orders left out', () => {
    const orders = 401;
    const result = periodicTransient(twoLevelSeries(wave, orders), transferFunction([1], [tau, 1]));
    if (!result.isDefined) throw new Error(result.reason);
    // Left out: Σ 4/(πh) · 1/(hω0τ) over odd h > N, at most 4/(πω0τ) · 1/(2N), once in the steady state, once in the transient.
    const bound = (2 * (4 / (Math.PI * 2 * Math.PI * wave.frequencyHz * tau))) / (2 * orders);
    for (const t of [0, 0.001, 0.0099, 0.013, 0.07, 0.1532, 0.4]) {
      expect(Math.abs(result.at(t) - exact(t))).toBeLessThan(bound);
    }
  });

  it('tells when a cosine behind a first-order stage has settled', () => {
    // cos ωt behind 1/(τs + 1): the transient is −1/(1 + (ωτ)²) e^(−t/τ), the steady peak 1/√(1 + (ωτ)²).
    const input = { frequencyHz: 50, dc: 0, components: [{ order: 1, rms: Math.SQRT1_2, phaseDeg: 0 }] };
    const result = periodicTransient(input, transferFunction([1], [tau, 1], 0.003), 2);
    if (!result.isDefined) throw new Error(result.reason);
    const square = 1 + (2 * Math.PI * 50 * tau) ** 2;
    const wanted = tau * Math.log(1 / square / (0.02 / Math.sqrt(square)));
    expect(result.settledAfterS).toBeCloseTo(wanted + 0.003, 3);
    expect(result.settledAfterCycles).toBeCloseTo(50 * result.settledAfterS!, 10);
    expect(result.at(0.0029)).toBe(0);
    expect(result.at(0.003)).toBeCloseTo(0, 12);
  });

  it('begins at rest behind a repeated pole, dc and orders together', () => {
    const input = {
      ...{ frequencyHz: 1, dc: 2 },
      components: [
        { order: 1, rms: 3, phaseDeg: 20 },
        { order: 7, rms: 1, phaseDeg: -130 },
      ],
    };
    const result = periodicTransient(input, [
      transferFunction([1], [1, 2]),
      transferFunction([3], [1, 4, 4]),
    ]);
    if (!result.isDefined) throw new Error(result.reason);
    expect(result.at(0)).toBeCloseTo(0, 12);
    // A stage of third order starts with value, slope and curvature 0: y grows as t³/6 · 3 x(0+).
    const x = 2 + Math.SQRT2 * (3 * Math.cos(Math.PI / 9) + Math.cos((130 * Math.PI) / 180));
    expect(result.at(1e-3) / (x * 0.5e-9)).toBeCloseTo(1, 1);
  });

  it('is not there behind an unstable stage, and needs phases', () => {
    const input = twoLevelSeries(wave, 5);
    expect(periodicTransient(input, transferFunction([1], [1, -1]))).toMatchObject({ isDefined: false });
    const unknown = { ...input, components: [{ order: 3, rms: 1, phaseDeg: null }] };
    expect(() => periodicTransient(unknown, transferFunction([1], [1, 1]))).toThrow(/phase of order 3/);
    expect(() => periodicTransient(input, transferFunction([1, 0], [1]))).toThrow(/improper/);
  });
});
