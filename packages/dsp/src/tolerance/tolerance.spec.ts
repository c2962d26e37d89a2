import { describe, expect, it } from 'vitest';
import type { StageSpec } from '../circuits/stage-spec.js';
import { cornerStudy, MAX_CORNER_COMPONENTS } from './corners.js';
import { drawStudy } from './draws.js';
import type { ComponentSpread } from './spread.js';
import { spreadsOf, stageFigures } from './stage-figures.js';
import { smallestMeeting } from '../search/smallest-meeting.js';
import { marginToLimits, worstOrder } from './worst-order.js';

const spread = (nominal: number, tolerancePercent: number, name = 'R'): ComponentSpread => ({
  ...{ name, nominal, tolerancePercent },
});

describe('cornerStudy', () => {
  it('finds the range of a divider, whose ratio rises with one resistor and falls with the other', () => {
    // R2/(R1 + R2), both 1 kΩ ± 10 %: 900/2000 and 1100/2000.
    const { figures, corners } = cornerStudy([spread(1000, 10), spread(1000, 10)], ([a, b]) => [
      b! / (a! + b!),
    ]);
    expect(corners).toBe(4);
    expect(figures[0]).toEqual({
      nominal: 0.5,
      ...{ min: expect.closeTo(0.45, 12), max: expect.closeTo(0.55, 12) },
      ...{ minCorner: [1, -1], maxCorner: [-1, 1] },
    });
  });

  it('spends no corner on a component without tolerance, and counts corners without figures', () => {
    const study = cornerStudy([spread(1, 0), spread(4, 50)], ([a, b]) => [b! > 5 ? NaN : a! * b!]);
    expect(study).toMatchObject({ corners: 2, cornersWithout: 1, figures: [{ nominal: 4, min: 2, max: 4 }] });
  });

  it('refuses too many components and impossible tolerances', () => {
    const many = Array.from({ length: MAX_CORNER_COMPONENTS + 1 }, () => spread(1, 1));
    expect(() => cornerStudy(many, () => [0])).toThrow(/13 components .* up to 12.*use draws/);
    expect(() => cornerStudy([spread(1, 100, 'C')], () => [0])).toThrow(/C: the tolerance is 100 %/);
  });
});

describe('drawStudy', () => {
  const options = { draws: 20_000, seed: 5 };

  it('spreads uniformly over the tolerance', () => {
    const { figures, holding } = drawStudy([spread(100, 10)], ([x]) => [x!], {
      ...options,
      percentiles: [5, 95, 50],
      holds: (figures) => figures[0]! <= 105,
    });
    const [only] = figures;
    // Quantiles of the uniform distribution on 90 … 110; their standard error is 20 √(p(1 − p)/n).
    const error = (p: number) => 5 * 20 * Math.sqrt((p * (1 - p)) / options.draws);
    expect(Math.abs(only!.percentiles[0]! - 91)).toBeLessThan(error(0.05));
    expect(Math.abs(only!.percentiles[1]! - 109)).toBeLessThan(error(0.95));
    expect(only!.percentiles[2]).toBe(only!.median);
    expect(only!.min).toBeGreaterThanOrEqual(90);
    expect(only!.max).toBeLessThanOrEqual(110);
    // P = 0.75; the 95 % interval of Wilson about the share found, checked against its defining equation.
    const { share, lower, upper, count } = holding!;
    expect(count).toBe(share * options.draws);
    expect(Math.abs(share - 0.75)).toBeLessThan(5 * Math.sqrt((0.75 * 0.25) / options.draws));
    for (const p of [lower, upper]) {
      expect(Math.abs(share - p) / Math.sqrt((p * (1 - p)) / options.draws)).toBeCloseTo(1.959963985, 6);
    }
  });

  it('keeps a normal spread within the tolerance, its standard deviation a third of it', () => {
    const { figures } = drawStudy(
      [{ ...spread(0, 0), nominal: 100, tolerancePercent: 9, distribution: 'normal' }],
      ([x]) => [x!],
      {
        ...options,
        percentiles: [15.865525],
      },
    );
    // The normal distribution cut off at 3σ has its 15.87 % quantile at −0.9962σ (by its closed form: Φ(−3) + p(Φ(3) − Φ(−3))).
    expect(figures[0]!.percentiles[0]).toBeCloseTo(100 - 3 * 0.9962, 0);
    expect(figures[0]!.max).toBeLessThanOrEqual(109);
    expect(figures[0]!.min).toBeGreaterThanOrEqual(91);
  });

  it('is repeatable and refuses senseless numbers', () => {
    const run = (seed: number) => drawStudy([spread(1, 5)], ([x]) => [x!], { draws: 50, seed });
    expect(run(1)).toEqual(run(1));
    expect(run(1).figures).not.toEqual(run(2).figures);
    expect(run(1).holding).toBeNull();
    expect(() => drawStudy([], () => [], { draws: 0, seed: 1 })).toThrow(/draws is 0/);
    expect(() => drawStudy([], () => [], { draws: 1, seed: 0.5 })).toThrow(/seed is 0.5/);
    expect(() => drawStudy([], () => [], { draws: 1, seed: 1, percentiles: [101] })).toThrow(
      /percentile 101/,
    );
  });
});

describe('stageFigures', () => {
  const specs: StageSpec[] = [
    { kind: 'circuit', circuit: 'gain', values: { gain: 2 } },
    { kind: 'circuit', circuit: 'rc-low-pass', values: { resistanceOhm: 1000, capacitanceF: 1e-6 } },
  ];
  const places = [{ stage: 1, parameter: 'capacitanceF' }];
  const input = { frequencyHz: 50, dc: 0, components: [{ order: 3, rms: 10, phaseDeg: null }] };

  it('gives the extremes of an RC low-pass at the ends of its capacitor', () => {
    const spreads = spreadsOf(specs, [{ ...places[0]!, tolerancePercent: 20 }]);
    expect(spreads[0]).toEqual({ name: 'Stage 2: capacitanceF', nominal: 1e-6, tolerancePercent: 20 });
    const { figures } = cornerStudy(spreads, stageFigures(specs, places, input, [1000]));
    const behind = (farad: number, hertz: number) => 2 / Math.hypot(1, 2 * Math.PI * hertz * 1000 * farad);
    expect(figures[0]!.min).toBeCloseTo(10 * behind(1.2e-6, 150), 12);
    expect(figures[0]!.max).toBeCloseTo(10 * behind(0.8e-6, 150), 12);
    expect(figures[1]!.max).toBeCloseTo(behind(0.8e-6, 1000), 12);
  });

  it('names a place without such a value', () => {
    expect(() => spreadsOf(specs, [{ stage: 1, parameter: 'inductanceH', tolerancePercent: 1 }])).toThrow(
      /Stage 2 has no value "inductanceH"/,
    );
    expect(() => spreadsOf(specs, [{ stage: 5, parameter: 'gain', tolerancePercent: 1 }])).toThrow(
      /no stage 6/,
    );
  });
});

describe('worstOrder', () => {
  it('is the one nearest to its limit', () => {
    expect(worstOrder([3, 9, null, 1], [4, 10, 1, null])).toEqual({ index: 1, ratio: 0.9 });
    expect(worstOrder([1], [null])).toBeNull();
  });
});

describe('marginToLimits', () => {
  it('is what the worst figure has left', () => {
    expect(marginToLimits([3, 9, 7], [4, 10, null])).toBeCloseTo(0.1, 12);
    expect(marginToLimits([NaN, 1], [1, 1])).toBeNaN();
    expect(marginToLimits([5], [null])).toBe(Infinity);
  });

  it('finds the smallest capacitor that keeps an order below its limit', () => {
    const specs: StageSpec[] = [
      { kind: 'circuit', circuit: 'rc-low-pass', values: { resistanceOhm: 1000, capacitanceF: 1e-6 } },
    ];
    const input = { frequencyHz: 50, dc: 0, components: [{ order: 5, rms: 10, phaseDeg: null }] };
    const figures = stageFigures(specs, [{ stage: 0, parameter: 'capacitanceF' }], input);
    const result = smallestMeeting((farad) => marginToLimits(figures(Float64Array.of(farad)), [2]), {
      ...{ from: 1e-9, to: 1e-3, scale: 'logarithmic' },
    });
    // 10/√(1 + (ωRC)²) = 2: ωRC = √24.
    const wanted = Math.sqrt(24) / (2 * Math.PI * 250 * 1000);
    expect(result).toMatchObject({ isFound: true, value: expect.closeTo(wanted, 13) });
  });
});
