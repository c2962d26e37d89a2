import { describe, expect, it } from 'vitest';
import { seededNoise } from '../../test/seeded-noise.js';
import { createRealFftPlan } from '../fft/real-fft-plan.js';
import { createKernelWindowLines } from './kernel-window-lines.js';
import { createPlainWindowLines } from './plain-window-lines.js';
import { createWindowLines, lineRms } from './window-lines.js';
import type { WindowLinePlan, WindowShape } from './window-shape.js';

function linesOf(plan: WindowLinePlan, samples: Float64Array, start = 0) {
  const [cosine, sine, rms] = [1, 2, 3].map(() => new Float64Array(plan.lineCount)) as [
    Float64Array,
    Float64Array,
    Float64Array,
  ];
  const totalRms = plan.amplitudes(samples, start, cosine, sine, rms);
  return { cosine, sine, rms, totalRms };
}

const amplitudeOf = (order: number) => 10 / (order * order + 1);
const phaseOf = (order: number) => order * order * 0.4;

/** DC and orders of a fundamental with `cycles` periods in `windowSamples`, phases at the first sample. */
function distorted(length: number, windowSamples: number, cycles: number, orders: number): Float64Array {
  return Float64Array.from({ length }, (_, n) => {
    let x = -3;
    for (let h = 1; h <= orders; h++) {
      x += amplitudeOf(h) * Math.cos((2 * Math.PI * h * cycles * n) / windowSamples + phaseOf(h));
    }
    return x;
  });
}

describe('createWindowLines', () => {
  // Closed form: the amplitudes and phases put in, nothing on the other lines.
  it.each([
    ['50 kHz, 49.973 Hz', 10_005, 10_005.403, 10, 50],
    ['one sample shorter than the window', 10_005, 10_005.5, 10, 50],
    ['a whole number of samples', 10_000, 10_000, 10, 50],
    ['5 kHz, orders nearly to half the rate', 1001, 1000.6, 10, 49],
    ['12 cycles of 60 Hz', 2000, 2000.4, 12, 40],
    ['200 kHz', 39_987, 39_987.2, 10, 50],
  ])('finds the orders: %s', (_, sampleCount, windowSamples, cycles, orders) => {
    const start = 7;
    const samples = distorted(sampleCount + 20, windowSamples, cycles, orders);
    const plan = createWindowLines(sampleCount, windowSamples, cycles, orders);
    const { cosine, sine, rms } = linesOf(plan, samples, start);
    const centre = start + (sampleCount - 1) / 2;
    lineRms(cosine, sine).forEach((value, k) => expect(Math.abs(rms[k]! - value)).toBeLessThan(1e-14));
    expect(cosine[0]).toBeCloseTo(-3, 11);
    for (let k = 1; k < plan.lineCount; k++) {
      const order = k / cycles;
      if (!Number.isInteger(order)) {
        expect(rms[k]).toBeLessThan(1e-11);
        continue;
      }
      expect(Math.SQRT2 * rms[k]!).toBeCloseTo(amplitudeOf(order), 11);
      const phase = Math.atan2(-sine[k]!, cosine[k]!) - ((2 * Math.PI * k) / windowSamples) * centre;
      expect(amplitudeOf(order) * Math.sin(phase - phaseOf(order))).toBeCloseTo(0, 9);
      expect(Math.cos(phase - phaseOf(order))).toBeGreaterThan(0);
    }
  });

  // Outside truth: for whole samples the lines are those of the DFT (IEC 61000-4-7, 3.1.1).
  it.each([2000, 2002, 4999])('equals the DFT of %i samples, to half the sample rate', (count) => {
    const samples = seededNoise(count, count);
    const plan = createWindowLines(count, count, 10, 10, count);
    const dft = createRealFftPlan(count);
    const [re, im] = [new Float64Array(dft.lineCount), new Float64Array(dft.lineCount)];
    dft.forward(samples, re, im);
    const { cosine, sine } = linesOf(plan, samples);
    expect(plan.lineCount).toBe(Math.ceil(count / 2 - 0.25));
    cosine.forEach((c, k) => {
      const scale = (k === 0 ? 1 : 2) / count;
      const turn = (Math.PI * k * (count - 1)) / count;
      const expectedCosine = scale * (re[k]! * Math.cos(turn) - im[k]! * Math.sin(turn));
      const expectedSine = -scale * (re[k]! * Math.sin(turn) + im[k]! * Math.cos(turn));
      expect(Math.hypot(c - expectedCosine, sine[k]! - expectedSine)).toBeLessThan(1e-13);
    });
  });

  it('cuts the lines at half the sample rate', () => {
    expect(createWindowLines(401, 401, 10, 50).lineCount).toBe(201);
  });
});

const SHAPES: WindowShape[] = [
  { sampleCount: 10_005, windowSamples: 10_005.336, cycles: 10, maxOrder: 50, lineCount: 510 },
  { sampleCount: 10_005, windowSamples: 10_005.336, cycles: 10, maxOrder: 50, lineCount: 1825 },
  { sampleCount: 10_006, windowSamples: 10_005.51, cycles: 10, maxOrder: 50, lineCount: 510 },
  { sampleCount: 1001, windowSamples: 1000.6, cycles: 10, maxOrder: 50, lineCount: 501 },
  { sampleCount: 641, windowSamples: 640.7, cycles: 10, maxOrder: 3, lineCount: 37 },
  { sampleCount: 83, windowSamples: 83.3, cycles: 10, maxOrder: 3, lineCount: 40 },
  { sampleCount: 32_000, windowSamples: 31_999.9, cycles: 16, maxOrder: 5, lineCount: 3 },
];

describe('createKernelWindowLines', () => {
  it.each(SHAPES)(
    'gives the lines of the plain transform: $windowSamples samples, $lineCount lines',
    (shape) => {
      const noise = seededNoise(shape.sampleCount + 3, 5);
      const samples = distorted(shape.sampleCount + 3, shape.windowSamples, shape.cycles, 30).map(
        (x, n) => x + noise[n]!,
      );
      const plain = linesOf(createPlainWindowLines(shape), samples, 2);
      const compiled = linesOf(createKernelWindowLines(shape)!, samples, 2);
      const largest = plain.rms.reduce((max, x) => Math.max(max, x));
      expect(compiled.totalRms / plain.totalRms).toBeCloseTo(1, 12);
      compiled.cosine.forEach((c, k) => {
        expect(Math.hypot(c - plain.cosine[k]!, compiled.sine[k]! - plain.sine[k]!) / largest).toBeLessThan(
          1e-12,
        );
      });
    },
  );

  it('keeps plans of about one length apart', () => {
    const samples = seededNoise(2100, 9);
    const shapes = [2000.3, 2000, 2030.4].map((windowSamples) => ({
      ...{ sampleCount: Math.round(windowSamples), windowSamples },
      ...{ cycles: 10, maxOrder: 20, lineCount: 210 },
    }));
    const alone = shapes.map((shape) => linesOf(createKernelWindowLines(shape)!, samples));
    const plans = shapes.map((shape) => createKernelWindowLines(shape)!);
    for (const i of [2, 0, 1, 0, 2, 1]) expect(linesOf(plans[i]!, samples)).toEqual(alone[i]);
  });
});
