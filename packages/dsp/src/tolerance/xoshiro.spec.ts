import { describe, expect, it } from 'vitest';
import { seededSource, splitMix64, xoshiro128 } from './xoshiro.js';

describe('xoshiro128', () => {
  it('gives the words of the reference implementation', () => {
    // State 1, 2, 3, 4 through the C code of D. Blackman and S. Vigna, as the tests of the crate rand_xoshiro list them.
    const source = xoshiro128([1, 2, 3, 4]);
    expect(Array.from({ length: 10 }, source.nextWord)).toEqual([
      11520, 0, 5927040, 70819200, 2031721883, 1637235492, 1287239034, 3734860849, 3729100597, 4258142804,
    ]);
  });

  it('fills its state by SplitMix64', () => {
    // Seed 1234567, the values that Rosetta Code lists for "Pseudo-random numbers/Splitmix64".
    const { next } = splitMix64(1234567n);
    expect(Array.from({ length: 5 }, next)).toEqual([
      6457827717110365317n,
      3203168211198807973n,
      9817491932198370423n,
      4593380528125082431n,
      16408922859458223821n,
    ]);
  });

  it('is the same for a seed, another for another, and uniform and normal in its moments', () => {
    const draw = (seed: number) => Array.from({ length: 4 }, seededSource(seed).uniform);
    expect(draw(7)).toEqual(draw(7));
    expect(draw(7)).not.toEqual(draw(8));
    const count = 100_000;
    const source = seededSource(2024);
    const uniform = Array.from({ length: count }, source.uniform);
    const normal = Array.from({ length: count }, source.normal);
    const mean = (x: number[]) => x.reduce((a, b) => a + b, 0) / x.length;
    // Five standard deviations of the means: 5/√(12 n), 5/√n, and 5√(2/n) of the variance.
    expect(Math.abs(mean(uniform) - 0.5)).toBeLessThan(5 / Math.sqrt(12 * count));
    expect(Math.abs(mean(normal))).toBeLessThan(5 / Math.sqrt(count));
    expect(Math.abs(mean(normal.map((x) => x * x)) - 1)).toBeLessThan(5 * Math.sqrt(2 / count));
    expect(Math.min(...uniform.slice(0, 10_000))).toBeGreaterThanOrEqual(0);
    expect(Math.max(...uniform.slice(0, 10_000))).toBeLessThan(1);
  });
});
