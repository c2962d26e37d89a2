import type { Series } from '@overtally/contracts';
import { describe, expect, it } from 'vitest';
import { light } from '../../../lib/theme/palette.js';
import { longTimeUnit, seriesChart, wholeSeries, type SeriesChartInput } from './series-chart.js';

const series: Series = {
  ...{ channel: 0, figure: 'rms', order: null, unit: 'A', aggregation: 'window' },
  intervalS: 0.2,
  timeS: [0, 0.2, 0.4, 0.6],
  value: [2, 2.1, null, 2.05],
  flagged: [false, true, true, false],
  thinned: false,
};
const input = (change: Partial<SeriesChartInput> = {}): SeriesChartInput => ({
  series,
  fromS: 1,
  range: wholeSeries(series, 1),
  labels: 9,
  ...change,
});
const near = (...values: number[]) => values.map((value) => expect.closeTo(value, 9) as number);

describe('a figure over time', () => {
  it('stands at the times of the record, to the end of its last interval', () => {
    expect(wholeSeries(series, 1)).toEqual({ fromS: 1, toS: expect.closeTo(1.8, 12) });
    const line = seriesChart(input(), light).traces.at(-1);
    expect(line?.x).toEqual(near(1, 1.2, 1.4, 1.6, 1.8));
    expect(line?.y).toEqual([2, 2.1, null, 2.05, 2.05]);
    expect(line?.line).toMatchObject({ shape: 'hv' });
  });

  it('hatches neighbouring flagged intervals as one', () => {
    const [hatching] = seriesChart(input(), light).traces;
    expect(hatching?.x).toEqual([...near(1.2, 1.2, 1.6, 1.6, 1.2), null]);
    const { traces } = seriesChart(
      input({ series: { ...series, flagged: series.flagged.map(() => false) } }),
      light,
    );
    expect(traces).toHaveLength(1);
  });

  it('has an axis of values for what is in view, with room even where all values are the same', () => {
    const range = (change: Partial<SeriesChartInput>) =>
      seriesChart(input(change), light).layout.yaxis?.range as number[];
    expect(range({ range: { fromS: 1, toS: 1.1 } })).toEqual(near(1.998, 2.002));
    expect(range({ series: { ...series, value: [0, 0, 0, 0] } })).toEqual([-1, 1]);
  });

  it('covers what was thinned into its last point', () => {
    const thinned = { ...series, timeS: [0, 2, 4, 6], thinned: true };
    expect(wholeSeries(thinned, 0).toS).toBe(8);
  });

  it('counts in minutes and hours where the record is long', () => {
    expect([20, 600, 9000].map((lengthS) => longTimeUnit(lengthS).unit)).toEqual(['s', 'min', 'h']);
  });
});
