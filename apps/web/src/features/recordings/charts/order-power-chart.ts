import type { PowerPair } from '@overtally/contracts';
import { linearTicks } from '../../../components/charts/si-ticks.js';
import type { PlotLayout } from '../../../components/plot-layout.js';
import type { PlotTrace } from '../../../components/plot.js';
import { formatFixed, formatSi } from '../../../lib/format.js';
import type { Palette } from '../../../lib/theme/palette.js';
import { brokenBarShapes, brokenLabel } from './broken-bar.js';
import { labelledOrders } from './order-chart.js';

type OrderPower = PowerPair['orders'][number];

const headroom = 1.15;
const margin = { l: 64, r: 12, t: 8, b: 30 };
/** Room for the value of a broken bar. */
const labelRoom = 20;

/** Ends of the axis for the orders from 2; order 1 alone where there are no others. */
function powerRange(orders: readonly OrderPower[]): [number, number] {
  const values = orders.filter(({ order }) => order > 1).map(({ P }) => P ?? 0);
  const known = values.some((value) => value !== 0) ? values : orders.map(({ P }) => P ?? 0);
  const top = known.reduce((a, b) => Math.max(a, b), 0);
  const bottom = known.reduce((a, b) => Math.min(a, b), 0);
  const span = top - bottom || 1;
  // Both directions stay to be seen, so that their names have a place.
  return [Math.min(bottom * headroom, -0.25 * span), Math.max(top * headroom, 0.25 * span)];
}

const words = { 'into-load': 'into the load', 'from-load': 'from the load' } as const;

function hoverText({ order, P, Q, phaseDifferenceDeg, direction }: OrderPower): string {
  return [
    `Order ${order}`,
    `P ${formatSi(P, 'W')}`,
    `Q ${formatSi(Q, 'var')}`,
    `angle ${formatFixed(phaseDifferenceDeg, 1, '°')}`,
    direction === null ? 'direction lies in the noise' : words[direction],
  ].join('<br>');
}

/** Active power by order: up into the load, down out of it; order 1 is broken where it is longer than the axis. */
export function orderPowerChart(
  orders: readonly OrderPower[],
  labelStep: number,
  palette: Palette,
): { traces: PlotTrace[]; layout: PlotLayout } {
  const [bottom, top] = powerRange(orders);
  const last = orders.reduce((most, { order }) => Math.max(most, order), 1);
  const first = orders.find(({ order }) => order === 1)?.P ?? 0;
  const isDown = first < bottom;
  const isBroken = isDown || first > top;
  const side = (text: string, isTop: boolean) => ({
    ...{ x: 1, xref: 'paper', xanchor: 'right', y: isTop ? 1 : 0, yref: 'paper' },
    yanchor: isTop ? 'top' : 'bottom',
    ...{ text, showarrow: false, font: { size: 12, color: palette.inkSoft } },
  });
  const isFrom = ({ direction }: OrderPower) => direction === 'from-load';
  return {
    traces: [
      {
        type: 'bar',
        x: orders.map(({ order }) => order),
        y: orders.map(({ P }) => P),
        marker: {
          color: orders.map(({ order, direction }) =>
            direction === null || order === 1 ? palette.ruleStrong : palette.ink,
          ),
          pattern: {
            shape: orders.map((order) => (isFrom(order) ? '/' : '')),
            fgcolor: palette.sheet,
            size: 5,
            solidity: 0.4,
          },
          line: { width: 0 },
        },
        customdata: orders.map(hoverText),
        hovertemplate: '%{customdata}<extra></extra>',
      },
    ],
    layout: {
      margin: {
        ...margin,
        t: margin.t + (isBroken && !isDown ? labelRoom : 0),
        b: margin.b + (isDown ? labelRoom : 0),
      },
      bargap: 0.4,
      hovermode: 'x',
      xaxis: {
        range: [0.3, last + 0.7],
        fixedrange: true,
        tickmode: 'array',
        tickvals: labelledOrders(last, labelStep),
        tickangle: 0,
        showline: false,
      },
      yaxis: {
        range: [bottom, top],
        fixedrange: true,
        zeroline: true,
        zerolinecolor: palette.inkSoft,
        zerolinewidth: 1,
        tickmode: 'array',
        ...linearTicks(bottom, top, 'W'),
        ticklabelstandoff: 6,
      },
      shapes: isBroken ? brokenBarShapes(1, isDown, palette) : [],
      annotations: [
        side('into the load ↑', true),
        side('from the load ↓', false),
        ...(isBroken ? [brokenLabel(1, formatSi(first, 'W'), isDown, palette)] : []),
      ],
    },
  };
}
