import { expect, it } from 'vitest';
import { thinnedSeries } from './thinned-series.js';

it('leaves a series alone that is short enough', () => {
  const points = { timeS: [0, 0.2, 0.4], value: [1, NaN, 3], flagged: Uint8Array.of(0, 0, 1) };
  expect(thinnedSeries(points, 16)).toEqual({
    timeS: [0, 0.2, 0.4],
    value: [1, null, 3],
    flagged: [false, false, true],
    thinned: false,
  });
});

it('keeps the largest value of each stretch at its own time, and every flag', () => {
  const points = {
    timeS: Float64Array.from({ length: 10 }, (_, i) => i),
    value: Float64Array.of(NaN, 2, 1, 5, 4, 6, NaN, NaN, NaN, 0),
    flagged: Uint8Array.of(0, 0, 1, 0, 0, 0, 0, 0, 0, 0),
  };
  expect(thinnedSeries(points, 4)).toEqual({
    timeS: [1, 5, 6, 9],
    value: [2, 6, null, 0],
    flagged: [true, false, false, false],
    thinned: true,
  });
});
