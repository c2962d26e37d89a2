import { describe, expect, it } from 'vitest';
import { overviewPath } from './overview-path.js';

const envelope = (minimum: (number | null)[], maximum: (number | null)[]) => ({
  kind: 'envelope' as const,
  values: [],
  minimum,
  maximum,
});

describe('overview of a record', () => {
  it('runs over the maxima and back under the minima', () => {
    expect(overviewPath(envelope([-1, -1], [1, 1]), 100, 12)).toBe('M0.0 0.5L100.0 0.5L100.0 11.5L0.0 11.5Z');
  });

  it('breaks where samples are missing', () => {
    const path = overviewPath(envelope([-1, null, -1], [1, null, 1]), 100, 12);
    expect(path.match(/M/g)).toHaveLength(2);
    expect(path).not.toContain('NaN');
  });

  it('shows a constant record as a line in the middle and nothing as nothing', () => {
    expect(overviewPath(envelope([5, 5], [5, 5]), 100, 12)).toBe('M0.0 5.5L100.0 5.5L100.0 6.5L0.0 6.5Z');
    expect(overviewPath(envelope([null], [null]), 100, 12)).toBe('');
  });
});
