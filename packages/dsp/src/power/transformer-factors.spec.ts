import { describe, expect, it } from 'vitest';
import { transformerFactors } from './transformer-factors.js';

function current(orders: Record<number, number>): number[] {
  return Array.from({ length: Math.max(...Object.keys(orders).map(Number)) }, (_, i) => orders[i + 1] ?? 0);
}

/** Ideal six-pulse line current: 1/h at 6k ± 1. */
const SIX_PULSE = Array.from({ length: 50 }, (_, i) => ([1, 5].includes((i + 1) % 6) ? 1 / (i + 1) : 0));

describe('transformerFactors', () => {
  it('gives the loss factors of the example current of IEEE C57.110', () => {
    // Example load of C57.110 in per unit of the rms current (list from secondary literature, F_HL printed as 2.72).
    const load = current({ 1: 0.978, 5: 0.171, 7: 0.108, 11: 0.044, 13: 0.028, 17: 0.015, 19: 0.0098 });
    const factors = transformerFactors(load);
    expect(factors.fhl).toBeCloseTo(2.72432, 5);
    expect(factors.fhlStr).toBeCloseTo(1.13975, 5);
    expect(factors.kFactorMeasured).toBe(factors.fhl);
    expect(factors.maxOrder).toBe(19);
  });

  it('leaves the fundamental out of the sum of factor K', () => {
    // Worksheet in circulation, orders 1..25 over I_1, K = 8.3476 printed; with the sum from order 2, as the formula says,
    // the European factor is 1.146720 (numpy 1.24), with order 1 wrongly included 1.1828.
    const load = current({
      1: 1,
      5: 0.2,
      7: 0.14,
      11: 0.091,
      13: 0.077,
      17: 0.058,
      19: 0.056,
      23: 0.043,
      25: 0.04,
    });
    const factors = transformerFactors(load, { eddyLossRatio: 0.091 / 0.909 });
    expect(factors.kFactorMeasured).toBeCloseTo(8.347626, 6);
    expect(factors.factorKEn).toBeCloseTo(1.14672, 6);
  });

  it('grows with the orders that count', () => {
    // Closed form: of the orders h = 6k ± 1 every h²·(1/h)² is 1, so K = number of lines / Σ 1/h².
    expect(transformerFactors(SIX_PULSE, { maxOrder: 25 }).kFactorMeasured).toBeCloseTo(8.3002, 4);
    const { kFactorMeasured, maxOrder } = transformerFactors(SIX_PULSE);
    expect(kFactorMeasured).toBeCloseTo(15.595, 4);
    expect(maxOrder).toBe(50);
  });

  it('refers the rated K-factor to the rated current: K = F_HL (I/I_R)²', () => {
    const rms = Math.sqrt(SIX_PULSE.reduce((sum, x) => sum + x * x, 0));
    const { kFactorRated, fhl } = transformerFactors(SIX_PULSE, { ratedCurrentA: 2 * rms });
    expect(kFactorRated).toBeCloseTo(fhl! / 4, 12);
    expect(transformerFactors(SIX_PULSE).kFactorRated).toBeNull();
  });

  it('is 1 for a sine and null without current', () => {
    expect(transformerFactors([5])).toMatchObject({ fhl: 1, fhlStr: 1, factorKEn: 1 });
    expect(transformerFactors([0, 0])).toMatchObject({ fhl: null, fhlStr: null, factorKEn: null });
    expect(transformerFactors([0, 2])).toMatchObject({ fhl: 4, factorKEn: null });
  });
});
