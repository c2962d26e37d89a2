import { describe, expect, it } from 'vitest';
import { seededNoise } from '../../test/seeded-noise.js';
import { frequencyTrack } from '../fundamental/frequency-track.js';
import { windowBoundaries } from './window-boundaries.js';

const RATE = 10_000;
const LENGTH = 300_000;

/** Cycles of the fundamental from the first sample to a position. */
type Phase = (position: number) => number;

function boundariesOf(phase: Phase, noise = 0): Float64Array {
  const random = seededNoise(LENGTH, 7);
  const samples = Float64Array.from(
    { length: LENGTH },
    (_, n) => Math.cos(2 * Math.PI * phase(n)) + noise * random[n]!,
  );
  const meanHz = (phase(LENGTH) * RATE) / LENGTH;
  return windowBoundaries(LENGTH, RATE, meanHz, 10, frequencyTrack(samples, RATE, meanHz));
}

function cyclesHeld(boundaries: Float64Array, phase: Phase): number[] {
  return Array.from(boundaries.subarray(1), (end, j) => phase(end) - phase(boundaries[j]!));
}

describe('window boundaries', () => {
  const steady: Phase = (n) => (50.013 * n) / RATE;
  const wander: Phase = (n) => (50 * n) / RATE + 0.06 * Math.sin((2 * Math.PI * n) / (20 * RATE));
  const ramp: Phase = (n) => (49.5 * n) / RATE + (n / RATE) ** 2 / 60;

  it.each([0, 0.1])('are equally far apart for a steady frequency in noise of %d', (noise) => {
    const boundaries = boundariesOf(steady, noise);
    const length = (10 * RATE) / 50.013;
    expect(boundaries).toHaveLength(151);
    boundaries.forEach((position, j) => expect(Math.abs(position - j * length)).toBeLessThan(1e-3));
  });

  // IEC 61000-4-7, 4.4.1 allows 0.03 %; frequencies of a real grid wander like this within minutes.
  it.each([
    ['a slow wander of 20 mHz', wander],
    ['a ramp of 1 Hz', ramp],
  ])('hold ten cycles through %s, gapless', (_, phase) => {
    const boundaries = boundariesOf(phase);
    for (const cycles of cyclesHeld(boundaries, phase)) expect(Math.abs(cycles / 10 - 1)).toBeLessThan(1e-4);
    // No error adds up: the last boundary still is a whole number of windows from the first.
    const last = boundaries.length - 1;
    expect(Math.abs(phase(boundaries[last]!) - 10 * last)).toBeLessThan(2e-3);
  });

  it('are of few lengths, so that their tables can be used again', () => {
    const boundaries = boundariesOf(wander);
    const lengths = Array.from(boundaries.subarray(1), (end, j) => (end - boundaries[j]!).toPrecision(10));
    // ±0.038 % in steps of 0.002 %.
    expect(new Set(lengths).size).toBeLessThanOrEqual(39);
  });

  it('is 0 alone when no window fits', () => {
    expect(Array.from(windowBoundaries(1000, RATE, 50, 10, null))).toEqual([0]);
  });
});
