import type { HarmonicFamily, SpectralLine, Spectrum } from '@overtally/contracts';
import {
  amplitudeAxis,
  amplitudeRange,
  raised,
  type Scale,
} from '../../../components/charts/amplitude-axis.js';
import type { PlotLayout } from '../../../components/plot-layout.js';
import type { PlotRelayoutEvent, PlotTrace } from '../../../components/plot.js';
import type { Palette } from '../../../lib/theme/palette.js';
import { lineMarks } from './family-marks.js';
import type { LetteredNote } from './note-letters.js';
import { letterTrace } from './order-chart.js';
import { isOver, type OrderRow } from './order-rows.js';
import { digitSeparators } from './waveform-chart.js';

/** A part of the frequency axis. */
export interface FrequencyRange {
  fromHz: number;
  toHz: number;
}

export interface FrequencyChartInput {
  spectrum: Spectrum;
  rows: readonly OrderRow[];
  /** Largest lines of the spectrum with the harmonic series among them. */
  lines: readonly SpectralLine[];
  families: readonly HarmonicFamily[];
  /** What is marked on the lines; a density has no lines to mark. */
  marks: 'orders' | 'lines';
  scale: Scale;
  relative: boolean;
  range: FrequencyRange;
  notes: readonly LetteredNote[];
  selectedHz: number | null;
  heightPx: number;
}

const margin = { l: 64, r: 12, t: 8, b: 30 };

/** Unit of the frequency axis, with the factor from Hz. */
export const frequencyUnit = (highestHz: number) =>
  highestHz >= 10_000 ? { unit: 'kHz', factor: 1e-3 } : { unit: 'Hz', factor: 1 };

/** All of a spectrum. */
export const wholeRange = ({ frequencyHz }: Pick<Spectrum, 'frequencyHz'>): FrequencyRange => ({
  fromHz: 0,
  toHz: frequencyHz.at(-1) ?? 1,
});

/** From zero to one order beyond the last; all of the spectrum where there are no orders. */
export function orderRange(spectrum: Spectrum, rows: readonly OrderRow[]): FrequencyRange {
  const whole = wholeRange(spectrum);
  const [last, first] = [rows.at(-1), rows.find((row) => row.order === 1)];
  if (!last) return whole;
  return { fromHz: 0, toHz: Math.min(whole.toHz, last.frequencyHz + (first?.frequencyHz ?? 0)) };
}

/** Unit of the values: of the channel, or of a density per root hertz. */
const spectrumUnit = ({ unit, scaling }: Spectrum) => (scaling === 'density' ? densityUnit(unit) : unit);
export const densityUnit = (unit: string) => `${unit || '1'}/√Hz`;

/** The line spectrum with marks at the orders or the largest lines, and the letters of notes on lines. */
export function frequencyChart(
  input: FrequencyChartInput,
  palette: Palette,
): { traces: PlotTrace[]; layout: PlotLayout; factor: number } {
  const { spectrum, rows, scale, range } = input;
  const reference = input.relative ? rows.find((row) => row.order === 1) : undefined;
  const gain = reference ? 100 / reference.rms : 1;
  const unit = reference ? '%' : spectrumUnit(spectrum);
  const { unit: hertz, factor } = frequencyUnit(range.toHz);
  const values = spectrum.rms.map((rms) => rms * gain);
  const shown = values.filter((_, i) => isWithin(spectrum.frequencyHz[i] ?? 0, range));
  const amplitudes = amplitudeRange(shown.length > 0 ? shown : values, [], scale, median(values));
  const letters = lettersAt(input, gain, factor, amplitudes, palette);
  return {
    factor,
    traces: [
      {
        type: 'scatter',
        mode: 'lines',
        x: spectrum.frequencyHz.map((hz) => hz * factor),
        y: values.map((value) => (value > 0 ? value : null)),
        line: { color: palette.ink, width: 1 },
        hovertemplate: `%{x:.6~g} ${hertz}<br>%{y:.4~g} ${unit}<extra></extra>`,
      },
      ...marksOf(input, { factor, gain, unit }, palette),
      ...(letters.length > 0 ? [letterTrace(letters, palette)] : []),
    ],
    layout: {
      margin,
      separators: digitSeparators,
      xaxis: {
        range: [range.fromHz * factor, range.toHz * factor],
        ticksuffix: ` ${hertz}`,
        exponentformat: 'none',
        separatethousands: false,
      },
      yaxis: amplitudeAxis(amplitudes, unit),
      shapes: input.selectedHz === null ? [] : [selectedLine(input.selectedHz * factor, palette)],
    },
  };
}

const isWithin = (hz: number, { fromHz, toHz }: FrequencyRange) => hz >= fromHz && hz <= toHz;

function marksOf(
  { spectrum, rows, lines, families, marks }: FrequencyChartInput,
  scale: { factor: number; gain: number; unit: string },
  palette: Palette,
): PlotTrace[] {
  if (spectrum.scaling === 'density') return [];
  if (marks === 'lines') return [lineMarks(lines, families, scale, palette)];
  return [orderMarks(rows, scale.gain, scale.factor, scale.unit, palette)];
}

/** The range that zooming in the chart asks for; `whole` after a double click, null for any other change. */
export function rangeOfRelayout(event: PlotRelayoutEvent, factor: number): FrequencyRange | 'whole' | null {
  if (event['xaxis.autorange'] === true) return 'whole';
  const from = event['xaxis.range[0]'];
  const to = event['xaxis.range[1]'];
  if (typeof from !== 'number' || typeof to !== 'number') return null;
  return { fromHz: Math.max(0, from / factor), toHz: to / factor };
}

/** Middle of the sorted values: the noise between the lines. */
const median = (values: readonly number[]) =>
  values.toSorted((a, b) => a - b)[Math.floor(values.length / 2)] ?? null;

/** Small marks on the orders, filled in vermilion where the order is over. */
function orderMarks(
  rows: readonly OrderRow[],
  gain: number,
  factor: number,
  unit: string,
  palette: Palette,
): PlotTrace {
  return {
    type: 'scatter',
    mode: 'markers',
    x: rows.map((row) => row.frequencyHz * factor),
    y: rows.map((row) => (row.rms > 0 ? row.rms * gain : null)),
    customdata: rows.map((row) => row.order),
    marker: {
      symbol: rows.map((row) => (isOver(row) ? 'circle' : 'circle-open')),
      size: 6,
      color: rows.map((row) => (isOver(row) ? palette.over : palette.act)),
    },
    hovertemplate: `Order %{customdata}<br>%{y:.4~g} ${unit}<extra></extra>`,
  };
}

function selectedLine(x: number, palette: Palette) {
  return {
    type: 'line',
    layer: 'below',
    x0: x,
    x1: x,
    yref: 'paper',
    y0: 0,
    y1: 1,
    line: { color: palette.act, width: 1, dash: 'dot' },
  };
}

function lettersAt(
  { spectrum, rows, notes, heightPx }: FrequencyChartInput,
  gain: number,
  factor: number,
  range: ReturnType<typeof amplitudeRange>,
  palette: Palette,
) {
  const plotHeight = heightPx - margin.t - margin.b;
  return notes.flatMap(({ letter, note: { target } }) => {
    if (target.kind === 'span') return [];
    const row = target.kind === 'order' ? rows.find(({ order }) => order === target.order) : undefined;
    const hz = target.kind === 'line' ? target.frequencyHz : row?.frequencyHz;
    if (hz === undefined) return [];
    const rms = row?.rms ?? spectrum.rms[nearestLine(spectrum, hz)] ?? 0;
    const color = row && isOver(row) ? palette.over : palette.ink;
    return [{ x: hz * factor, y: raised(rms * gain, 14, plotHeight, range), letter, color }];
  });
}

/** Index of the line nearest to `hz`. */
export function nearestLine({ frequencyHz }: Pick<Spectrum, 'frequencyHz'>, hz: number): number {
  let nearest = 0;
  frequencyHz.forEach((candidate, index) => {
    if (Math.abs(candidate - hz) < Math.abs((frequencyHz[nearest] ?? Infinity) - hz)) nearest = index;
  });
  return nearest;
}

/** Index of the strongest line within `reachHz` of `hz`, since a pointer rarely meets the peak itself. */
export function strongestNear(spectrum: Spectrum, hz: number, reachHz: number): number {
  let best = nearestLine(spectrum, hz);
  spectrum.frequencyHz.forEach((candidate, index) => {
    if (Math.abs(candidate - hz) > reachHz) return;
    if ((spectrum.rms[index] ?? 0) > (spectrum.rms[best] ?? 0)) best = index;
  });
  return best;
}
