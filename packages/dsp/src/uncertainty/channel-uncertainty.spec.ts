import { describe, expect, it } from 'vitest';
import { seededNoise } from '../../test/seeded-noise.js';
import { thdF } from '../figures/distortion.js';
import { fitHarmonics } from '../harmonics/fit-harmonics.js';
import type { Uncertainty, UncertaintySource } from '../types.js';
import { channelUncertainty, type UncertaintyInput } from './channel-uncertainty.js';
import { toneUncertainty } from './tone-uncertainty.js';

/*
 * Monte Carlo checks in the sense of JCGM 101:2008: records with known noise are drawn many times (seeded), figures taken
 * from each, and their standard deviation compared with the standard uncertainty that was predicted. The standard
 * deviation of n draws is itself known to 1/√(2n): 2.2 % for 1000.
 */
const RATE = 10_000;
const HZ = 50;

const base: UncertaintyInput = {
  sampleRateHz: RATE,
  sampleCount: 1000,
  accuracy: null,
  quantisationStep: null,
  mean: null,
  rms: null,
  residualRms: 0,
  fundamental: { frequencyHz: HZ, frequencyUncertaintyHz: null },
  lineRms: [],
  thdMaxOrder: 40,
  windows: null,
};

function standardOf(uncertainty: Uncertainty | null | undefined, source: UncertaintySource): number {
  return uncertainty?.contributors.find((c) => c.source === source)?.standard ?? 0;
}

function deviationOf(values: number[]): number {
  const mean = values.reduce((sum, x) => sum + x, 0) / values.length;
  return Math.sqrt(values.reduce((sum, x) => sum + (x - mean) ** 2, 0) / (values.length - 1));
}

/** Records of √2 X_h cos(h ωt + φ) plus what `change` makes of each sample. */
function record(lineRms: number[], count: number, phase: number, change: (x: number, n: number) => number) {
  return Float64Array.from({ length: count }, (_, n) => {
    const angle = (2 * Math.PI * HZ * n) / RATE + phase;
    return change(
      lineRms.reduce((x, rms, i) => x + Math.SQRT2 * rms * Math.cos((i + 1) * angle), 0),
      n,
    );
  });
}

describe('uncertainty of a channel', () => {
  const lineRms = [100, 0, 8, 0, 5];

  it('of the instrument is in percent of reading, and cancels in THD', () => {
    const { figures, orders } = channelUncertainty({
      ...base,
      lineRms,
      rms: 100.44,
      mean: -2,
      residualRms: 1e-9,
      accuracy: { readingPercent: 0.2, calibrationPercent: 0.1 },
    });
    expect(figures['fundamental.rms']!.expanded).toBeCloseTo(2 * Math.hypot(0.05, 0.2 / Math.sqrt(3)), 9);
    expect(orders[2]!.expanded / figures['fundamental.rms']!.expanded).toBeCloseTo(0.08, 9);
    expect(standardOf(figures.rms, 'accuracy')).toBeCloseTo(0.20088 / Math.sqrt(3), 9);
    expect(standardOf(figures.mean, 'calibration')).toBeCloseTo(0.001, 12);
    expect(figures.thdFPercent!.contributors.map(({ source }) => source)).toEqual(['noise']);
    expect(figures.thdFPercent!.expanded).toBeLessThan(1e-8);
  });

  it('of white noise is what a Monte Carlo calculation finds for rms, mean, lines and THD', () => {
    const draws = 1000;
    const sigma = 2;
    const noise = seededNoise(draws * base.sampleCount, 21);
    const figures = { rms: [], mean: [], first: [], third: [], thd: [] } as Record<string, number[]>;
    for (let k = 0; k < draws; k++) {
      const samples = record(
        lineRms,
        base.sampleCount,
        0.7,
        (x, n) => x + sigma * noise[k * base.sampleCount + n]!,
      );
      const fit = fitHarmonics(samples, RATE, HZ, 5);
      figures.rms!.push(Math.sqrt(samples.reduce((sum, x) => sum + x * x, 0) / samples.length));
      figures.mean!.push(fit.dc);
      figures.first!.push(fit.harmonics[0]!.rms);
      figures.third!.push(fit.harmonics[2]!.rms);
      figures.thd!.push(
        100 *
          thdF(
            fit.harmonics.map((h) => h.rms),
            5,
          )!,
      );
    }
    const predicted = channelUncertainty({
      ...base,
      lineRms,
      rms: 100.44,
      mean: 0,
      residualRms: sigma,
      thdMaxOrder: 5,
    });
    const ratio = (values: number[], uncertainty: Uncertainty | null) =>
      standardOf(uncertainty, 'noise') / deviationOf(values);
    expect(ratio(figures.rms!, predicted.figures.rms!)).toBeCloseTo(1, 1);
    expect(ratio(figures.mean!, predicted.figures.mean!)).toBeCloseTo(1, 1);
    expect(ratio(figures.first!, predicted.orders[0]!)).toBeCloseTo(1, 1);
    expect(ratio(figures.third!, predicted.orders[2]!)).toBeCloseTo(1, 1);
    expect(ratio(figures.thd!, predicted.figures.thdFPercent!)).toBeCloseTo(1, 1);
    // ∂THD_R/∂THD_F = (1 + T²)^(−3/2).
    const t = Math.hypot(8, 5) / 100;
    expect(predicted.figures.thdRPercent!.expanded / predicted.figures.thdFPercent!.expanded).toBeCloseTo(
      (1 + t * t) ** -1.5,
      12,
    );
  });

  it('of an order lost in noise reaches down to nothing', () => {
    const { orders } = channelUncertainty({ ...base, lineRms: [100, 0.05], residualRms: 2 });
    // The line reads 0.05 where noise alone reads √2·2/√1000 = 0.089.
    expect(orders[1]!.expanded).toBeGreaterThan(0.05);
  });

  /** Errors of order 3 over records of 1000 samples of a quantised wave with noise. */
  function codedErrors(frequencyHz: number, sigma: number): number[] {
    const draws = 500;
    const phases = seededNoise(draws, 8);
    const noise = seededNoise(draws * base.sampleCount, 9);
    return Array.from({ length: draws }, (_, k) => {
      const samples = Float64Array.from({ length: base.sampleCount }, (_, n) => {
        const angle = (2 * Math.PI * frequencyHz * n) / RATE + 10 * phases[k]!;
        const x = (60 + 0.37 * k) * Math.cos(angle) + 7 * Math.SQRT2 * Math.cos(3 * angle);
        return Math.round(x + sigma * noise[k * base.sampleCount + n]!);
      });
      return fitHarmonics(samples, RATE, frequencyHz, 3).harmonics[2]!.rms - 7;
    });
  }

  const coded = (residualRms: number) =>
    channelUncertainty({ ...base, lineRms: [100, 0, 7], residualRms, quantisationStep: 1 }).orders[2]!;

  it('of a converter is its step/√12 over all samples when noise makes its errors independent', () => {
    const sigma = 0.5;
    const uncertainty = coded(Math.hypot(sigma, 1 / Math.sqrt(12)));
    expect(standardOf(uncertainty, 'quantisation')).toBeCloseTo(1 / Math.sqrt(12 * 1000), 5);
    // The residual holds the quantisation as well.
    expect(standardOf(uncertainty, 'noise') / deviationOf(codedErrors(HZ, sigma))).toBeCloseTo(1, 1);
  });

  it('of a converter is its step/√12 over half a cycle when a clean wave is in step with the sampling', () => {
    const standard = standardOf(coded(1 / Math.sqrt(12)), 'quantisation');
    expect(standard).toBeCloseTo(1 / Math.sqrt(12 * 100), 5);
    expect(standard / deviationOf(codedErrors(HZ, 0))).toBeCloseTo(1, 1);
    expect(standard).toBeGreaterThan(2 * deviationOf(codedErrors(50.37, 0)));
  });

  it('of the frequency is the Cramér-Rao bound, with k = 2, and not given when it drifts', () => {
    const steady = { frequencyHz: HZ, frequencyUncertaintyHz: 2e-4 };
    const { figures } = channelUncertainty({ ...base, lineRms, fundamental: steady, residualRms: 1 });
    expect(figures['fundamental.frequencyHz']).toEqual({
      expanded: 4e-4,
      coverageFactor: 2,
      contributors: [{ source: 'fit', standard: 2e-4 }],
    });
    expect(
      channelUncertainty({ ...base, lineRms, residualRms: 1 }).figures['fundamental.frequencyHz'],
    ).toBeUndefined();
  });

  it('of the rms over a broken cycle bounds what the phase makes of it', () => {
    const count = 1050;
    const values = Array.from({ length: 360 }, (_, degrees) => {
      const samples = record([100], count, (degrees * Math.PI) / 180, (x) => x);
      return Math.sqrt(samples.reduce((sum, x) => sum + x * x, 0) / count);
    });
    const { figures } = channelUncertainty({ ...base, sampleCount: count, lineRms: [100], rms: 100 });
    expect(standardOf(figures.rms, 'synchronisation') / deviationOf(values)).toBeCloseTo(1, 1);
    expect(channelUncertainty({ ...base, lineRms: [100], rms: 100 }).figures.rms?.expanded ?? 0).toBeLessThan(
      1e-12,
    );
  });
});

describe('uncertainty of figures from windows', () => {
  const series = (count: number, rows: number[][], centred: number[][] = []) => ({
    count,
    flagged: new Uint8Array(count),
    rms: Float64Array.from({ length: count }, () => 100),
    thd: Float64Array.from({ length: count }, () => 8),
    line: Float64Array.from(rows.flat()),
    centredSubgroup: Float64Array.from(centred.flat()),
  });
  const windows = (rows: number[][], centred?: number[][]) => ({
    cycles: 10,
    synchronisationErrorPercent: null,
    series: series(rows[0]!.length, rows, centred),
  });

  // t of 95 % with 7 degrees of freedom is 2.365: with the factor √(7/5) = 1.183 in it, k = 2 comes to 2.366.
  it('covers the true value in 95 of 100 cases, also with few windows', () => {
    const draws = 3000;
    const noise = seededNoise(8 * draws, 31);
    let covered = 0;
    for (let k = 0; k < draws; k++) {
      const row = Array.from({ length: 8 }, (_, j) => 100 + noise[8 * k + j]!);
      const rms = Math.sqrt(row.reduce((sum, x) => sum + x * x, 0) / 8);
      const { orders } = channelUncertainty({ ...base, lineRms: [rms], windows: windows([row]) });
      if (Math.abs(rms - 100) <= orders[0]!.expanded) covered++;
    }
    expect(covered / draws).toBeGreaterThan(0.94);
    expect(covered / draws).toBeLessThan(0.96);
  });

  it('counts the noise beside a line as part of what it reads', () => {
    // Seven lines between the orders hold 0.7 together: 0.7/√7 each, on both sides.
    const row = [1, 1, 1, 1];
    const centred = [0.7, 0.7, 0.7, 0.7];
    const rows = windows([row], [centred, centred]);
    const { orders } = channelUncertainty({ ...base, lineRms: [1], windows: rows });
    expect(standardOf(orders[0], 'noise')).toBeCloseTo((1 - Math.sqrt(1 - 0.07)) / Math.sqrt(3), 12);
    // Of the highest order, the lines above may lie beyond half the sample rate.
    const oneSided = channelUncertainty({ ...base, lineRms: [1], windows: windows([row], [centred]) });
    expect(oneSided.orders[0]).toEqual(orders[0]);
  });

  it('of THD is the scatter of the windows in percent', () => {
    const rows = windows([[100, 100, 100, 100]]);
    rows.series.thd = Float64Array.of(7.9, 8.1, 7.9, 8.1);
    const { figures } = channelUncertainty({ ...base, lineRms: [100, 8], windows: rows });
    // s = 0.1·√(4/3), s/√4, and √3 for four values.
    expect(standardOf(figures.thdFPercent, 'noise')).toBeCloseTo(0.1, 4);
  });

  it('falls back to the residual of the fit below four windows', () => {
    const { orders } = channelUncertainty({
      ...base,
      lineRms: [100],
      residualRms: 2,
      windows: windows([[99, 101, 100]]),
    });
    expect(standardOf(orders[0], 'noise')).toBeCloseTo(2 / Math.sqrt(1000), 4);
  });

  // A window of 10 cycles and 0.03 %, computed line by line as a sum over 4000 samples.
  it('bounds loss and leakage of windows that miss whole cycles', () => {
    const error = 3e-4;
    const count = 4000;
    const lineRms = Array.from({ length: 40 }, (_, i) => (i === 0 ? 100 : i === 39 ? 3 : 0));
    const reading = (order: number, phase: number) => {
      let [re, im] = [0, 0];
      for (let n = 0; n < count; n++) {
        const angle = (2 * Math.PI * 10 * n) / count;
        const turned = angle * (1 + error) + phase;
        const x = Math.SQRT2 * (100 * Math.cos(turned) + 3 * Math.cos(40 * turned));
        re += x * Math.cos(order * angle);
        im += x * Math.sin(order * angle);
      }
      return (Math.SQRT2 * Math.hypot(re, im)) / count;
    };
    const { orders } = channelUncertainty({
      ...base,
      lineRms,
      windows: {
        ...windows(lineRms.map((rms) => [rms, rms, rms, rms])),
        synchronisationErrorPercent: 100 * error,
      },
    });
    for (const order of [1, 2, 3, 10, 40]) {
      const misses = Array.from({ length: 12 }, (_, k) =>
        Math.abs(reading(order, k / 2) - lineRms[order - 1]!),
      );
      const expanded = orders[order - 1]!.expanded;
      expect(Math.max(...misses)).toBeLessThan(expanded);
      expect(Math.max(...misses)).toBeGreaterThan(0.2 * expanded);
    }
    // IEC 61000-4-7, 4.4.1: at ±0.03 % a single line of order 40 reads 2.35 % low.
    expect(3 - Math.min(reading(40, 0), reading(40, 1.5))).toBeCloseTo(0.0235 * 3, 2);
  });
});

describe('uncertainty of single-tone figures', () => {
  it('is what a Monte Carlo calculation finds for SINAD, SNR, THD+N and ENOB', () => {
    const draws = 1000;
    const count = 1000;
    const noise = seededNoise(draws * count, 77);
    const drawn = { sinadDb: [], snrDb: [], thdPlusNPercent: [] } as Record<string, number[]>;
    for (let k = 0; k < draws; k++) {
      const samples = record([1, 0, 0.2], count, 0.3, (x, n) => x + 0.5 * noise[k * count + n]!);
      const [, second, third] = fitHarmonics(samples, RATE, HZ, 3).harmonics;
      const tone = fitHarmonics(samples, RATE, HZ, 1);
      const total = samples.reduce((sum, x) => sum + x * x, 0) / count - tone.dc ** 2;
      const power = tone.harmonics[0]!.rms ** 2;
      const rest = total - power;
      drawn.sinadDb!.push(10 * Math.log10(power / rest));
      drawn.snrDb!.push(10 * Math.log10(power / (rest - second!.rms ** 2 - third!.rms ** 2)));
      drawn.thdPlusNPercent!.push(100 * Math.sqrt(rest / total));
    }
    const powers = {
      ...{ sampleCount: count, sampleRateHz: RATE, frequencyHz: HZ, dc: 0, tone: 1 },
      harmonics: [null, { frequencyHz: 150, power: 0.04 }],
      noiseAndDistortion: 0.29,
      noise: 0.25,
      bandNoiseAndDistortion: null,
      noiseDensitySquared: 0,
      spurs: [{ frequencyHz: 800, power: 1e-3 }],
    };
    const predicted = toneUncertainty(powers);
    for (const [name, values] of Object.entries(drawn)) {
      expect(predicted[name]!.expanded / 2 / deviationOf(values)).toBeCloseTo(1, 1);
    }
    expect(predicted.enobBits!.expanded / predicted.sinadDb!.expanded).toBeCloseTo(1 / 6.0206, 4);
    // Lines of 0.04 and 1 in noise of 0.25/1000 each way; without the harmonic nothing stands out.
    expect(predicted.sfdrDb!.expanded).toBeCloseTo((20 / Math.LN10) * Math.sqrt(1e-3 / 0.04 + 1e-3), 9);
    expect(toneUncertainty({ ...powers, harmonics: [] }).sfdrDb).toBeUndefined();
  });

  it('knows nothing of a tone without noise', () => {
    const powers = {
      sampleCount: 10,
      sampleRateHz: 1,
      frequencyHz: 0.1,
      dc: 0,
      tone: 1,
      harmonics: [],
      spurs: [],
    };
    expect(
      toneUncertainty({
        ...powers,
        noiseAndDistortion: 0,
        noise: 0,
        bandNoiseAndDistortion: null,
        noiseDensitySquared: 0,
      }),
    ).toEqual({});
  });
});
