import { describe, expect, it } from 'vitest';
import { amplitudeAxis, amplitudeRange, raised } from './amplitude-axis.js';

describe('axis of amplitudes', () => {
  const of = (change: Partial<Parameters<typeof amplitudeRange>[0]>) =>
    amplitudeRange({ values: [], limits: [], scale: 'log', faintest: null, ...change });

  it('ends a decade below the lowest limit when logarithmic', () => {
    const range = of({ values: [2.2, 1.19, null, 0], limits: [2.3, 0.0495] });
    expect(range.bottom).toBeCloseTo(0.00495, 12);
    expect(range.top).toBeGreaterThan(2.3);
  });

  it('reaches to the faintest value that should be seen, within three to eight decades', () => {
    expect(of({ values: [1], faintest: 3e-5 }).bottom).toBeCloseTo(1e-5, 12);
    expect(of({ values: [1], faintest: 0.5 }).bottom).toBeCloseTo(1e-3, 12);
    expect(of({ values: [1], faintest: 1e-30 }).bottom).toBeCloseTo(1e-8, 12);
  });

  it('begins at zero when linear', () => {
    expect(of({ values: [10], scale: 'linear' }).bottom).toBe(0);
  });

  it('stands without any value', () => {
    const { bottom, top } = of({ values: [null, 0, Number.NaN] });
    expect(bottom).toBeGreaterThan(0);
    expect(top).toBeGreaterThan(bottom);
  });

  it('is given to the chart as exponents when logarithmic', () => {
    expect(amplitudeAxis({ scale: 'log', bottom: 0.01, top: 100 }, 'A')).toMatchObject({
      type: 'log',
      range: [-2, 2],
      tickvals: [100, 10, 1, 0.1, 0.01],
    });
  });

  it('raises a mark by a share of the height, and never beyond the top', () => {
    const linear = { scale: 'linear', bottom: 0, top: 100 } as const;
    expect(raised(50, 20, 200, linear)).toBeCloseTo(60, 12);
    expect(raised(99, 20, 200, linear)).toBeCloseTo(95, 12);
    // Half of the height of four decades is two decades.
    expect(raised(1, 100, 200, { scale: 'log', bottom: 0.1, top: 1000 })).toBeCloseTo(100, 9);
  });
});
