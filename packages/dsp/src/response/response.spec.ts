import { describe, expect, it } from 'vitest';
import { seriesFigures } from '../fourier/series-figures.js';
import { undrawnOrders, waveformOf } from '../fourier/waveform.js';
import { groupDelay, unwrappedPhase } from '../transfer/group-delay.js';
import { frequencyResponse } from '../transfer/frequency-response.js';
import { naturalModes } from '../transfer/natural-modes.js';
import { logFrequencies, resonancePeaks } from '../transfer/resonance.js';
import { transferFunction } from '../transfer/transfer-function.js';
import { twoLevelSteadyState } from '../transfer/two-level-steady-state.js';
import { twoLevelSeries } from '../transfer/two-level-wave.js';
import { resonanceWarnings } from './resonance-warnings.js';
import { harmonicsThroughStages } from './through-stages.js';

const [zeta, omega] = [0.1, 2 * Math.PI * 250];
const resonant = transferFunction([omega ** 2], [1, 2 * zeta * omega, omega ** 2]);

describe('harmonicsThroughStages', () => {
  it('draws a square wave behind 1/(τs + 1) as its exponentials, within the orders left out', () => {
    const wave = { high: 3, low: -1, duty: 0.3, frequencyHz: 50 };
    const tau = 0.004;
    const orders = 200;
    const result = harmonicsThroughStages(twoLevelSeries(wave, orders), transferFunction([1], [tau, 1]));
    if (!result.isDefined) throw new Error(result.reason);
    const exact = twoLevelSteadyState(wave, tau).waveform(1000);
    // Left out: Σ_{h>N} 2·4/(πh)/(hω0τ) ≤ 8/(πω0τ N), since Σ_{h>N} 1/h² < 1/N.
    const bound = 8 / (Math.PI * 2 * Math.PI * wave.frequencyHz * tau * orders);
    expect(result.waveform.output).toHaveLength(2000);
    result.waveform.output.forEach((y, n) => {
      expect(Math.abs(y - exact[n % 1000]!)).toBeLessThan(bound);
    });
    expect(result.waveform.timeS[1999]).toBeCloseTo(0.04 - 0.02 / 1000, 12);
    expect(result.output.rms).toBeCloseTo(twoLevelSteadyState(wave, tau).rms, 5);
    expect(result.orders[6]).toMatchObject({ order: 7, frequencyHz: 350 });
    expect(result.orders[6]!.gain).toBeCloseTo(1 / Math.hypot(1, 2 * Math.PI * 350 * tau), 12);
  });

  it('multiplies stages, a delay among them', () => {
    const input = { frequencyHz: 50, dc: 0, components: [{ order: 1, rms: 10, phaseDeg: 0 }] };
    const low = transferFunction([1], [1 / (2 * Math.PI * 50), 1]);
    const result = harmonicsThroughStages(input, [low, low, transferFunction([1], [1], 0.005)]);
    if (!result.isDefined) throw new Error(result.reason);
    // −45° twice and a quarter of a period.
    expect(result.series.components[0]!.rms).toBeCloseTo(5, 12);
    expect(Math.abs(result.series.components[0]!.phaseDeg!)).toBeCloseTo(180, 10);
  });

  it('says why there is no steady state, and what is wrong with a series', () => {
    const input = { frequencyHz: 50, dc: 0, components: [{ order: 1, rms: 10, phaseDeg: 0 }] };
    const stages = [resonant, transferFunction([1], [1, 0])];
    const result = harmonicsThroughStages(input, stages);
    expect(result).toMatchObject({ isDefined: false, verdict: 'marginal' });
    const twice = { ...input, components: [...input.components, ...input.components] };
    expect(() => harmonicsThroughStages(twice, resonant)).toThrow(/order 1 is given twice/);
    expect(() => harmonicsThroughStages({ ...input, frequencyHz: 0 }, resonant)).toThrow(/greater than 0/);
  });
});

describe('seriesFigures', () => {
  it('knows the crest factors of textbook waves', () => {
    // Two orders in phase: peak √2 (1 + 0.5), rms √1.25.
    const components = [
      { order: 1, rms: 1, phaseDeg: 0 },
      { order: 2, rms: 0.5, phaseDeg: 0 },
    ];
    const figures = seriesFigures({ frequencyHz: 50, dc: 0, components }, 40);
    expect(figures.thdF).toBeCloseTo(0.5, 12);
    expect(figures.thdR).toBeCloseTo(0.5 / Math.sqrt(1.25), 12);
    expect(figures.crestFactor).toBeCloseTo((Math.SQRT2 * 1.5) / Math.sqrt(1.25), 10);
    // The peak of a sine lies between any points: √2 all the same.
    const turned = { frequencyHz: 50, dc: 0, components: [{ order: 3, rms: 7, phaseDeg: 37 }] };
    expect(seriesFigures(turned, 40).crestFactor).toBeCloseTo(Math.SQRT2, 12);
    const unknown = [components[0]!, { order: 2, rms: 0.5, phaseDeg: null }];
    expect(seriesFigures({ frequencyHz: 50, dc: 0, components: unknown }, 40)).toMatchObject({
      ...{ peak: null, crestFactor: null, fundamentalRms: 1 },
    });
    expect(undrawnOrders({ frequencyHz: 50, dc: 0, components: unknown })).toEqual([2]);
  });
});

describe('waveformOf', () => {
  it('draws the orders chosen, over several cycles', () => {
    const series = {
      ...{ frequencyHz: 100, dc: 4 },
      components: [1, 2, 3].map((order) => ({ order, rms: 1, phaseDeg: 90 })),
    };
    const { values, timeS } = waveformOf(series, { orders: new Set([0, 3]), pointsPerCycle: 12, cycles: 3 });
    expect(values).toHaveLength(36);
    values.forEach((y, n) => expect(y).toBeCloseTo(4 - Math.SQRT2 * Math.sin((Math.PI * n) / 2), 12));
    expect(timeS[35]).toBeCloseTo(35 / 1200, 12);
    expect(() => waveformOf(series, { pointsPerCycle: 12, cycles: 0 })).toThrow(/at least 1/);
  });
});

describe('resonancePeaks', () => {
  it('finds frequency, gain and Q of a second-order stage', () => {
    const [peak, ...others] = resonancePeaks(resonant);
    expect(others).toEqual([]);
    // Peak at ω0 √(1 − 2ζ²), 1/(2ζ√(1 − ζ²)).
    expect(peak!.frequencyHz).toBeCloseTo(250 * Math.sqrt(1 - 2 * zeta ** 2), 4);
    expect(peak!.gain).toBeCloseTo(1 / (2 * zeta * Math.sqrt(1 - zeta ** 2)), 10);
    expect(peak!.poleQuality).toBeCloseTo(5, 8);
    // Half-power points: (ω/ω0)² = 1 − 2ζ² ± 2ζ√(1 − ζ²).
    const half = [1, -1].map((sign) =>
      Math.sqrt(1 - 2 * zeta ** 2 + sign * 2 * zeta * Math.sqrt(1 - zeta ** 2)),
    );
    expect(peak!.quality).toBeCloseTo(Math.sqrt(1 - 2 * zeta ** 2) / (half[0]! - half[1]!), 6);
  });

  it('meets a resonance narrower than any grid, and none where there is none', () => {
    const narrow = transferFunction([1], [1, 2e-8, 1]);
    const [peak] = resonancePeaks(narrow);
    expect(peak!.gain / 5e7).toBeCloseTo(1, 3);
    expect(resonancePeaks(transferFunction([1], [1, 2, 1]))).toEqual([]);
    // Butterworth: flat, no peak.
    expect(resonancePeaks(transferFunction([1], [1, Math.SQRT2, 1]))).toEqual([]);
    expect(resonancePeaks(transferFunction([5], [1]))).toEqual([]);
  });
});

describe('resonanceWarnings', () => {
  it('names the orders near a strong peak', () => {
    const peaks = resonancePeaks(resonant);
    const warnings = resonanceWarnings([7, 5, 3], 50, peaks, { bandPercent: 5, leastGain: 2 });
    expect(warnings).toMatchObject([
      { order: 5, frequencyHz: 250, peak: { gain: expect.closeTo(5.0252, 4) } },
    ]);
    expect(warnings[0]!.distancePercent).toBeCloseTo(100 * (1 / Math.sqrt(1 - 2 * zeta ** 2) - 1), 5);
    expect(resonanceWarnings([5], 50, peaks, { bandPercent: 5, leastGain: 6 })).toEqual([]);
    expect(resonanceWarnings([5], 50, peaks, { bandPercent: 0.5, leastGain: 2 })).toEqual([]);
  });
});

describe('naturalModes', () => {
  it('describes a pair and a real pole', () => {
    const modes = naturalModes([resonant, transferFunction([1], [0.1, 1])], 5);
    expect(modes[0]).toMatchObject({ timeConstantS: expect.closeTo(0.1, 12), oscillationFrequencyHz: 0 });
    expect(modes[0]!.settlingTimeS).toBeCloseTo(0.1 * Math.log(20), 12);
    expect(modes[1]).toMatchObject({
      naturalFrequencyHz: expect.closeTo(250, 9),
      dampingRatio: expect.closeTo(zeta, 12),
      oscillationFrequencyHz: expect.closeTo(250 * Math.sqrt(1 - zeta ** 2), 9),
    });
    expect(naturalModes(transferFunction([1], [1, -2]))[0]).toMatchObject({
      dampingRatio: -1,
      settlingTimeS: null,
    });
  });
});

describe('groupDelay', () => {
  it('is τ/(1 + (ωτ)²) for a first-order stage, and delays add', () => {
    const h = transferFunction([2], [0.01, 1], 0.003);
    const [atZero, at50] = groupDelay([h, h], [0, 50]);
    expect(atZero).toBeCloseTo(0.026, 14);
    expect(at50).toBeCloseTo(0.006 + 0.02 / (1 + (100 * Math.PI * 0.01) ** 2), 14);
    expect(groupDelay(transferFunction([1], [1, 0]), [0])).toEqual([null]);
  });

  it('is the slope of the unwrapped phase', () => {
    const h = [resonant, transferFunction([1], [1], 0.02)];
    const frequencies = Array.from({ length: 2001 }, (_, i) => 200 + i * 0.05);
    const phases = unwrappedPhase(frequencyResponse(h, frequencies));
    expect(phases.at(-1)!).toBeLessThan(-800);
    const slope = -(phases[1001]! - phases[999]!) / 360 / 0.1;
    expect(groupDelay(h, [frequencies[1000]!])[0]).toBeCloseTo(slope, 7);
  });
});

describe('logFrequencies', () => {
  it('holds both ends', () => {
    const grid = logFrequencies(1, 1000, 10);
    expect([grid[0], grid[10], grid.at(-1), grid.length]).toEqual([1, expect.closeTo(10, 12), 1000, 31]);
  });
});
