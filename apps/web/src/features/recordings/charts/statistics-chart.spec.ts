import { describe, expect, it } from 'vitest';
import { light } from '../../../lib/theme/palette.js';
import { bandChart } from './band-chart.js';
import { statisticsChart } from './statistics-chart.js';

describe('statistics by order', () => {
  const rows = [
    { order: 1, mean: 10, p95: 11, p99: 11.5, max: 12 },
    { order: 3, mean: 0, p95: 0.1, p99: 0.2, max: 0.4 },
  ];

  it('reach from the mean to the highest, and keep a mean of zero at the foot of the axis', () => {
    const { traces, layout } = statisticsChart(rows, 'A', 2, light);
    const bottom = 10 ** (layout.yaxis?.range as number[])[0]!;
    expect(traces[0]?.y).toEqual([10, 12, null, expect.closeTo(bottom, 12), 0.4, null]);
    expect(traces.slice(1).map(({ y }) => (y as number[])[0])).toEqual([12, 11.5, 11, 10]);
  });
});

it('bands stand at their centres in kHz with their highest window over them', () => {
  const bands = [
    { centreHz: 2100, rms: 0.01, maxRms: 0.02 },
    { centreHz: 2300, rms: 0, maxRms: 0 },
  ];
  const [bars, highest] = bandChart(bands, 'A', light).traces;
  expect(bars).toMatchObject({ x: [2.1, 2.3], y: [0.01, null] });
  expect(highest?.y).toEqual([0.02, null]);
});
