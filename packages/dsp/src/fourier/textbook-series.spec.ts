import { describe, expect, it } from 'vitest';
import { partialSum } from './partial-sum.js';
import { textbookSeries, type TextbookShape } from './textbook-series.js';

const amplitude = 3;
const frequencyHz = 50;
const sine = (t: number) => Math.sin(2 * Math.PI * t);

/** The waves themselves over one cycle, t from 0 to 1. */
const waves: Record<TextbookShape, (t: number) => number> = {
  sine,
  square: (t) => (t < 0.5 ? 1 : -1),
  triangle: (t) => (2 / Math.PI) * Math.asin(sine(t)),
  sawtooth: (t) => (t < 0.5 ? 2 * t : 2 * t - 2),
  pulse: (t) => (t < 0.3 ? 1 : 0),
  'half-wave': (t) => Math.max(0, sine(t)),
  'full-wave': (t) => Math.abs(sine(t)),
  // Phase a of a bridge with smooth direct current: 120° blocks in the middle of each half cycle.
  'six-pulse': (t) => (t > 1 / 12 && t < 5 / 12 ? 1 : t > 7 / 12 && t < 11 / 12 ? -1 : 0),
};

describe.each(Object.entries(waves) as [TextbookShape, (t: number) => number][])('%s', (shape, wave) => {
  const series = textbookSeries({ shape, amplitude, frequencyHz, dutyPercent: 30, maxOrder: 400 });

  it('adds up to the wave away from its edges', () => {
    const sum = partialSum(series, 400, 200);
    // 7/200 of the cycle from any edge the remainder of 1/h series is below 2/(π · 400 · sin(π · 7/200)) of the jump.
    for (const n of [8, 9, 37, 38, 75, 76, 125, 126, 170, 192]) {
      expect(Math.abs(sum[n]! - amplitude * wave(n / 200))).toBeLessThan(0.02 * amplitude);
    }
  });

  it('has the mean square of the wave (Parseval)', () => {
    const points = 120_000;
    let square = 0;
    for (let n = 0; n < points; n++) square += (amplitude * wave((n + 0.5) / points)) ** 2 / points;
    const ofOrders = series.components.reduce((total, { rms }) => total + rms ** 2, series.dc ** 2);
    expect(Math.abs(ofOrders - square)).toBeLessThan(0.002 * square);
  });
});

it('has the orders 6k ± 1 of a six-pulse bridge at 1/h of the fundamental 2√3/π (Arrillaga and Watson, 3.2)', () => {
  const { components } = textbookSeries({ shape: 'six-pulse', amplitude, frequencyHz, maxOrder: 25 });
  const fundamental = components[0]!.rms;
  expect(fundamental).toBeCloseTo((amplitude * 2 * Math.sqrt(3)) / Math.PI / Math.SQRT2, 12);
  const held = components.filter(({ rms }) => rms > 0);
  expect(held.map(({ order }) => order)).toEqual([1, 5, 7, 11, 13, 17, 19, 23, 25]);
  for (const { order, rms } of held) expect(rms * order).toBeCloseTo(fundamental, 12);
});
