import { describe, expect, it } from 'vitest';
import { seededNoise } from '../../test/seeded-noise.js';
import { createWaveformScan } from './waveform-scan.js';

function scanOf(samples: Float64Array, blockLength: number) {
  const scan = createWaveformScan();
  for (let at = 0; at < samples.length; at += blockLength) scan.push(samples.subarray(at, at + blockLength));
  return scan;
}

describe('waveform figures over blocks', () => {
  // Closed forms of x = 0, 1, …, n − 1: mean (n − 1)/2, mean square (n − 1)(2n − 1)/6.
  it.each([1, 7, 1000, 5000])('are those of the whole record in blocks of %i', (blockLength) => {
    const n = 1000;
    const scan = scanOf(
      Float64Array.from({ length: n }, (_, i) => i),
      blockLength,
    );
    const { mean, rms, peak, lowest, highest } = scan.figures();
    expect(mean).toBeCloseTo((n - 1) / 2, 10);
    expect(rms).toBeCloseTo(Math.sqrt(((n - 1) * (2 * n - 1)) / 6), 9);
    expect({ peak, lowest, highest }).toEqual({ peak: n - 1, lowest: 0, highest: n - 1 });
    expect(scan.formFactor()).toBeCloseTo(rms / mean, 12);
  });

  // Sums of squares about 0 would be off by some percent of the AC power here: 20 000 additions to 2·10^16.
  it('keep a small AC component beside a large DC component', () => {
    const noise = seededNoise(20_000, 9);
    const ac = Math.sqrt(noise.reduce((sum, x) => sum + x * x, 0) / noise.length);
    const meanOfNoise = noise.reduce((sum, x) => sum + x, 0) / noise.length;
    const { mean, rms } = scanOf(
      noise.map((x) => x + 1e6),
      1024,
    ).figures();
    expect(Math.sqrt((rms - mean) * (rms + mean) + meanOfNoise ** 2) / ac).toBeCloseTo(1, 3);
  });

  it('tell of values that are no finite numbers', () => {
    const scan = createWaveformScan();
    expect(scan.push(Float64Array.of(1, 2))).toBe(true);
    expect(scan.push(Float64Array.of(1, NaN))).toBe(false);
    expect(createWaveformScan().push(Float64Array.of(1, -Infinity))).toBe(false);
  });

  it('have no form factor for zeros', () => {
    expect(scanOf(new Float64Array(10), 4).formFactor()).toBeNull();
  });
});
