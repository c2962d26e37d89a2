import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { expandRoots, polynomialRoots, type Root } from './polynomial-roots.js';

/** Coefficients of Π (s − r_k), descending powers. */
function withRoots(roots: readonly number[]): number[] {
  return roots.reduce<number[]>((p, root) => [...p, 0].map((c, k) => c - root * (p[k - 1] ?? 0)), [1]);
}

function multiply(a: readonly number[], b: readonly number[]): number[] {
  const out = new Array<number>(a.length + b.length - 1).fill(0);
  a.forEach((x, i) => b.forEach((y, k) => (out[i + k]! += x * y)));
  return out;
}

function expectRoots(found: Root[], wanted: [number, number, number?][], relative: number): void {
  expect(found).toHaveLength(wanted.length);
  for (const [re, im, multiplicity = 1] of wanted) {
    const limit = relative * Math.hypot(re, im);
    const match = found.filter((root) => Math.hypot(root.re - re, root.im - im) <= limit);
    expect(
      match.map((root) => root.multiplicity),
      `${re}, ${im}`,
    ).toEqual([multiplicity]);
  }
}

describe('polynomialRoots', () => {
  it('solves second degree exactly', () => {
    expect(polynomialRoots([1, -37, -120])).toEqual([
      { re: -3, im: 0, multiplicity: 1 },
      { re: 40, im: 0, multiplicity: 1 },
    ]);
    expect(polynomialRoots([2, 0, 8])).toEqual([
      { re: 0, im: -2, multiplicity: 1 },
      { re: 0, im: 2, multiplicity: 1 },
    ]);
    expect(polynomialRoots([2, -6])).toEqual([{ re: 3, im: 0, multiplicity: 1 }]);
  });

  it('keeps the digits of a small root beside a large one', () => {
    // −10⁸ and −10⁻⁸: the textbook formula loses the small one in the cancellation of b and √(b² − 4ac).
    expectRoots(
      polynomialRoots([1, 1e8 + 1e-8, 1]),
      [
        [-1e8, 0],
        [-1e-8, 0],
      ],
      1e-14,
    );
  });

  it('agrees with numpy.roots (1.24) on textbook polynomials', () => {
    expectRoots(
      polynomialRoots([1, 5, 6, 10, 0, 4, 1]),
      [
        [-4.14737771, 0],
        [-0.56546704, 1.46112233],
        [-0.56546704, -1.46112233],
        [0.25153502, 0.61137014],
        [0.25153502, -0.61137014],
        [-0.22475825, 0],
      ],
      3e-8,
    );
  });

  it('finds the poles of a Butterworth low-pass on their circle', () => {
    // s_k = e^(jπ(2k + n − 1)/(2n)), scaled to 100 Hz; the coefficients span 22 decades.
    const omega = 2 * Math.PI * 100;
    const angles = [0.625, 0.875].map((share) => share * Math.PI);
    const pairs = angles.map((angle) => [1, -2 * omega * Math.cos(angle), omega ** 2]);
    expectRoots(
      polynomialRoots(multiply(pairs[0]!, pairs[1]!)),
      angles.flatMap((angle): [number, number][] => [
        [omega * Math.cos(angle), omega * Math.sin(angle)],
        [omega * Math.cos(angle), -omega * Math.sin(angle)],
      ]),
      1e-14,
    );
  });

  it('finds roots over twelve decades', () => {
    const roots = [-1e-3, -1, -1e3, -1e6, -1e9];
    expectRoots(
      polynomialRoots(withRoots(roots)),
      roots.map((root) => [root, 0]),
      1e-12,
    );
  });

  it('finds the integers 1 to 10 (Wilkinson)', () => {
    // numpy.roots (1.24) is off by up to 4 · 10⁻¹⁰ of the root, the condition of the problem.
    const roots = Array.from({ length: 10 }, (_, i) => i + 1);
    expectRoots(
      polynomialRoots(withRoots(roots)),
      roots.map((root) => [root, 0]),
      3e-9,
    );
  });

  it.each([
    ['double', [1, 2, 1], [[-1, 0, 2]]],
    [
      'double beside a simple one',
      [1, 4, 5, 2],
      [
        [-2, 0],
        [-1, 0, 2],
      ],
    ],
    ['triple', withRoots([-20, -20, -20]), [[-20, 0, 3]]],
    [
      'fivefold',
      withRoots([-3, -3, -3, -3, -3, -7]),
      [
        [-3, 0, 5],
        [-7, 0],
      ],
    ],
    [
      'double pair',
      multiply([1, 0, 25], [1, 0, 25]),
      [
        [0, 5, 2],
        [0, -5, 2],
      ],
    ],
    [
      'double pair, damped',
      multiply([1, 2, 26], [1, 2, 26]),
      [
        [-1, 5, 2],
        [-1, -5, 2],
      ],
    ],
    [
      'at the origin',
      [3, 6, 0, 0],
      [
        [0, 0, 2],
        [-2, 0],
      ],
    ],
  ] as [string, number[], [number, number, number?][]][])('counts multiplicity: %s', (_, p, wanted) => {
    expectRoots(polynomialRoots(p), wanted, 1e-12);
  });

  it('counts multiplicity in coefficients of twelve digits', () => {
    const printed = withRoots([-314.159265359, -314.159265359, -314.159265359]).map((c) =>
      Number(c.toPrecision(12)),
    );
    expectRoots(polynomialRoots(printed), [[-314.159265359, 0, 3]], 1e-10);
  });

  it('keeps close roots apart', () => {
    expectRoots(
      polynomialRoots(withRoots([-1, -1.0001])),
      [
        [-1, 0],
        [-1.0001, 0],
      ],
      1e-10,
    );
    expectRoots(
      polynomialRoots(withRoots([-1, -1.01, -1.02])),
      [
        [-1, 0],
        [-1.01, 0],
        [-1.02, 0],
      ],
      1e-8,
    );
  });

  it('keeps apart what is hardly further apart than the coefficients tell', () => {
    expectRoots(
      polynomialRoots(withRoots([-1, -1.00002])),
      [
        [-1, 0],
        [-1.00002, 0],
      ],
      1e-9,
    );
    // −1 and −1 ± j1.7·10⁻⁵: no triple root, and no double one of two of the three.
    const tight = polynomialRoots(multiply([1, 1], [1, 2, 1 + 1.7e-5 ** 2]));
    expect(tight.map(({ multiplicity }) => multiplicity)).toEqual([1, 1, 1]);
    // Three roots so close move by ∛ε, about 6 · 10⁻⁶, with the rounding of the coefficients.
    for (const { re, im } of tight) expect(Math.hypot(re + 1, im)).toBeLessThan(3e-5);
  });

  it('passes over leading zeros and gives none for a constant', () => {
    expect(polynomialRoots([0, 0, 1, -3])).toEqual([{ re: 3, im: 0, multiplicity: 1 }]);
    expect(polynomialRoots([5])).toEqual([]);
    expect(polynomialRoots([])).toEqual([]);
  });

  it('finds as many roots as the degree, in conjugate pairs, that make up the polynomial', () => {
    const coefficient = fc.double({ min: -100, max: 100, noNaN: true }).map((x) => Math.round(x * 10) / 10);
    fc.assert(
      fc.property(fc.array(coefficient, { minLength: 1, maxLength: 12 }), (tail) => {
        const roots = expandRoots(polynomialRoots([1, ...tail]));
        expect(roots).toHaveLength(tail.length);
        // Vieta: the sum of the roots is −c_1; the imaginary parts cancel exactly in pairs.
        const sum = roots.reduce((total, { re }) => total + re, 0);
        const size = roots.reduce((total, { re, im }) => total + Math.hypot(re, im), Math.abs(tail[0]!));
        expect(Math.abs(sum + tail[0]!)).toBeLessThanOrEqual(1e-9 * size);
        const sorted = roots.map(({ im }) => im).sort((a, b) => a - b);
        sorted.forEach((im, i) => expect(im + sorted[sorted.length - 1 - i]!).toBe(0));
      }),
    );
  });
});
