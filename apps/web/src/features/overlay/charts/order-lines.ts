import { amplitudeAxis, amplitudeRange } from '../../../components/charts/amplitude-axis.js';
import { ceilingTraces, type OrderLimit } from '../../../components/charts/limit-ceiling.js';
import type { PlotLayout } from '../../../components/plot-layout.js';
import type { PlotTrace } from '../../../components/plot.js';
import { formatSi } from '../../../lib/format.js';
import { dark, type Palette } from '../../../lib/theme/palette.js';
import type { OverlayView } from '../overlay-link.js';
import { axisUnit, ordersShown, valueAt, type OverlaySeries } from '../series.js';
import { lineMarks } from './line-marks.js';

/** Every channel as a line with markers over the orders, under one ceiling. */
export function orderLines(
  series: readonly OverlaySeries[],
  view: OverlayView,
  limits: readonly OrderLimit[],
  palette: Palette,
): { traces: PlotTrace[]; layout: PlotLayout } {
  const orders = ordersShown(series, view.orders);
  const unit = axisUnit(series, view.amplitude);
  const last = orders.at(-1) ?? 1;
  const shownLimits = limits.filter(({ order }) => order <= last + 1);
  const lines = series.map((one) => ({
    one,
    values: orders.map((order) => valueAt(one.summary, order, view.amplitude)),
  }));
  const range = amplitudeRange(
    lines.flatMap(({ values }) => values),
    shownLimits.map(({ limit }) => limit),
    view.scale,
  );
  return {
    traces: [
      ...ceilingTraces(shownLimits, range.top, palette),
      ...lines.map(({ one, values }) => line(one, orders, values, unit, palette)),
    ],
    layout: {
      margin: { l: 64, r: 12, t: 8, b: 40 },
      hovermode: 'x unified',
      xaxis: {
        range: [0.3, last + 0.9],
        fixedrange: true,
        tickmode: 'array',
        tickvals: labelled(orders, last),
        tickangle: 0,
        title: { text: 'Order' },
        unifiedhovertitle: { text: 'Order %{x}' },
      },
      yaxis: amplitudeAxis(range, unit),
    },
  };
}

/** About twenty labels at most, at odd orders. */
function labelled(orders: readonly number[], last: number): number[] {
  const step = last > 80 ? 10 : last > 41 ? 4 : 2;
  return orders.filter((order) => order % 2 === 1 && (order - 1) % step === 0);
}

function line(
  { style, label, name }: OverlaySeries,
  orders: readonly number[],
  values: readonly (number | null)[],
  unit: string,
  palette: Palette,
): PlotTrace {
  const { color, dash, symbol } = lineMarks(style, palette === dark);
  return {
    type: 'scatter',
    mode: 'lines+markers',
    name: label,
    x: [...orders],
    // A logarithmic axis has no place for zero.
    y: values.map((value) => (value !== null && value > 0 ? value : null)),
    customdata: values.map((value) => `${formatSi(value, unit)}  ${label}, ${name}`),
    hovertemplate: '%{customdata}<extra></extra>',
    line: { color, dash, width: 1.5 },
    marker: { color, symbol, size: 8, line: { color, width: 1.5 } },
    connectgaps: false,
  };
}
