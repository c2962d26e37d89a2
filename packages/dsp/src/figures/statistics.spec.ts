import { describe, expect, it } from 'vitest';
import { statistics } from './statistics.js';

// 40 values 2, 9, 16, 23, … of the sequence 7i + 2 mod 41, so that their order says nothing.
const VALUES = Float64Array.from({ length: 40 }, (_, i) => ((7 * i + 2) % 41) + 0.25 * i);
const NONE = new Uint8Array(VALUES.length);

describe('statistics over windows', () => {
  // numpy 1.24.2: v.mean(), v.max(), np.percentile(v, [95, 99], method='inverted_cdf').
  it('takes percentiles by nearest rank', () => {
    const result = statistics(VALUES, NONE)!;
    expect(result.mean).toBeCloseTo(24.475, 12);
    expect(result.max).toBe(45.75);
    expect(result.p95).toBe(43.25);
    expect(result.p99).toBe(45.75);
  });

  // EN 50160 and IEEE 519 speak of values, so of 20 values one may lie above the 95th percentile and of 19 none.
  it('lets no more than the stated share lie above a percentile', () => {
    const ramp = (count: number) => Float64Array.from({ length: count }, (_, i) => i + 1);
    expect(statistics(ramp(20), new Uint8Array(20))!.p95).toBe(19);
    expect(statistics(ramp(19), new Uint8Array(19))!.p95).toBe(19);
  });

  it('leaves flagged values out', () => {
    const values = Float64Array.of(1, 100, 3);
    expect(statistics(values, Uint8Array.of(0, 1, 0))).toEqual({ mean: 2, max: 3, p95: 3, p99: 3 });
    expect(statistics(values, Uint8Array.of(1, 1, 1))).toBeNull();
  });

  it('is null where a value does not apply', () => {
    expect(statistics(Float64Array.of(1, NaN), new Uint8Array(2))).toBeNull();
    expect(statistics(new Float64Array(0), new Uint8Array(0))).toBeNull();
  });
});
