import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { polynomialRoots } from './polynomial-roots.js';
import { routhTable } from './routh-table.js';
import { stability } from './stability.js';
import { transferFunction } from './transfer-function.js';

const of = (...denominator: number[]) => stability(transferFunction([1], denominator));

describe('stability', () => {
  it('calls poles in the left half-plane stable, however close to the axis', () => {
    expect(of(1, 2, 5).verdict).toBe('stable');
    // Damping ratio 10⁻⁶.
    expect(of(1, 2e-6, 1).verdict).toBe('stable');
    expect(of(3)).toEqual({
      verdict: 'stable',
      offending: [],
      reason: 'Every pole has a negative real part.',
    });
  });

  it('names a pole in the right half-plane', () => {
    const result = of(1, -37, -120);
    expect(result.verdict).toBe('unstable');
    expect(result.offending).toEqual([{ re: 40, im: 0, multiplicity: 1 }]);
    expect(result.reason).toBe('The pole at s = 40 has a positive real part.');
    expect(of(1, -2e-6, 1).reason).toMatch(/pair of poles at s = 0.000001 ± j1 has a positive/);
  });

  it('calls simple poles on the axis marginal, repeated ones unstable', () => {
    expect(of(1, 0).verdict).toBe('marginal');
    expect(of(1, 0, 25).reason).toContain('s = 0 ± j5 lies on the imaginary axis');
    expect(of(1, 0, 0).verdict).toBe('unstable');
    const repeated = of(1, 0, 50, 0, 625);
    expect(repeated.verdict).toBe('unstable');
    expect(repeated.reason).toContain('more than once');
  });

  it('sees a pair on the axis among others, coefficients printed with twelve digits', () => {
    // (s + 37)(s² + (100π)²)
    const square = (100 * Math.PI) ** 2;
    const printed = [1, 37, square, 37 * square].map((c) => Number(c.toPrecision(12)));
    expect(of(...printed).verdict).toBe('marginal');
    expect(of(...printed.map((c, k) => (k === 1 ? c * (1 + 1e-6) : c))).verdict).toBe('stable');
    expect(of(...printed.map((c, k) => (k === 1 ? c * (1 - 1e-6) : c))).verdict).toBe('unstable');
  });
});

/** First column as text: ε stands for a small positive number. */
function firstColumn(coefficients: number[]): string[] {
  return routhTable(coefficients).rows.map(({ elements: [head] }) => {
    const { value, epsilonPower } = head!;
    const epsilon = epsilonPower === 0 ? '' : ` ε^${epsilonPower}`;
    return `${Number(value.toFixed(9))}${epsilon}`;
  });
}

describe('routhTable', () => {
  // The texts are cited from memory; numpy.roots (1.24) has the same number of roots on the right.
  it.each([
    ['Nise, Control Systems Engineering', [1, 10, 31, 1030], ['1', '10', '-72', '1030'], 2],
    ['Ogata, Modern Control Engineering', [1, 2, 3, 4, 5], ['1', '2', '1', '-6', '5'], 2],
    ['roots 3, 1, −2', [1, -2, -5, 6], ['1', '-2', '-2', '6'], 2],
    ['roots −2, −1, −1', [1, 4, 5, 2], ['1', '4', '4.5', '2'], 0],
    [
      // By hand: −0.8 beside 4, 2.75 beside 11, then −9/5, 319/36; numpy.roots (1.24) has 2 with positive real part.
      'sixth degree with a missing power',
      [1, 5, 6, 10, 0, 4, 1],
      ['1', '5', '4', '11', '-1.8', '8.861111111', '1'],
      2,
    ],
    [
      'Dorf, Modern Control Systems: zero in the first column',
      [1, 2, 2, 4, 11, 10],
      ['1', '2', '1 ε^1', '-12 ε^-1', '6', '10'],
      2,
    ],
  ])('%s', (_, coefficients, column, signChanges) => {
    expect(firstColumn(coefficients)).toEqual(column);
    expect(routhTable(coefficients).signChanges).toBe(signChanges);
  });

  it('replaces a row of zeros by the derivative of the auxiliary polynomial', () => {
    // Ogata, Modern Control Engineering, 5-6: s⁵ + 2s⁴ + 24s³ + 48s² − 25s − 50, auxiliary 2s⁴ + 48s² − 50,
    // new row 8, 96; one root in the right half-plane (±1, ±j5, −2).
    const table = routhTable([1, 2, 24, 48, -25, -50]);
    expect(table.rows[2]).toEqual({
      power: 3,
      elements: [
        { value: 8, epsilonPower: 0 },
        { value: 96, epsilonPower: 0 },
      ],
      special: 'zero-row',
    });
    expect(firstColumn([1, 2, 24, 48, -25, -50])).toEqual(['1', '2', '8', '24', '112.666666667', '-50']);
    expect([table.signChanges, table.hasZeroRow]).toEqual([1, true]);
  });

  it('sees an undamped oscillation as a row of zeros without sign change', () => {
    expect(routhTable([1, 0, 25])).toMatchObject({ signChanges: 0, hasZeroRow: true });
    // (s + 0.3)(s² + 0.7): the row vanishes but for the rounding of decimal fractions.
    expect(routhTable([1, 0.3, 0.7, 0.21])).toMatchObject({ signChanges: 0, hasZeroRow: true });
  });

  it('says when ε may have moved roots off the axis', () => {
    // s⁵ + 3s³ + s² + 2s + 1 has ±j among its roots and two on the right; with ε in place of the missing s⁴ it has four.
    expect(routhTable([1, 0, 3, 1, 2, 1])).toMatchObject({ signChanges: 4, isConclusive: false });
    expect(routhTable([1, 2, 2, 4, 11, 10])).toMatchObject({ isConclusive: true });
  });

  it('counts the roots on the right, where it is conclusive', () => {
    const coefficient = fc.integer({ min: -3, max: 3 });
    fc.assert(
      fc.property(fc.array(coefficient, { minLength: 2, maxLength: 6 }), (tail) => {
        const { signChanges, isConclusive } = routhTable([1, ...tail]);
        const right = polynomialRoots([1, ...tail]).reduce(
          (sum, { re, im, multiplicity }) => sum + (re > 1e-7 * Math.hypot(re, im) ? multiplicity : 0),
          0,
        );
        fc.pre(isConclusive && tail.at(-1) !== 0);
        expect(signChanges).toBe(right);
      }),
      { numRuns: 300 },
    );
  });

  it('has rows as long as their power of s', () => {
    expect(routhTable([1, 2, 3, 4, 5]).rows.map(({ elements }) => elements.length)).toEqual([3, 2, 2, 1, 1]);
    expect(() => routhTable([0])).toThrow(/zero/);
  });
});
