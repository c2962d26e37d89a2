import { describe, expect, it } from 'vitest';
import { seededNoise } from '../../test/seeded-noise.js';
import { createKernel } from '../wasm/kernel.js';
import { decimationFilter, filterResponse } from './decimation-filter.js';
import { GATHERED_LINES, gatheringKernel, LEAST_OVERSAMPLING, sampleWeight } from './kaiser-bessel.js';
import { createLineFrame } from './line-frame.js';
import { lineTables } from './line-tables.js';

describe('decimationFilter', () => {
  it.each([
    [0.051, 4],
    [0.0127, 19],
    [0.1, 2],
    [0.13, 1],
    [1e-5, 32],
  ])('damps what folds onto lines up to %d', (highest, factor) => {
    const filter = decimationFilter(highest);
    expect(filter.factor).toBe(factor);
    // Multiples of the new rate fold onto the lines, from one highest frequency below to one above.
    for (let multiple = 1; 2 * multiple <= factor; multiple++) {
      for (const line of [-highest, -highest / 2, 0, highest / 3, highest]) {
        const folded = filterResponse(filter, multiple / factor + line);
        expect(Math.abs(folded / filterResponse(filter, line))).toBeLessThan(2e-13);
      }
    }
  });

  // Outside truth: the defining sum.
  it.each([0, 0.003, 0.02, 0.4])('has the response of its taps at %d', (frequency) => {
    const filter = decimationFilter(0.03);
    const sum = filter.taps.reduce(
      (total, tap, i) => total + (i === 0 ? tap : 2 * tap * Math.cos(2 * Math.PI * frequency * i)),
      0,
    );
    expect(filterResponse(filter, frequency)).toBeCloseTo(sum, 12);
  });
});

describe('gatheringKernel', () => {
  // Closed form: one sample of 1 at n has the DFT e^(−j2πun/M) at any place u.
  it.each([LEAST_OVERSAMPLING, 1.8, 2, 3])(
    'turns a sample to any frequency, oversampling %d',
    (oversampling) => {
      const size = 200;
      const half = Math.floor(size / oversampling / 2);
      for (const n of [-half, -half + 1, -7, 0, 3, half]) {
        for (const place of [0, 0.5, 13.27, 50]) {
          const first = Math.ceil(place - GATHERED_LINES / 2);
          let re = 0;
          let im = 0;
          for (let j = first; j < first + GATHERED_LINES; j++) {
            const share = gatheringKernel(place - j, oversampling) * sampleWeight(n, size, oversampling);
            re += share * Math.cos((2 * Math.PI * j * n) / size);
            im -= share * Math.sin((2 * Math.PI * j * n) / size);
          }
          const angle = (2 * Math.PI * place * n) / size;
          expect(Math.hypot(re - Math.cos(angle), im + Math.sin(angle))).toBeLessThan(2e-12);
        }
      }
    },
  );
});

describe('createLineFrame', () => {
  // Outside truth: the defining sum about the centre of the samples.
  it.each([
    [1000, 0.03],
    [1001, 0.1],
    [777, 0.5],
    [64, 0.004],
  ])('has the DFT of %i samples at any frequency up to %d', (count, highest) => {
    const kernel = createKernel()!;
    const frame = createLineFrame(kernel, count + 10, highest);
    const frequencies = Float64Array.from([0, 0.01, 0.3, 0.5, 0.77, 1], (share) => share * highest);
    const tables = lineTables(frame, count, frequencies);
    const samples = seededNoise(count + 2, 8);
    const square = frame.transform(samples, 2, count);
    expect(square).toBeCloseTo(samples.subarray(2).reduce((sum, x) => sum + x * x, 0) / count, 12);
    const [re, im] = [frame.re, frame.im].map((address) =>
      kernel.floats(address - 8 * GATHERED_LINES, frame.size / 2 + 1 + 2 * GATHERED_LINES),
    ) as [Float64Array, Float64Array];
    frequencies.forEach((frequency, k) => {
      const gathered = { re: 0, im: 0 };
      for (let i = 0; i < GATHERED_LINES; i++) {
        const at = GATHERED_LINES + tables.starts[k]! / 8 + i;
        gathered.re += tables.weights[k * GATHERED_LINES + i]! * re[at]!;
        gathered.im += tables.weights[k * GATHERED_LINES + i]! * im[at]!;
      }
      const [factorRe, factorIm] = [tables.factors[2 * k]!, tables.factors[2 * k + 1]!];
      const direct = { re: 0, im: 0 };
      for (let n = 0; n < count; n++) {
        const angle = 2 * Math.PI * frequency * (n - (count - 1) / 2);
        direct.re += samples[n + 2]! * Math.cos(angle);
        direct.im -= samples[n + 2]! * Math.sin(angle);
      }
      const scale = (frequency === 0 ? 1 : 2) / count;
      const lineRe = gathered.re * factorRe - gathered.im * factorIm;
      const lineIm = gathered.re * factorIm + gathered.im * factorRe;
      expect(Math.hypot(lineRe - scale * direct.re, lineIm - scale * direct.im)).toBeLessThan(1e-13);
    });
  });
});
