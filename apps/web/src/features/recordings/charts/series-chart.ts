import type { Series } from '@overtally/contracts';
import { linearTicks } from '../../../components/charts/si-ticks.js';
import type { PlotLayout } from '../../../components/plot-layout.js';
import type { PlotTrace } from '../../../components/plot.js';
import { formatFixed } from '../../../lib/format.js';
import { formatToUncertainty } from '../../../lib/format-uncertainty.js';
import type { Palette } from '../../../lib/theme/palette.js';
import type { Span } from './span.js';
import { digitSeparators } from './waveform-chart.js';

export interface SeriesChartInput {
  series: Series;
  /** Where the analysed span begins in the record, in seconds: times of the series count from there. */
  fromS: number;
  /** Part of the record that the axis shows. */
  range: Span;
  /** Labels of the time axis, at most. */
  labels: number;
}

/** Unit of a long time axis, with the factor from seconds. */
export function longTimeUnit(lengthS: number): { unit: 's' | 'min' | 'h'; factor: number } {
  if (lengthS >= 7200) return { unit: 'h', factor: 1 / 3600 };
  return lengthS >= 300 ? { unit: 'min', factor: 1 / 60 } : { unit: 's', factor: 1 };
}

/** Length of a point: one interval, or what was thinned into it. */
function stepOf({ timeS, intervalS }: Series): number {
  const [first, second] = timeS;
  return first === undefined || second === undefined ? intervalS : Math.max(intervalS, second - first);
}

/** All that a series covers, in seconds of the record. */
export function wholeSeries(series: Series, fromS: number): Span {
  const last = series.timeS.at(-1) ?? 0;
  return { fromS: fromS + (series.timeS[0] ?? 0), toS: fromS + last + stepOf(series) };
}

/** Ends of the axis of values: all of them with some room, even where they are all the same. */
function valueRange(values: readonly (number | null)[]): [number, number] {
  const known = values.filter((value): value is number => value !== null);
  if (known.length === 0) return [0, 1];
  const low = known.reduce((a, b) => Math.min(a, b), Infinity);
  const high = known.reduce((a, b) => Math.max(a, b), -Infinity);
  const pad = high > low ? 0.1 * (high - low) : Math.abs(high) * 1e-3 || 1;
  return [low - pad, high + pad];
}

/** A figure as steps over time, with the intervals that are flagged hatched behind it. */
export function seriesChart(
  { series, fromS, range, labels }: SeriesChartInput,
  palette: Palette,
): { traces: PlotTrace[]; layout: PlotLayout; factor: number } {
  const { unit, factor } = longTimeUnit(range.toS - range.fromS);
  const step = stepOf(series);
  const starts = series.timeS.map((timeS) => fromS + timeS);
  const shown = series.value.filter((_, i) => {
    const start = starts[i] ?? 0;
    return start + step > range.fromS && start < range.toS;
  });
  const [bottom, top] = valueRange(shown);
  const lastStart = starts.at(-1);
  const ends = lastStart === undefined ? [] : [lastStart + step];
  const finest = (top - bottom) / 1000;
  return {
    factor,
    traces: [
      ...hatching(series, starts, step, factor, [bottom, top], palette),
      {
        type: 'scatter',
        mode: starts.length > 1 ? 'lines' : 'lines+markers',
        // Each value holds for its interval; the last one is drawn to its end.
        x: [...starts, ...ends].map((timeS) => timeS * factor),
        y: [...series.value, ...ends.map(() => series.value.at(-1) ?? null)],
        connectgaps: false,
        line: { color: palette.ink, width: 1.4, shape: 'hv' },
        customdata: [...starts, ...ends].map((timeS, i) =>
          [
            `from ${formatFixed(timeS, 2, 's')}`,
            formatToUncertainty(series.value[i], finest, series.unit),
            ...(series.flagged[i] ? ['flagged'] : []),
          ].join('<br>'),
        ),
        hovertemplate: '%{customdata}<extra></extra>',
      },
    ],
    layout: {
      separators: digitSeparators,
      margin: { l: 64, r: 12, t: 8, b: 30 },
      xaxis: {
        range: [range.fromS * factor, range.toS * factor],
        ticksuffix: ` ${unit}`,
        separatethousands: false,
        exponentformat: 'none',
        nticks: labels,
        tickangle: 0,
      },
      yaxis: {
        range: [bottom, top],
        fixedrange: true,
        tickmode: 'array',
        ...linearTicks(bottom, top, series.unit, 3),
        ticklabelstandoff: 6,
      },
    },
  };
}

/** Boxes over runs of flagged intervals, as one hatched shape. */
function hatching(
  { flagged }: Series,
  starts: readonly number[],
  step: number,
  factor: number,
  [bottom, top]: [number, number],
  palette: Palette,
): PlotTrace[] {
  const runs: Span[] = [];
  flagged.forEach((isFlagged, i) => {
    const start = starts[i];
    if (!isFlagged || start === undefined) return;
    const last = runs.at(-1);
    if (last && flagged[i - 1]) last.toS = start + step;
    else runs.push({ fromS: start, toS: start + step });
  });
  if (runs.length === 0) return [];
  const box = ({ fromS, toS }: Span) => [fromS, fromS, toS, toS, fromS].map((timeS) => timeS * factor);
  return [
    {
      type: 'scatter',
      mode: 'lines',
      x: runs.flatMap((run) => [...box(run), null]),
      y: runs.flatMap(() => [bottom, top, top, bottom, bottom, null]),
      line: { width: 1, color: palette.near },
      fill: 'toself',
      fillcolor: 'rgba(0,0,0,0)',
      fillpattern: { shape: '/', fgcolor: palette.near, bgcolor: 'rgba(0,0,0,0)', size: 6, solidity: 0.18 },
      hoverinfo: 'skip',
    },
  ];
}
