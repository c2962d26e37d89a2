import {
  amplitudeAxis,
  amplitudeRange,
  raised,
  type AmplitudeRange,
  type Scale,
} from '../../../components/charts/amplitude-axis.js';
import { ceilingTraces } from '../../../components/charts/limit-ceiling.js';
import type { PlotLayout } from '../../../components/plot-layout.js';
import type { PlotTrace } from '../../../components/plot.js';
import { formatPercent, formatSi } from '../../../lib/format.js';
import type { Palette } from '../../../lib/theme/palette.js';
import { brokenBarShapes, brokenLabel } from './broken-bar.js';
import type { LetteredNote } from './note-letters.js';
import { isOver, resultWords, type OrderRow } from './order-rows.js';

export interface OrderChartInput {
  rows: readonly OrderRow[];
  /** Unit of the channel. */
  unit: string;
  scale: Scale;
  /** In percent of the fundamental instead of the channel's unit. */
  relative: boolean;
  notes: readonly LetteredNote[];
  /** Order to be seen as selected. */
  selected: number | null;
  /** Orders between two labels of the axis: 2 labels odd orders. */
  labelStep: number;
  heightPx: number;
}

/** Share of the orders that should be seen on a logarithmic axis. */
const shareSeen = 0.9;
/** Decades that such an axis spans at most; under limits fewer, so that these can be told apart. */
const mostDecades = { underLimits: 6, alone: 8 };
const margin = { l: 64, r: 12, t: 8, b: 30 };
/** Room above the plot for the value of a broken bar. */
const labelRoom = 20;

interface OrderScale {
  range: AmplitudeRange;
  /** Order 1 is longer than the axis and drawn broken. */
  isBroken: boolean;
}

/**
 * Range of the axis. A linear one is made for the orders from 2, since order 1 would flatten all others; order 1 is
 * broken where it does not fit.
 */
function orderScale(
  rows: readonly OrderRow[],
  values: readonly number[],
  limits: readonly number[],
  scale: Scale,
): OrderScale {
  if (scale === 'log') {
    const strongest = values.filter((value) => value > 0).toSorted((a, b) => b - a);
    const faintest = strongest[Math.ceil(shareSeen * strongest.length) - 1] ?? null;
    const decades = limits.length > 0 ? mostDecades.underLimits : mostDecades.alone;
    return { range: amplitudeRange(values, limits, scale, faintest, decades), isBroken: false };
  }
  const others = values.filter((_, i) => rows[i]?.order !== 1);
  const isAlone = !others.some((value) => value > 0) && limits.length === 0;
  const range = amplitudeRange(isAlone ? values : others, limits, scale);
  const first = values[rows.findIndex((row) => row.order === 1)] ?? 0;
  return { range, isBroken: first > range.top };
}

/** Orders that lie below the axis, for the mark that says so. */
function isBelowAxis(value: number, { scale, bottom }: AmplitudeRange): boolean {
  return scale === 'log' && value < bottom;
}

export interface OrderChart {
  traces: PlotTrace[];
  layout: PlotLayout;
  /** Orders that are marked as lying below the axis. */
  belowAxis: number;
}

/** Bars by order under the limit as a ceiling, with the letters of notes over their orders. */
export function orderChart(input: OrderChartInput, palette: Palette): OrderChart {
  const { rows, scale, relative, selected } = input;
  const fundamental = rows.find((row) => row.order === 1)?.rms ?? null;
  const factor = relative && fundamental ? 100 / fundamental : 1;
  const unit = relative ? '%' : input.unit;
  const limits = rows.flatMap(({ order, limit }) =>
    limit === null ? [] : [{ order, limit: limit * factor }],
  );
  const values = rows.map((row) => row.compared * factor);
  const ceiling = limits.map(({ limit }) => limit);
  const { range, isBroken } = orderScale(rows, values, ceiling, scale);
  const lastOrder = rows.reduce((last, { order }) => Math.max(last, order), 1);
  const plotMargin = { ...margin, t: margin.t + (isBroken ? labelRoom : 0) };
  const below = rows.filter((_, i) => isBelowAxis(values[i] ?? 0, range));
  const first = values[rows.findIndex((row) => row.order === 1)] ?? 0;
  return {
    belowAxis: below.length,
    traces: [
      // The hatching lies behind the bars, the line of the limit and the letters before them.
      ...ceilingTraces(limits, range.top, palette).map((trace, i) => ({ ...trace, zorder: i === 0 ? 0 : 2 })),
      bars(rows, values, unit, range, palette),
      ...(below.length > 0 ? [belowMarks(below, factor, unit, range, palette)] : []),
      ...letters(input, factor, range, plotMargin, palette),
    ],
    layout: {
      margin: plotMargin,
      bargap: 0.4,
      hovermode: 'x',
      xaxis: {
        range: [0.3, lastOrder + 0.7],
        fixedrange: true,
        tickmode: 'array',
        tickvals: labelledOrders(lastOrder, input.labelStep),
        tickangle: 0,
      },
      yaxis: amplitudeAxis(range, unit),
      shapes: [
        ...(selected === null ? [] : [selection(selected, palette)]),
        ...(isBroken ? brokenBarShapes(1, false, palette) : []),
      ],
      annotations: isBroken ? [brokenLabel(1, formatSi(first, unit), false, palette)] : [],
    },
  };
}

/** Small open marks at the foot of the axis for orders that lie below it. */
function belowMarks(
  rows: readonly OrderRow[],
  factor: number,
  unit: string,
  range: AmplitudeRange,
  palette: Palette,
): PlotTrace {
  return {
    type: 'scatter',
    mode: 'markers',
    zorder: 1,
    x: rows.map((row) => row.order),
    y: rows.map(() => raised(range.bottom, 5, 240, range)),
    marker: { symbol: 'triangle-down-open', size: 7, color: palette.inkSoft },
    hovertemplate: '%{customdata}<extra></extra>',
    customdata: rows.map((row) => hoverText(row, row.compared * factor, unit)),
  };
}

/** Orders that get a label: odd ones for a step of 2, else 1 and the multiples of the step. */
export const labelledOrders = (last: number, step: number) =>
  Array.from({ length: last }, (_, i) => i + 1).filter((order) =>
    step === 2 ? order % 2 === 1 : order === 1 || order % step === 0,
  );

function barColor(row: OrderRow, palette: Palette): string {
  if (row.order === 1) return palette.ruleStrong;
  if (row.result === 'disregarded') return palette.inkSoft;
  return isOver(row) ? palette.over : palette.ink;
}

function bars(
  rows: readonly OrderRow[],
  values: readonly number[],
  unit: string,
  range: AmplitudeRange,
  palette: Palette,
): PlotTrace {
  return {
    type: 'bar',
    zorder: 1,
    x: rows.map((row) => row.order),
    y: values.map((value) => (value > 0 && !isBelowAxis(value, range) ? value : null)),
    marker: { color: rows.map((row) => barColor(row, palette)), line: { width: 0 } },
    hovertemplate: '%{customdata}<extra></extra>',
    customdata: rows.map((row, i) => hoverText(row, values[i] ?? 0, unit)),
  };
}

function hoverText(row: OrderRow, value: number, unit: string): string {
  const parts = [`Order ${row.order}`, formatSi(value, unit)];
  if (row.order > 1 && unit !== '%') parts.push(`${formatPercent(row.percentOfFundamental, 2)} of order 1`);
  if (row.sharePercent !== null) parts.push(`${formatPercent(row.sharePercent)} of its limit`);
  if (row.result !== null) parts.push(resultWords[row.result]);
  return parts.join('<br>');
}

function selection(order: number, palette: Palette) {
  return {
    type: 'rect',
    layer: 'below',
    x0: order - 0.5,
    x1: order + 0.5,
    yref: 'paper',
    y0: 0,
    y1: 1,
    fillcolor: palette.wash,
    line: { width: 0 },
  };
}

/** Circled letters above their bars; several on one order stand over each other. */
function letters(
  { rows, notes, heightPx }: OrderChartInput,
  factor: number,
  range: AmplitudeRange,
  plotMargin: { t: number; b: number },
  palette: Palette,
): PlotTrace[] {
  const plotHeight = heightPx - plotMargin.t - plotMargin.b;
  const placed = new Map<number, number>();
  const marks = notes.flatMap(({ letter, note }) => {
    if (note.target.kind !== 'order') return [];
    const { order } = note.target;
    const row = rows.find((candidate) => candidate.order === order);
    if (!row) return [];
    const below = placed.get(order) ?? 0;
    placed.set(order, below + 1);
    const y = raised(row.compared * factor, 14 + 20 * below, plotHeight, range);
    return [{ x: order, y, letter, color: isOver(row) ? palette.over : palette.ink }];
  });
  return marks.length === 0 ? [] : [letterTrace(marks, palette)];
}

/** Letters in circles at their places. */
export function letterTrace(
  marks: readonly { x: number; y: number; letter: string; color: string }[],
  palette: Palette,
): PlotTrace {
  const colors = marks.map((mark) => mark.color);
  return {
    type: 'scatter',
    mode: 'markers+text',
    zorder: 3,
    x: marks.map((mark) => mark.x),
    y: marks.map((mark) => mark.y),
    text: marks.map((mark) => `<b>${mark.letter}</b>`),
    textfont: { size: 11, color: colors },
    marker: { symbol: 'circle', size: 17, color: palette.sheet, line: { width: 1.2, color: colors } },
    hoverinfo: 'skip',
    cliponaxis: false,
  };
}
