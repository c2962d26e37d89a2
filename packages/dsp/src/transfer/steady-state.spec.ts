import { describe, expect, it } from 'vitest';
import { thdF } from '../figures/distortion.js';
import type { FourierSeries } from '../fourier/types.js';
import { steadyStateOf } from './steady-state.js';
import { transferFunction } from './transfer-function.js';
import { twoLevelSteadyState } from './two-level-steady-state.js';
import { twoLevelSeries } from './two-level-wave.js';

/** Waves of 1 rad/s, so that a cut-off of 1 rad/s lies at the fundamental. */
const FREQUENCY = 1 / (2 * Math.PI);
const ORDERS = 20_000;
const FIRST_ORDER = transferFunction([1], [1, 1]);
const BUTTERWORTH_2 = transferFunction([1], [1, Math.SQRT2, 1]);

function wave(rmsOf: (order: number) => number): FourierSeries {
  const components = Array.from({ length: ORDERS }, (_, i) => ({
    order: i + 1,
    rms: rmsOf(i + 1),
    phaseDeg: 0,
  }));
  return { frequencyHz: FREQUENCY, dc: 0, components };
}

const SQUARE = wave((h) => (h % 2) / h);
const SAWTOOTH = wave((h) => 1 / h);
const TRIANGLE = wave((h) => (h % 2) / h ** 2);

function outputThd(series: FourierSeries, h: ReturnType<typeof transferFunction>): number {
  const state = steadyStateOf(series, h);
  if (!state.isDefined) throw new Error(state.reason);
  return thdF(
    state.series.components.map(({ rms }) => rms),
    ORDERS,
  )!;
}

describe('steadyStateOf', () => {
  // I. V. Blagouchine and E. Moreau, IEEE Trans. Commun. 59(9), 2011: THD of waves behind a low-pass with its cut-off at the
  // fundamental, in closed form.
  it.each([
    [
      'sawtooth',
      'first order',
      SAWTOOTH,
      FIRST_ORDER,
      Math.sqrt(Math.PI ** 2 / 3 - Math.PI / Math.tanh(Math.PI)),
    ],
    [
      'square',
      'first order',
      SQUARE,
      FIRST_ORDER,
      Math.sqrt(Math.PI ** 2 / 4 - (Math.PI / 2) * Math.tanh(Math.PI / 2) - 1),
    ],
    ['triangle', 'first order', TRIANGLE, FIRST_ORDER, 0.051132014565818],
    ['sawtooth', 'Butterworth 2', SAWTOOTH, BUTTERWORTH_2, 0.181141613793829],
    ['square', 'Butterworth 2', SQUARE, BUTTERWORTH_2, 0.053483492190715],
  ])('gives the THD of a %s behind %s', (_, __, series, h, thd) => {
    expect(outputThd(series, h)).toBeCloseTo(thd, 8);
  });

  it('turns phases and multiplies DC by H(0)', () => {
    const h = transferFunction([6], [1, 2]);
    const series = {
      frequencyHz: 2 * FREQUENCY,
      dc: -4,
      components: [
        { order: 1, rms: 10, phaseDeg: 170 },
        { order: 3, rms: 1, phaseDeg: null },
      ],
      restRms: 1,
    };
    const state = steadyStateOf(series, h);
    // H(j2) = 6/(2 + 2j) = 2.1213 at −45°, H(j6) = 6/(2 + 6j).
    expect(state).toEqual({
      isDefined: true,
      series: {
        frequencyHz: 2 * FREQUENCY,
        dc: -12,
        components: [
          { order: 1, rms: expect.closeTo(30 / Math.SQRT2, 10), phaseDeg: expect.closeTo(125, 10) },
          { order: 3, rms: expect.closeTo(6 / Math.sqrt(40), 10), phaseDeg: null },
        ],
      },
    });
  });

  it.each([
    ['unstable', [1, -37, -120], /^There is no steady state: the stage is unstable\. .*s = 40/],
    ['marginal', [1, 0, 25], /^There is no steady state: the stage is marginal\. .*± j5/],
  ])('gives the reason in place of a figure for a stage that is %s', (verdict, denominator, reason) => {
    const state = steadyStateOf(SQUARE, transferFunction([1], denominator));
    expect(state).toEqual({ isDefined: false, verdict, reason: expect.stringMatching(reason) });
  });
});

describe('twoLevelSteadyState', () => {
  const square = { high: 1, low: -1, duty: 0.5, frequencyHz: 1 };

  it('gives tanh(π/2) and its rms for a square wave with the cut-off at the fundamental', () => {
    // Closed form: extremes ± tanh(T/(4τ)), rms² = 1 − (4τ/T) tanh(T/(4τ)).
    const result = twoLevelSteadyState(square, 1 / (2 * Math.PI));
    expect(result.peak).toBeCloseTo(0.917152335667, 12);
    expect(result.minimum).toBeCloseTo(-0.917152335667, 12);
    expect(result.rms ** 2).toBeCloseTo(0.416122688841, 12);
    expect(result.mean).toBe(0);
  });

  it('keeps its digits where the period is short or long against τ', () => {
    // tanh x = x − x³/3 …: ripple of 10⁻⁶ at T/(4τ) = 10⁻⁶, and full level at 10³.
    expect(twoLevelSteadyState(square, 0.25e6).peak).toBeCloseTo(1e-6, 15);
    expect(twoLevelSteadyState(square, 0.25e-3).peak).toBe(1);
    // rms² = 1 − tanh(x)/x at x = T/(4τ) = 0.15.
    expect(twoLevelSteadyState(square, 1 / 0.6).rms ** 2).toBeCloseTo(1 - Math.tanh(0.15) / 0.15, 14);
    // rms of a small triangle of peak a: a/√3.
    expect(twoLevelSteadyState(square, 0.25e6).rms).toBeCloseTo(1e-6 / Math.sqrt(3), 17);
  });

  it('agrees with the sum of its Fourier series behind the same stage', () => {
    const pulse = { high: 5, low: 1, duty: 0.3, frequencyHz: 10 };
    const tau = 0.02;
    const closed = twoLevelSteadyState(pulse, tau);
    const state = steadyStateOf(twoLevelSeries(pulse, 4000), transferFunction([1], [tau, 1]));
    if (!state.isDefined) throw new Error(state.reason);
    const { dc, components } = state.series;
    const power = components.reduce((sum, { rms }) => sum + rms * rms, dc * dc);
    expect(closed.rms).toBeCloseTo(Math.sqrt(power), 9);
    expect(closed.mean).toBeCloseTo(dc, 12);
    closed.waveform(10).forEach((y, n) => {
      const sum = components.reduce(
        (total, { order, rms, phaseDeg }) =>
          total +
          Math.SQRT2 * rms * Math.cos((2 * Math.PI * order * n) / 10 + ((phaseDeg ?? 0) * Math.PI) / 180),
        dc,
      );
      expect(y).toBeCloseTo(sum, 3);
    });
  });

  it('peaks at the rising edge when high lies below low', () => {
    const result = twoLevelSteadyState({ ...square, high: -2, low: 1 }, 0.1);
    expect(result.peak).toBe(result.atRisingEdge);
    expect(result.minimum).toBe(result.atFallingEdge);
    expect(result.mean).toBeCloseTo(-0.5, 12);
  });

  it('refuses what is no wave', () => {
    expect(() => twoLevelSteadyState({ ...square, duty: 1 }, 1)).toThrow(/duty/);
    expect(() => twoLevelSteadyState({ ...square, frequencyHz: 0 }, 1)).toThrow(/frequency/);
    expect(() => twoLevelSteadyState(square, 0)).toThrow(/time constant/);
  });
});

describe('twoLevelSeries', () => {
  it('is the pulse train of the textbooks', () => {
    // Mean D, amplitude 2/(πh) |sin(πhD)|; phases −πhD.
    const { dc, components } = twoLevelSeries({ high: 1, low: 0, duty: 0.25, frequencyHz: 50 }, 8);
    expect(dc).toBe(0.25);
    components.slice(0, 3).forEach(({ order, rms, phaseDeg }) => {
      const sine = Math.sin((Math.PI * order) / 4);
      expect(rms * Math.SQRT2).toBeCloseTo((2 * sine) / (Math.PI * order), 12);
      expect(phaseDeg).toBeCloseTo(-45 * order, 10);
    });
    expect([components[3], components[7]].map((c) => [c!.rms, c!.phaseDeg])).toEqual([
      [0, null],
      [0, null],
    ]);
  });

  it('has only odd orders at half duty, in sine phase', () => {
    const { components } = twoLevelSeries({ high: 1, low: -1, duty: 0.5, frequencyHz: 50 }, 4);
    expect(components.map(({ rms }) => rms * Math.SQRT2)).toEqual([
      expect.closeTo(4 / Math.PI, 12),
      0,
      expect.closeTo(4 / (3 * Math.PI), 12),
      0,
    ]);
    expect(components.map(({ phaseDeg }) => phaseDeg)).toEqual([-90, null, expect.closeTo(-90, 10), null]);
  });
});
