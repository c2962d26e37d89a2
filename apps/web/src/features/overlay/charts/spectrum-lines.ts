import type { Spectrum } from '@overtally/contracts';
import { amplitudeAxis, amplitudeRange } from '../../../components/charts/amplitude-axis.js';
import type { PlotLayout } from '../../../components/plot-layout.js';
import type { PlotTrace } from '../../../components/plot.js';
import { formatSi } from '../../../lib/format.js';
import { dark, type Palette } from '../../../lib/theme/palette.js';
import type { OverlayView } from '../overlay-link.js';
import { axisUnit, gainOf, ordersShown, valueAt, type OverlaySeries } from '../series.js';
import { lineMarks } from './line-marks.js';

/** A channel with its spectrum once that has arrived. */
export interface SpectrumOf {
  series: OverlaySeries;
  spectrum: Spectrum;
}

/** Every spectrum as a line, with its marker at the orders, so that it can be told apart without colour. */
export function spectrumLines(
  spectra: readonly SpectrumOf[],
  view: OverlayView,
  palette: Palette,
): { traces: PlotTrace[]; layout: PlotLayout } {
  const unit = axisUnit(
    spectra.map(({ series }) => series),
    view.amplitude,
  );
  const endHz = Math.max(1, ...spectra.map(endOf));
  const hertz = endHz >= 10_000 ? { unit: 'kHz', factor: 1e-3 } : { unit: 'Hz', factor: 1 };
  const lines = spectra.flatMap((one) => {
    const gain = gainOf(one.series.summary, view.amplitude);
    return gain === null ? [] : [{ ...one, values: one.spectrum.rms.map((rms) => rms * gain) }];
  });
  const range = amplitudeRange(
    lines.flatMap(({ values }) => values),
    [],
    view.scale,
  );
  return {
    traces: lines.flatMap(({ series, spectrum, values }) => [
      spectrumLine(series, spectrum, values, hertz, unit, palette),
      orderMarks(series, view, hertz.factor, unit, palette),
    ]),
    layout: {
      margin: { l: 64, r: 12, t: 8, b: 44 },
      xaxis: {
        range: [0, endHz * hertz.factor],
        title: { text: `Frequency in ${hertz.unit}` },
        exponentformat: 'none',
        separatethousands: false,
      },
      yaxis: amplitudeAxis(range, unit),
    },
  };
}

/** Where the view of a spectrum ends: after its last order, or at its end where it has none. */
function endOf({ series: { summary }, spectrum }: SpectrumOf): number {
  const lastHz = spectrum.frequencyHz.at(-1) ?? 0;
  const orders = summary.harmonicRms.length;
  return summary.fundamentalHz === null || orders === 0
    ? lastHz
    : Math.min(lastHz, (orders + 1) * summary.fundamentalHz);
}

function spectrumLine(
  { style, label }: OverlaySeries,
  { frequencyHz }: Spectrum,
  values: readonly number[],
  hertz: { unit: string; factor: number },
  unit: string,
  palette: Palette,
): PlotTrace {
  const { color } = lineMarks(style, palette === dark);
  return {
    type: 'scatter',
    mode: 'lines',
    name: label,
    x: frequencyHz.map((hz) => hz * hertz.factor),
    y: values.map((value) => (value > 0 ? value : null)),
    line: { color, width: 1 },
    opacity: 0.8,
    hovertemplate: `${label}<br>%{x:.6~g} ${hertz.unit}<br>%{y:.4~g} ${unit}<extra></extra>`,
  };
}

function orderMarks(
  series: OverlaySeries,
  view: OverlayView,
  factor: number,
  unit: string,
  palette: Palette,
): PlotTrace {
  const { color, symbol } = lineMarks(series.style, palette === dark);
  const { fundamentalHz } = series.summary;
  const orders = fundamentalHz === null ? [] : ordersShown([series], view.orders);
  const values = orders.map((order) => valueAt(series.summary, order, view.amplitude));
  return {
    type: 'scatter',
    mode: 'markers',
    x: orders.map((order) => order * (fundamentalHz ?? 0) * factor),
    y: values.map((value) => (value !== null && value > 0 ? value : null)),
    marker: { color, symbol, size: 8, line: { color, width: 1.5 } },
    customdata: orders.map((order, i) => `${series.label}<br>Order ${order}, ${formatSi(values[i], unit)}`),
    hovertemplate: '%{customdata}<extra></extra>',
  };
}
