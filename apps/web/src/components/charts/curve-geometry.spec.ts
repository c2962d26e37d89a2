import { expect, it } from 'vitest';
import { bandPath, labelsThatFit, linePath, nearestIndex, placeOn, valueAtPlace } from './curve-geometry.js';

const ticks = { tickvals: [], ticktext: [] };
const linear = { scale: 'linear', from: -1, to: 1, ticks } as const;
const log = { scale: 'log', from: 10, to: 1000, ticks } as const;

it('places a value by its share of the axis, decades evenly on a logarithmic one', () => {
  expect(placeOn(linear, 0, 200)(0)).toBe(100);
  expect(placeOn(log, 0, 200)(100)).toBeCloseTo(100, 9);
  expect(placeOn(linear, 200, 0)(1)).toBe(0);
});

it('finds the value of a place again', () => {
  for (const axis of [linear, log]) {
    expect(placeOn(axis, 30, 430)(valueAtPlace(axis, 30, 430, 137))).toBeCloseTo(137, 9);
  }
});

it('breaks a line where there is no value and where a logarithmic axis has no place', () => {
  const [x, y] = [placeOn(linear, 0, 100), placeOn(log, 100, 0)];
  expect(linePath([-1, 0, 1], [10, null, 1000], x, y)).toBe('M0.0 100.0M100.0 0.0');
  expect(linePath([-1, 0], [-5, 10], x, y)).toBe('M50.0 100.0');
});

it('closes a band and leaves it out with fewer than two places', () => {
  const [x, y] = [placeOn(linear, 0, 100), placeOn(linear, 100, 0)];
  expect(bandPath([-1, 1], [0, 0], [1, 1], x, y)).toBe('M0.0 0.0L100.0 0.0L100.0 50.0L0.0 50.0Z');
  expect(bandPath([-1, 1], [Number.NaN, 0], [1, 1], x, y)).toBe('');
});

it('finds the nearest place on the scale of the axis', () => {
  expect(nearestIndex([10, 100, 1000], 350, placeOn(log, 0, 200))).toBe(2);
  expect(nearestIndex([10, 100, 1000], 300, placeOn(log, 0, 200))).toBe(1);
});

it('leaves out labels that would stand on each other', () => {
  const tickvals = [-1, -0.9, 0, 1];
  const labels = { tickvals, ticktext: ['100 Hz', '110 Hz', '200 Hz', '300 Hz'] };
  expect(labelsThatFit(labels, placeOn(linear, 0, 200))).toEqual([0, 2, 3]);
  expect(labelsThatFit(labels, placeOn(linear, 0, 60))).toEqual([0, 3]);
});
