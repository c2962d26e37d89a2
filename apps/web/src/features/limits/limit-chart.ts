import type { LimitEntry, LimitSet } from '@overtally/contracts';
import { amplitudeAxis, amplitudeRange, type Scale } from '../../components/charts/amplitude-axis.js';
import { ceilingTraces } from '../../components/charts/limit-ceiling.js';
import type { PlotLayout } from '../../components/plot-layout.js';
import type { PlotTrace } from '../../components/plot.js';
import { formatSi } from '../../lib/format.js';
import type { Palette } from '../../lib/theme/palette.js';
import { unitOfEntry } from './limit-words.js';

/** The limits in the set's own unit; others cannot stand on the same axis. */
export const drawnOrders = (set: LimitSet): LimitEntry[] =>
  set.orders.filter((entry) => unitOfEntry(entry, set) === unitOfEntry({}, set));

/** The limits of a set as a ceiling over the orders, in the set's own unit. */
export function limitChart(
  set: LimitSet,
  scale: Scale,
  palette: Palette,
): { traces: PlotTrace[]; layout: PlotLayout } {
  const { unit } = set;
  const orders = drawnOrders(set);
  const limits = orders.map(({ limit }) => limit);
  const range = amplitudeRange([], limits, scale);
  const last = orders.reduce((highest, { order }) => Math.max(highest, order), 2);
  const step = last > 60 ? 10 : last > 24 ? 4 : 2;
  return {
    traces: [
      ...ceilingTraces(orders, range.top, palette),
      {
        type: 'scatter',
        mode: 'markers',
        x: orders.map(({ order }) => order),
        y: limits,
        marker: { size: 5, color: palette.act },
        customdata: orders.map(
          ({ order, limit }) => `Order ${order}<br>${formatSi(limit, unit, { trim: true })}`,
        ),
        hovertemplate: '%{customdata}<extra></extra>',
      },
    ],
    layout: {
      margin: { l: 64, r: 12, t: 8, b: 40 },
      hovermode: 'closest',
      xaxis: {
        range: [1, last + 1],
        fixedrange: true,
        tickmode: 'array',
        tickvals: Array.from({ length: Math.floor((last - 3) / step) + 1 }, (_, i) => 3 + i * step),
        title: { text: 'Order' },
      },
      yaxis: amplitudeAxis(range, unit),
    },
  };
}
