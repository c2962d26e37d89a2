import { describe, expect, it } from 'vitest';
import { weightedDistortion } from './weighted-distortion.js';

describe('partial weighted harmonic distortion', () => {
  // IEC 61000-4-7, 3.3.4, by hand: orders 14 and 40 of 1 % and 2 %: √(14·0.01² + 40·0.02²) = √0.0174.
  it('weights the squares by the order, from 14 to 40', () => {
    const rms = new Float64Array(50);
    rms[0] = 10;
    rms[12] = 5; // order 13
    rms[13] = 0.1;
    rms[39] = 0.2;
    rms[40] = 5; // order 41
    expect(weightedDistortion(rms)).toBeCloseTo(Math.sqrt(0.0174), 12);
  });

  it('is null without a fundamental or with fewer than 40 orders', () => {
    expect(weightedDistortion(new Float64Array(50))).toBeNull();
    expect(weightedDistortion(new Float64Array(39).fill(1))).toBeNull();
  });
});
