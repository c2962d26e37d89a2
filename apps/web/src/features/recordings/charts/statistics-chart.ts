import type { Statistics } from '@overtally/contracts';
import { amplitudeAxis, amplitudeRange } from '../../../components/charts/amplitude-axis.js';
import type { PlotLayout } from '../../../components/plot-layout.js';
import type { PlotTrace } from '../../../components/plot.js';
import { formatSi } from '../../../lib/format.js';
import type { Palette } from '../../../lib/theme/palette.js';
import { labelledOrders } from './order-chart.js';

/** What an order did over the windows. */
export interface OrderStatistics extends Statistics {
  order: number;
}

/** Decades that the axis spans at most. */
const mostDecades = 6;

/** Every order as a line from its mean to its largest value, with marks at the percentiles. */
export function statisticsChart(
  rows: readonly OrderStatistics[],
  unit: string,
  labelStep: number,
  palette: Palette,
): { traces: PlotTrace[]; layout: PlotLayout } {
  const faintest = rows.map(({ mean }) => mean).reduce((a, b) => (b > 0 ? Math.min(a, b) : a), Infinity);
  const range = amplitudeRange(
    rows.map(({ max }) => max),
    [],
    'log',
    Number.isFinite(faintest) ? faintest : null,
    mostDecades,
  );
  const last = rows.reduce((most, { order }) => Math.max(most, order), 1);
  const onLog = (value: number) => (value > 0 ? Math.max(value, range.bottom) : range.bottom);
  const marks = (key: keyof Statistics, symbol: string, size: number): PlotTrace => ({
    type: 'scatter',
    mode: 'markers',
    x: rows.map(({ order }) => order),
    y: rows.map((row) => onLog(row[key])),
    marker: { symbol, size, color: palette.ink, line: { color: palette.ink, width: 1.5 } },
    ...(key === 'mean'
      ? { customdata: rows.map((row) => hoverText(row, unit)), hovertemplate: '%{customdata}<extra></extra>' }
      : { hoverinfo: 'skip' }),
  });
  return {
    traces: [
      {
        type: 'scatter',
        mode: 'lines',
        x: rows.flatMap(({ order }) => [order, order, null]),
        y: rows.flatMap(({ mean, max }) => [onLog(mean), onLog(max), null]),
        line: { color: palette.ruleStrong, width: 3 },
        hoverinfo: 'skip',
      },
      marks('max', 'triangle-up', 7),
      marks('p99', 'line-ew', 6),
      marks('p95', 'line-ew', 10),
      marks('mean', 'circle', 6),
    ],
    layout: {
      margin: { l: 64, r: 12, t: 8, b: 30 },
      hovermode: 'x',
      xaxis: {
        range: [0.3, last + 0.7],
        fixedrange: true,
        tickmode: 'array',
        tickvals: labelledOrders(last, labelStep),
        tickangle: 0,
      },
      yaxis: amplitudeAxis(range, unit),
    },
  };
}

function hoverText({ order, mean, p95, p99, max }: OrderStatistics, unit: string): string {
  const show = (value: number) => formatSi(value, unit);
  return [
    `Order ${order}`,
    `mean ${show(mean)}`,
    `95 % ${show(p95)}`,
    `99 % ${show(p99)}`,
    `highest ${show(max)}`,
  ].join('<br>');
}
