import type { Palette } from '../../lib/theme/palette.js';
import type { PlotTrace } from '../plot.js';

/** Limit of one order, in the unit of the axis. */
export interface OrderLimit {
  order: number;
  limit: number;
}

/** Runs of neighbouring orders, since a ceiling has gaps where orders carry no limit. */
function runs(limits: readonly OrderLimit[]): OrderLimit[][] {
  const found: OrderLimit[][] = [];
  for (const entry of limits.toSorted((a, b) => a.order - b.order)) {
    const last = found.at(-1);
    if (last && entry.order - (last.at(-1)?.order ?? 0) === 1) last.push(entry);
    else found.push([entry]);
  }
  return found;
}

const left = (order: number) => order - 0.5;
const right = (order: number) => order + 0.5;

/** Stepped line over the orders; null breaks it between runs. */
export function ceilingSteps(limits: readonly OrderLimit[]): { x: (number | null)[]; y: (number | null)[] } {
  const x: (number | null)[] = [];
  const y: (number | null)[] = [];
  for (const run of runs(limits)) {
    if (x.length > 0) {
      x.push(null);
      y.push(null);
    }
    for (const { order, limit } of run) {
      x.push(left(order), right(order));
      y.push(limit, limit);
    }
  }
  return { x, y };
}

/** Closed outline between each run of the ceiling and `top`, for the hatching above it. */
function outline(limits: readonly OrderLimit[], top: number): { x: (number | null)[]; y: (number | null)[] } {
  const x: (number | null)[] = [];
  const y: (number | null)[] = [];
  for (const run of runs(limits)) {
    const first = run[0];
    const last = run.at(-1);
    if (!first || !last) continue;
    if (x.length > 0) {
      x.push(null);
      y.push(null);
    }
    x.push(left(first.order), ...run.flatMap(({ order }) => [left(order), right(order)]), right(last.order));
    y.push(top, ...run.flatMap(({ limit }) => [limit, limit]), top);
    x.push(left(first.order));
    y.push(top);
  }
  return { x, y };
}

/**
 * The limit as a ceiling: a stepped line with hatching up to `top`. Both traces stay out of the legend and
 * the hover; the table twin carries the numbers.
 */
export function ceilingTraces(limits: readonly OrderLimit[], top: number, palette: Palette): PlotTrace[] {
  if (limits.length === 0) return [];
  const quiet = { type: 'scatter', mode: 'lines', hoverinfo: 'skip', showlegend: false } as const;
  return [
    {
      ...quiet,
      ...outline(limits, top),
      line: { width: 0 },
      fill: 'toself',
      fillcolor: 'rgba(0,0,0,0)',
      fillpattern: { shape: '/', fgcolor: palette.rule, bgcolor: 'rgba(0,0,0,0)', size: 7, solidity: 0.14 },
    },
    { ...quiet, ...ceilingSteps(limits), line: { color: palette.act, width: 1.5 }, connectgaps: false },
  ];
}
