import { describe, expect, it } from 'vitest';
import { seededNoise } from '../../test/seeded-noise.js';
import { createFlagScan } from './flag-scan.js';

function stepOf(samples: Float64Array): number | null {
  const pass = createFlagScan();
  for (let first = 0; first < samples.length; first += 1000) {
    pass.push(samples.subarray(first, first + 1000), first);
  }
  return pass.finish().quantisationStep;
}

const sine = Float64Array.from({ length: 20_000 }, (_, n) => Math.sin((2 * Math.PI * 50.3 * n) / 10_000));

// The step of a b-bit converter of range ±1 is 2^(1 − b).
describe('the grid of a record', () => {
  it.each([8, 12, 14, 16])('is the converter step of %d bits, with gain and offset', (bits) => {
    const codes = sine.map((x) => Math.round(0.9 * x * 2 ** (bits - 1)));
    expect(stepOf(codes.map((code) => code / 2 ** (bits - 1)))).toBeCloseTo(2 ** (1 - bits), 12);
    const step = stepOf(codes.map((code) => (code / 2 ** (bits - 1)) * 353.7 + 12.9))!;
    expect(step / (353.7 * 2 ** (1 - bits))).toBeCloseTo(1, 3);
  });

  it('is the last decimal of a table with fixed decimals', () => {
    expect(stepOf(sine.map((x) => Number((325 * x).toFixed(2))))).toBeCloseTo(0.01, 9);
  });

  it('is the one at the crests of a table with fixed significant digits', () => {
    const step = stepOf(sine.map((x) => Number((3.25 * x).toPrecision(5))));
    expect(step).toBeCloseTo(1e-4, 9);
  });

  // 200 samples a cycle, of which only the nine around each crest lie in the decade of the peak.
  it('is not read into the few values of a periodic wave in the decade of its peak', () => {
    expect(
      stepOf(Float64Array.from({ length: 4000 }, (_, n) => 1.01 * Math.sin((2 * Math.PI * n) / 200))),
    ).toBeNull();
    expect(
      stepOf(Float64Array.from({ length: 4000 }, (_, n) => 1.01 * Math.sin((2 * Math.PI * n) / 24))),
    ).toBeNull();
    expect(stepOf(Float64Array.from({ length: 4000 }, (_, n) => (n % 50 < 25 ? 1 : -1)))).toBeNull();
  });

  it('is seen where successive samples differ by one step at most', () => {
    const slow = Float64Array.from({ length: 60_000 }, (_, n) => Math.round(100 * Math.sin(n / 4000)) / 128);
    expect(stepOf(slow)).toBeCloseTo(1 / 128, 12);
  });

  it('is not told from no grid at 24 bits, where it matters for nothing', () => {
    expect(stepOf(sine.map((x) => Math.round(x * 2 ** 23) / 2 ** 23))).toBeNull();
  });

  it('is absent where the samples were not quantised, and in a constant', () => {
    expect(stepOf(sine)).toBeNull();
    expect(stepOf(seededNoise(5000, 1))).toBeNull();
    expect(stepOf(new Float64Array(5000).fill(3))).toBeNull();
    expect(stepOf(Float64Array.from({ length: 2000 }, (_, n) => sine[n % 200]!))).toBeNull();
  });

  // 1.00001 in 4 digits: nothing but 1.000 lies in the decade of the peak, and the values below have a step of 1e-4.
  it('is that beside the crests where a power of ten is reached only just', () => {
    expect(stepOf(sine.map((x) => Number((1.00001 * x).toPrecision(4))))).toBeCloseTo(1e-4, 9);
  });

  it.each([3.25, 1.00001])(
    'of a record that begins quietly is that of its loud part, with a peak of %d',
    (peak) => {
      const growing = sine.map((x, n) => Number((peak * x * Math.min(1, (n + 1) / 10_000)).toPrecision(4)));
      expect(stepOf(growing)).toBeCloseTo(peak > 2 ? 1e-3 : 1e-4, 9);
    },
  );
});
