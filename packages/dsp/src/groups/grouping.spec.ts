import { describe, expect, it } from 'vitest';
import { centredSubgroups, harmonicGroups, harmonicSubgroups, interharmonicGroups } from './grouping.js';
import { smooth, smoothingAlpha } from './smooth.js';

describe('grouping of IEC 61000-4-7', () => {
  // Hand-calculated from the formulas of 5.5 and annex A: 100 A at 50 Hz, 10 A at 150, 2 A at 155, 3 A at 160, 4 A at 175.
  const lines = new Float64Array(56);
  lines[10] = 100;
  lines[30] = 10;
  lines[31] = 2;
  lines[32] = 3;
  lines[35] = 4;

  it('splits the line half-way between the groups', () => {
    const groups = harmonicGroups(lines, 10, 5);
    expect(groups[2]).toBeCloseTo(11, 10);
    expect(groups[3]).toBeCloseTo(2.82843, 5);
  });

  it('takes one line to each side into a subgroup', () => {
    expect(harmonicSubgroups(lines, 10, 5)[2]).toBeCloseTo(10.19804, 5);
  });

  it('puts what lies between into the interharmonic groups', () => {
    expect(interharmonicGroups(lines, 10, 4)[3]).toBeCloseTo(5.38516, 5);
    expect(centredSubgroups(lines, 10, 4)[3]).toBeCloseTo(5, 10);
  });

  it('gives null where the record ends below the group', () => {
    expect(harmonicGroups(lines, 10, 6)).toHaveLength(6);
    expect(harmonicGroups(lines, 10, 6)[5]).toBeNull();
    expect(interharmonicGroups(lines, 10, 5)[5]).toBeNull();
  });
});

describe('smooth', () => {
  // Step response of the digital low-pass of IEC 61000-4-7, 5.5.1 (α = 8.012), evaluated by hand: 1 − (β/α)^n.
  it.each([
    [1, 0.124813],
    [2, 0.234047],
    [5, 0.486542],
    [10, 0.736361],
    [35, 0.990591],
  ])('has risen by the right share after %i windows', (windows, share) => {
    const values = [0, ...new Array<number>(40).fill(1)];
    expect(smooth(values)[windows]).toBeCloseTo(share, 5);
  });

  it('starts with the first value', () => {
    expect(Array.from(smooth([5, 5, 5]))).toEqual([5, 5, 5]);
  });

  // Table 3 of the standard: 16 cycles at 50 Hz (320 ms) 5.206, at 60 Hz (267 ms) 6.14.
  it('follows the window length', () => {
    expect(smoothingAlpha(0.2)).toBe(8.012);
    expect(smoothingAlpha(0.32)).toBeCloseTo(5.206, 2);
    expect(smoothingAlpha(16 / 60)).toBeCloseTo(6.14, 2);
  });
});
