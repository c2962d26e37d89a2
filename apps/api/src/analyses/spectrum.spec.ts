import { expect, it } from 'vitest';
import { thinned } from './spectrum.js';

it('keeps every peak at its place and height', () => {
  const rms = new Float64Array(1001).fill(0.001);
  rms[50] = 230;
  rms[250] = 4;
  rms[1000] = 2;
  const lines = thinned(rms, 0, 1, 100);
  expect(lines.rms.length).toBeLessThanOrEqual(100);
  for (const [frequencyHz, height] of [
    [50, 230],
    [250, 4],
    [1000, 2],
  ]) {
    expect(lines.rms[lines.frequencyHz.indexOf(frequencyHz!)]).toBe(height);
  }
});

it('leaves a spectrum alone that is short enough', () => {
  expect(thinned(Float64Array.of(1, 2, 3), 5, 10, 16)).toEqual({ frequencyHz: [5, 15, 25], rms: [1, 2, 3] });
});
