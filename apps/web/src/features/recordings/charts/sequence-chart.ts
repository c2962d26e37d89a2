import type { ThreePhase } from '@overtally/contracts';
import { amplitudeAxis, amplitudeRange } from '../../../components/charts/amplitude-axis.js';
import type { PlotLayout } from '../../../components/plot-layout.js';
import type { PlotTrace } from '../../../components/plot.js';
import { formatSi } from '../../../lib/format.js';
import { channelStyle } from '../../../lib/theme/channel-styles.js';
import { dark, type Palette } from '../../../lib/theme/palette.js';
import { labelledOrders } from './order-chart.js';

export type SequenceOrder = ThreePhase['voltageSequences'][number];

/** The three sequences, each with the same mark as a letter in text and as Plotly's symbol. */
export const sequences = [
  { key: 'positive', glyph: '●', symbol: 'circle', style: 0 },
  { key: 'negative', glyph: '□', symbol: 'square-open', style: 1 },
  { key: 'zero', glyph: '▲', symbol: 'triangle-up', style: 2 },
] as const;

export const sequenceColor = (style: number, palette: Palette): string =>
  palette === dark ? channelStyle(style).dark : channelStyle(style).light;

const mostDecades = 6;
/** Share of the marks that should be seen. */
const shareSeen = 0.9;

/** Symmetrical components by order, as marks over each order. */
export function sequenceChart(
  orders: readonly SequenceOrder[],
  unit: string,
  labelStep: number,
  palette: Palette,
): { traces: PlotTrace[]; layout: PlotLayout } {
  const values = orders.flatMap(({ zero, positive, negative }) => [zero.rms, positive.rms, negative.rms]);
  const known = values.filter((value) => value > 0).toSorted((a, b) => b - a);
  const faintest = known[Math.ceil(shareSeen * known.length) - 1] ?? null;
  const range = amplitudeRange(values, [], 'log', faintest, mostDecades);
  const last = orders.reduce((most, { order }) => Math.max(most, order), 1);
  return {
    traces: sequences.map(({ key, symbol, style }) => {
      const color = sequenceColor(style, palette);
      return {
        type: 'scatter',
        mode: 'markers',
        name: key,
        x: orders.map(({ order }) => order),
        y: orders.map((order) => (order[key].rms > 0 ? order[key].rms : null)),
        marker: { symbol, size: 8, color, line: { color, width: 1.5 } },
        customdata: orders.map((order) => `${key} ${formatSi(order[key].rms, unit)}`),
        hovertemplate: '%{customdata}<extra></extra>',
      };
    }),
    layout: {
      margin: { l: 64, r: 12, t: 8, b: 30 },
      hovermode: 'x unified',
      xaxis: {
        range: [0.3, last + 0.7],
        fixedrange: true,
        tickmode: 'array',
        tickvals: labelledOrders(last, labelStep),
        tickangle: 0,
        unifiedhovertitle: { text: 'Order %{x}' },
      },
      yaxis: amplitudeAxis(range, unit),
    },
  };
}
