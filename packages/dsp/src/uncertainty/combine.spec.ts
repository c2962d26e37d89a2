import { describe, expect, it } from 'vitest';
import { combineUncertainty } from './combine.js';
import { gainContributions } from './instrument.js';
import { roundToUncertainty } from './round-to-uncertainty.js';
import { quadraticMeanScatter } from './scatter.js';

describe('combineUncertainty', () => {
  // JCGM 100:2008, H.1.4: u_c² = 25² + 9.7² + 2.9² + 16.6² nm² = 1002 nm² (end-gauge calibration), u_c = 32 nm.
  it('adds the contributions of example H.1 of the GUM', () => {
    const result = combineUncertainty([
      { source: 'calibration', standard: 25 },
      { source: 'noise', standard: 9.7 },
      { source: 'fit', standard: 2.9 },
      { source: 'accuracy', standard: 16.6 },
    ])!;
    expect((result.expanded / 2) ** 2).toBeCloseTo(1003.06, 2);
    expect(Math.round(result.expanded / 2)).toBe(32);
    expect(result.coverageFactor).toBe(2);
    expect(result.contributors.map(({ source }) => source)).toEqual([
      'calibration',
      'accuracy',
      'noise',
      'fit',
    ]);
  });

  it('joins contributions of one source, leaves out those of nothing, and knows nothing from nothing', () => {
    const result = combineUncertainty([
      { source: 'synchronisation', standard: 3 },
      { source: 'quantisation', standard: 0 },
      { source: 'synchronisation', standard: 4 },
    ])!;
    expect(result).toEqual({
      expanded: 10,
      coverageFactor: 2,
      contributors: [{ source: 'synchronisation', standard: 5 }],
    });
    expect(combineUncertainty([])).toBeNull();
    expect(combineUncertainty([{ source: 'noise', standard: 0 }])).toBeNull();
  });
});

describe('gainContributions', () => {
  // JCGM 100:2008, 4.3.3: a certificate's U divided by its k; 4.3.7: half-width a of a rectangle, u = a/√3.
  it('halves the calibration and divides the limits by √3', () => {
    const [calibration, accuracy] = gainContributions(-230, {
      calibrationPercent: 0.02,
      readingPercent: 0.15,
    });
    expect(calibration!.standard).toBeCloseTo(0.023, 12);
    expect(accuracy!.standard).toBeCloseTo(0.345 / Math.sqrt(3), 12);
    expect(gainContributions(230, null)).toEqual([]);
  });
});

describe('quadraticMeanScatter', () => {
  it('is s/√n of nearly equal values, widened by √((n − 1)/(n − 3)) for few', () => {
    // 100.1, 99.9, 100.1, …: s² = 0.01·n/(n − 1).
    for (const n of [4, 10, 200]) {
      const values = Array.from({ length: n }, (_, j) => 100 + (j % 2 === 0 ? 0.1 : -0.1));
      const s = Math.sqrt((0.01 * n) / (n - 1));
      const expected = (s / Math.sqrt(n)) * Math.sqrt((n - 1) / (n - 3));
      expect(quadraticMeanScatter(values, new Uint8Array(n))! / expected).toBeCloseTo(1, 5);
    }
  });

  it('leaves flagged windows and those without a value out, and says nothing of fewer than four', () => {
    const values = [1, 2, 1, 2, 50, NaN];
    const flagged = [0, 0, 0, 0, 1, 0];
    expect(quadraticMeanScatter(values, flagged)).toBe(quadraticMeanScatter([1, 2, 1, 2], [0, 0, 0, 0]));
    expect(quadraticMeanScatter(values, [0, 0, 0, 1, 1, 0])).toBeNull();
    expect(quadraticMeanScatter([0, 0, 0, 0], [0, 0, 0, 0])).toBe(0);
  });
});

describe('roundToUncertainty', () => {
  it.each([
    // JCGM 100:2008, 7.2.6: 10.057 62 Ω with 27 mΩ becomes 10.058 Ω.
    [10.05762, 0.027, '10.058', '0.027'],
    // 7.2.2: m_S = 100.021 47 g with 0.35 mg.
    [100.02147, 0.00035, '100.02147', '0.00035'],
    [230.1234, 0.0996, '230.12', '0.10'],
    [230.1234, 0.00994, '230.1234', '0.0099'],
    [230.1234, 9.96, '230', '10'],
    [12_345.6, 1234, '12300', '1200'],
    [-0.04, 12, '0', '12'],
    [-0.00004, 0.012, '0.000', '0.012'],
    [-5.5555, 0.25, '-5.56', '0.25'],
    [0.5, 1e-9, '0.5000000000', '0.0000000010'],
  ])('writes %d with %d as %s and %s', (value, expanded, shown, uncertainty) => {
    expect(roundToUncertainty(value, expanded)).toEqual({ value: shown, expanded: uncertainty });
  });

  it.each([0, -1, NaN, Infinity])('refuses the uncertainty %d', (expanded) => {
    expect(() => roundToUncertainty(1, expanded)).toThrow(RangeError);
  });
});
