import type { Waveform } from '@overtally/contracts';
import { linearTicks } from '../../../components/charts/si-ticks.js';
import type { PlotLayout } from '../../../components/plot-layout.js';
import type { PlotRelayoutEvent, PlotTrace } from '../../../components/plot.js';
import type { Palette } from '../../../lib/theme/palette.js';
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

/** Trace and layout of the zoomed waveform over `span`. */
export function waveformChart(
  waveform: Waveform,
  span: Span,
  palette: Palette,
): { traces: PlotTrace[]; layout: PlotLayout } {
  const { unit, factor } = timeUnit(span.toS - span.fromS);
  const { lower, upper } = extremes(waveform);
  const known = [...lower, ...upper].filter((value): value is number => value !== null);
  const low = known.reduce((a, b) => Math.min(a, b), Infinity);
  const high = known.reduce((a, b) => Math.max(a, b), -Infinity);
  const pad = high > low ? (high - low) * 0.06 : Math.abs(high) * 0.1 || 1;
  const range = known.length > 0 ? [low - pad, high + pad] : [-1, 1];
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
    ],
    layout: {
      margin: { l: 64, r: 12, t: 8, b: 30 },
      xaxis: {
        range: [span.fromS * factor, span.toS * factor],
        ticksuffix: ` ${unit}`,
        separatethousands: false,
        exponentformat: 'none',
        showline: false,
        nticks: 9,
      },
      yaxis: {
        range,
        fixedrange: true,
        tickmode: 'array',
        ...linearTicks(range[0] ?? -1, range[1] ?? 1, waveform.unit, 3),
      },
    },
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
