import { describe, expect, it } from 'vitest';
import { seededNoise } from '../../test/seeded-noise.js';
import { createBlockSums, plainBlockSums } from './block-sums.js';
import { createCalmSearch, plainCalmSearch, type BeginCalmSearch } from './calm-samples.js';
import { createDemodulator, plainDemodulator } from './demodulator.js';

describe('createBlockSums', () => {
  // Closed forms: 1 … n about n, and Gauß's sums.
  it.each([1, 2, 3, 4, 5, 8191, 8192, 8193, 20_001])('sums 1 to %i', (count) => {
    const block = Float64Array.from({ length: count }, (_, i) => i + 1);
    const sums = createBlockSums()(block, 0);
    expect(sums.away).toBe((count * (count + 1)) / 2);
    expect(sums.squares / ((count * (count + 1) * (2 * count + 1)) / 6)).toBeCloseTo(1, 14);
    expect(sums).toMatchObject({ lowest: 1, highest: count, notFinite: 0, absolute: sums.away });
  });

  it.each([0, 5, -1000])('gives the plain sums about %d', (shift) => {
    const noise = seededNoise(10_003, 4);
    const plain = plainBlockSums(noise, shift);
    const compiled = createBlockSums()(noise, shift);
    expect(compiled.lowest).toBe(plain.lowest);
    expect(compiled.highest).toBe(plain.highest);
    expect(compiled.away / plain.away).toBeCloseTo(1, 12);
    expect(compiled.squares / plain.squares).toBeCloseTo(1, 12);
    expect(compiled.absolute / plain.absolute).toBeCloseTo(1, 12);
  });

  it('loses no digits of the squares to a large mean', () => {
    const block = Float64Array.from({ length: 4096 }, (_, i) => 1e8 + (i % 2));
    expect(createBlockSums()(block, 1e8 + 0.5)).toMatchObject({ away: 0, squares: 1024 });
  });

  it('counts what is no finite number, at any place', () => {
    const block = new Float64Array(23).fill(1);
    block[0] = NaN;
    block[5] = Infinity;
    block[22] = NaN;
    const sums = createBlockSums()(block, 0);
    expect(sums).toMatchObject({ notFinite: 3, lowest: 1, highest: Infinity });
    expect(Number.isFinite(sums.absolute)).toBe(false);
    expect(plainBlockSums(block, 0).notFinite).toBe(3);
  });

  it('has no extremes for no samples', () => {
    expect(createBlockSums()(new Float64Array(0), 1)).toEqual(plainBlockSums(new Float64Array(0), 1));
  });
});

describe('createDemodulator', () => {
  const table = (length: number, value: (angle: number) => number) =>
    Float64Array.from({ length }, (_, i) => value((2 * Math.PI * 3 * i) / length));

  // Closed form: three whole periods of cos(α + φ) give N/2 e^(jφ).
  it.each([7, 8, 9, 10, 1001])('finds the phase in %i samples', (length) => {
    const samples = Float64Array.from({ length: length + 2 }, (_, i) =>
      Math.cos((2 * Math.PI * 3 * (i - 2)) / length + 0.7),
    );
    const { re, im } = createDemodulator(table(length, Math.cos), table(length, Math.sin))(samples, 2);
    expect(re).toBeCloseTo((length / 2) * Math.cos(0.7), 10);
    expect(im).toBeCloseTo((length / 2) * Math.sin(0.7), 10);
    const plain = plainDemodulator(table(length, Math.cos), table(length, Math.sin))(samples, 2);
    expect(Math.hypot(re - plain.re, im - plain.im)).toBeLessThan(1e-12 * length);
  });
});

describe('createCalmSearch', () => {
  const calm = { top: 10, bottom: -10, jump: 39 };

  it.each([
    ['nothing', () => undefined, 20_003],
    ['a sample at the top', (x: Float64Array) => void (x[9000] = 10), 8999],
    ['a sample at the bottom', (x: Float64Array) => void (x[20_001] = -10), 19_999],
    ['a jump', (x: Float64Array) => void x.fill(-9.9, 0, 12_346).fill(9.9, 12_346, 12_348), 12_347],
    ['the first four', (x: Float64Array) => void (x[4] = 11), 3],
    ['the last one, which has no four', (x: Float64Array) => void (x[20_003] = 11), 20_003],
  ])('stops at %s', (_, disturb, expected) => {
    const block = new Float64Array(20_004);
    disturb(block);
    expect(plainCalmSearch(block)(3, calm)).toBe(expected);
    expect(createCalmSearch()(block)(3, calm)).toBe(expected);
  });

  it('goes on in the same block and in another one', () => {
    const blocks = [seededNoise(30_000, 1), seededNoise(30_000, 2)];
    const compiled = createCalmSearch();
    const stops = (begin: BeginCalmSearch, limit: number) =>
      blocks.flatMap((block) => {
        const out: number[] = [];
        const calmUntil = begin(block);
        for (let at = 3; at + 4 <= block.length; at += 4) {
          at = calmUntil(at, { top: limit, bottom: -limit, jump: 5 * limit });
          out.push(at);
        }
        return out;
      });
    for (const limit of [2, 3, 4]) expect(stops(compiled, limit)).toEqual(stops(plainCalmSearch, limit));
  });
});
