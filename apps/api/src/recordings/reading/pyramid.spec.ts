import { describe, expect, it } from 'vitest';
import { PyramidBuilder, pyramidLevels } from './pyramid.js';

/** Minimum and maximum by brute force over the samples of a bin, missing ones left out. */
function bruteForce(samples: Float64Array, from: number, to: number): [number, number] {
  const present = [...samples.slice(from, to)].filter((x) => !Number.isNaN(x));
  return present.length === 0 ? [NaN, NaN] : [Math.min(...present), Math.max(...present)];
}

describe('pyramid of minima and maxima', () => {
  it.each([1, 63, 64, 65, 512, 513, 10_000])('equals brute force on every level over %i samples', (count) => {
    const samples = Float64Array.from({ length: count }, (_, n) => Math.sin(n * n));
    if (count > 200) samples.fill(NaN, 64, 128);
    const builder = new PyramidBuilder();
    const pyramid: number[] = [];
    for (let at = 0; at < count; at += 100) pyramid.push(...builder.add(samples.subarray(at, at + 100)));
    for (const level of builder.finish()) pyramid.push(...level);
    const levels = pyramidLevels(count);
    expect(levels.at(-1)).toMatchObject({ bins: 1 });
    expect(pyramid.length).toBe(levels.reduce((sum, { bins }) => sum + 2 * bins, 0));
    for (const { factor, bins, offset } of levels) {
      for (let bin = 0; bin < bins; bin += 1) {
        const pair = [pyramid[offset + 2 * bin], pyramid[offset + 2 * bin + 1]];
        expect(pair).toEqual(bruteForce(samples, bin * factor, (bin + 1) * factor));
      }
    }
  });

  it('has no levels over no samples', () => {
    expect(pyramidLevels(0)).toEqual([]);
    expect(new PyramidBuilder().finish().flatMap((level) => [...level])).toEqual([]);
  });
});
