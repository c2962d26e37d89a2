import { describe, expect, it } from 'vitest';
import { seededNoise } from '../../test/seeded-noise.js';
import { createRealFftPlan } from './real-fft-plan.js';

const LENGTHS = [
  1, 2, 3, 4, 5, 6, 7, 8, 9, 12, 15, 16, 17, 30, 31, 32, 64, 97, 100, 127, 128, 210, 256, 500, 501,
];

describe('createRealFftPlan', () => {
  // Outside truth: the definition of the DFT, summed directly.
  it.each(LENGTHS)('equals the defining sum for length %i', (length) => {
    const x = seededNoise(length, length);
    const plan = createRealFftPlan(length);
    const re = new Float64Array(plan.lineCount);
    const im = new Float64Array(plan.lineCount);
    plan.forward(x, re, im);
    for (let k = 0; k < plan.lineCount; k++) {
      const direct = directLine(x, k);
      expect(re[k]).toBeCloseTo(direct.re, 9);
      expect(im[k]).toBeCloseTo(direct.im, 9);
    }
  });

  // Parseval: Σ|x|² = (1/N) Σ|X|², each line but DC and the Nyquist line counted twice.
  it.each([1000, 2002, 4096, 9999, 50_000])('keeps the energy for length %i', (length) => {
    const x = seededNoise(length, 7);
    const plan = createRealFftPlan(length);
    const re = new Float64Array(plan.lineCount);
    const im = new Float64Array(plan.lineCount);
    plan.forward(x, re, im);
    const spectral = re.reduce((sum, value, k) => {
      const weight = k === 0 || 2 * k === length ? 1 : 2;
      return sum + weight * (value ** 2 + im[k]! ** 2);
    }, 0);
    const energy = x.reduce((sum, value) => sum + value ** 2, 0);
    expect(spectral / length / energy).toBeCloseTo(1, 12);
  });

  it('reads from an offset and can be used again', () => {
    const x = seededNoise(60, 3);
    const plan = createRealFftPlan(20);
    const [re, im] = [new Float64Array(11), new Float64Array(11)];
    plan.forward(x, re, im);
    plan.forward(x, re, im, 30);
    expect(re[4]).toBeCloseTo(directLine(x.subarray(30, 50), 4).re, 10);
  });

  it.each([0, -4, 2.5, Number.NaN])('refuses the length %d', (length) => {
    expect(() => createRealFftPlan(length)).toThrow(RangeError);
  });
});

function directLine(x: Float64Array, k: number): { re: number; im: number } {
  let re = 0;
  let im = 0;
  x.forEach((value, n) => {
    const angle = (2 * Math.PI * ((k * n) % x.length)) / x.length;
    re += value * Math.cos(angle);
    im -= value * Math.sin(angle);
  });
  return { re, im };
}
