import type { Waveform } from '@overtally/contracts';
import { linearTicks } from '../../../components/charts/si-ticks.js';
import type { PlotLayout } from '../../../components/plot-layout.js';
import type { PlotRelayoutEvent, PlotTrace } from '../../../components/plot.js';
import type { Palette } from '../../../lib/theme/palette.js';
import type { LetteredNote } from './note-letters.js';
import { letterTrace } from './order-chart.js';
import { extremes } from './overview-path.js';
import { timeUnit, type Span } from './span.js';

/** Points of the line: samples as they are, an envelope as one upright stroke per bin. Missing samples break it. */
export function waveformPoints(waveform: Waveform, factor: number): { x: number[]; y: (number | null)[] } {
  const { startS, stepS, kind, values, minimum, maximum } = waveform;
  if (kind === 'samples') {
    return { x: values.map((_, i) => (startS + i * stepS) * factor), y: values };
  }
  const middle = (i: number) => (startS + (i + 0.5) * stepS) * factor;
  return {
    x: minimum.flatMap((_, i) => [middle(i), middle(i)]),
    y: minimum.flatMap((value, i) => [value, maximum[i] ?? null]),
  };
}

/** Decimal point, and a narrow no-break space between groups of digits (ISO 80000-1, 7.3.1). */
export const digitSeparators = '.\u202f';

export interface WaveformChartInput {
  waveform: Waveform;
  /** Part of the record that the axis shows. */
  span: Span;
  notes: readonly LetteredNote[];
  /** Labels of the time axis, at most. */
  labels: number;
  /** A moment that is pointed at; null: none. */
  markS: number | null;
}

/** Trace and layout of the zoomed waveform with brackets and letters where notes speak of a time span. */
export function waveformChart(
  { waveform, span, notes, labels, markS }: WaveformChartInput,
  palette: Palette,
): { traces: PlotTrace[]; layout: PlotLayout } {
  const { unit, factor } = timeUnit(span.toS - span.fromS);
  const { lower, upper } = extremes(waveform);
  const known = [...lower, ...upper].filter((value): value is number => value !== null);
  const low = known.reduce((a, b) => Math.min(a, b), Infinity);
  const high = known.reduce((a, b) => Math.max(a, b), -Infinity);
  const pad = high > low ? (high - low) * 0.06 : Math.abs(high) * 0.1 || 1;
  const [bottom, top] = known.length > 0 ? [low - pad, high + pad] : [-1, 1];
  const spans = notedSpans(notes, span);
  return {
    traces: [
      {
        type: 'scatter',
        mode: 'lines',
        ...waveformPoints(waveform, factor),
        connectgaps: false,
        line: { color: palette.ink, width: 1.4 },
        hovertemplate: `%{x:.6~g} ${unit}<br>%{y:.4~g} ${waveform.unit}<extra></extra>`,
      },
      ...letters(spans, span, factor, top - (top - bottom) * 0.08, palette),
    ],
    layout: {
      separators: digitSeparators,
      margin: { l: 64, r: 12, t: 8, b: 30 },
      xaxis: {
        range: [span.fromS * factor, span.toS * factor],
        ticksuffix: ` ${unit}`,
        separatethousands: false,
        exponentformat: 'none',
        showline: false,
        nticks: labels,
        tickangle: 0,
      },
      yaxis: {
        range: [bottom, top],
        fixedrange: true,
        tickmode: 'array',
        ...linearTicks(bottom, top, waveform.unit, 3),
        ticklabelstandoff: 6,
      },
      shapes: [
        ...spans.flatMap(({ fromS, toS }) => bracket(fromS * factor, toS * factor, palette)),
        ...(markS === null ? [] : [pointer(markS * factor, palette)]),
      ],
    },
  };
}

type NotedSpan = Span & { letter: string };

/** Spans of notes that reach into the view. */
function notedSpans(notes: readonly LetteredNote[], view: Span): NotedSpan[] {
  return notes.flatMap(({ letter, note: { target } }) =>
    target.kind === 'span' && target.fromS < view.toS && target.toS > view.fromS
      ? [{ fromS: target.fromS, toS: target.toS, letter }]
      : [],
  );
}

function letters(spans: readonly NotedSpan[], view: Span, factor: number, y: number, palette: Palette) {
  const middle = ({ fromS, toS }: Span) => (Math.max(fromS, view.fromS) + Math.min(toS, view.toS)) / 2;
  const marks = spans.map((noted) => ({
    x: middle(noted) * factor,
    y,
    letter: noted.letter,
    color: palette.ink,
  }));
  return marks.length > 0 ? [letterTrace(marks, palette)] : [];
}

/** A line along the top from end to end, with a dotted one down from each end. */
function bracket(from: number, to: number, palette: Palette) {
  const line = (x0: number, x1: number, y0: number, dash: string) => ({
    type: 'line',
    layer: 'below',
    ...{ x0, x1, yref: 'paper', y0, y1: 1 },
    line: { color: palette.inkSoft, width: 1, dash },
  });
  return [line(from, to, 1, 'solid'), line(from, from, 0, 'dot'), line(to, to, 0, 'dot')];
}

/** An upright line at a moment. */
function pointer(x: number, palette: Palette) {
  return {
    type: 'line',
    layer: 'below',
    ...{ x0: x, x1: x, yref: 'paper', y0: 0, y1: 1 },
    line: { color: palette.near, width: 2 },
  };
}

/** The span that zooming in the chart asks for; `whole` after a double click, null for any other change. */
export function spanOfRelayout(event: PlotRelayoutEvent, shown: Span): Span | 'whole' | null {
  if (event['xaxis.autorange'] === true) return 'whole';
  const { factor } = timeUnit(shown.toS - shown.fromS);
  const from = event['xaxis.range[0]'];
  const to = event['xaxis.range[1]'];
  if (typeof from !== 'number' || typeof to !== 'number') return null;
  return { fromS: from / factor, toS: to / factor };
}
