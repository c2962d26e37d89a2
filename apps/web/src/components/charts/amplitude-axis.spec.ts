import { describe, expect, it } from 'vitest';
import { amplitudeAxis, amplitudeRange, raised } from './amplitude-axis.js';

describe('axis of amplitudes', () => {
  it('ends a decade below the lowest limit when logarithmic', () => {
    const range = amplitudeRange([2.2, 1.19, null, 0], [2.3, 0.0495], 'log');
    expect(range.bottom).toBeCloseTo(0.00495, 12);
    expect(range.top).toBeGreaterThan(2.3);
  });

  it('goes below that for a fainter value, within the decades it is given', () => {
    expect(amplitudeRange([2.2], [2.3, 0.05], 'log', 0.003).bottom).toBeCloseTo(0.001, 12);
    expect(amplitudeRange([2.2], [2.3, 0.05], 'log', 1e-9, 6).bottom).toBeCloseTo(2.3e-6, 12);
    expect(amplitudeRange([2.2], [2.3, 0.05], 'log', 1).bottom).toBeCloseTo(0.005, 12);
  });

  it('reaches to the faintest value that should be seen, within three to eight decades', () => {
    expect(amplitudeRange([1], [], 'log', 3e-5).bottom).toBeCloseTo(1e-5, 12);
    expect(amplitudeRange([1], [], 'log', 0.5).bottom).toBeCloseTo(1e-3, 12);
    expect(amplitudeRange([1], [], 'log', 1e-30).bottom).toBeCloseTo(1e-8, 12);
  });

  it('shows four decades when nothing is said', () => {
    expect(amplitudeRange([10], [], 'log').bottom).toBeCloseTo(0.001, 12);
  });

  it('begins at zero when linear', () => {
    expect(amplitudeRange([10], [], 'linear').bottom).toBe(0);
  });

  it('stands without any value', () => {
    const { bottom, top } = amplitudeRange([null, 0, Number.NaN], [], 'log');
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
