import type { Band } from '@overtally/contracts';
import { amplitudeAxis, amplitudeRange } from '../../../components/charts/amplitude-axis.js';
import type { PlotLayout } from '../../../components/plot-layout.js';
import type { PlotTrace } from '../../../components/plot.js';
import { formatHz, formatSi } from '../../../lib/format.js';
import type { Palette } from '../../../lib/theme/palette.js';

const widthKHz = 0.2;

/** Bands as bars of their rms over the windows, each with a mark at its highest window. */
export function bandChart(
  bands: readonly Band[],
  unit: string,
  palette: Palette,
): { traces: PlotTrace[]; layout: PlotLayout } {
  const faintest = bands.map(({ rms }) => rms).reduce((a, b) => (b > 0 ? Math.min(a, b) : a), Infinity);
  const range = amplitudeRange(
    bands.map(({ maxRms }) => maxRms),
    [],
    'log',
    Number.isFinite(faintest) ? faintest : null,
  );
  const x = bands.map(({ centreHz }) => centreHz / 1000);
  const ends = [x[0] ?? 2, x.at(-1) ?? 9];
  return {
    traces: [
      {
        type: 'bar',
        x,
        y: bands.map(({ rms }) => (rms > 0 ? rms : null)),
        width: bands.map(() => widthKHz * 0.8),
        marker: { color: palette.ink, line: { width: 0 } },
        customdata: bands.map(({ centreHz, rms, maxRms }) =>
          [
            `${formatHz(centreHz - 100, 0)} to ${formatHz(centreHz + 100, 0)}`,
            `rms ${formatSi(rms, unit)}`,
            `highest window ${formatSi(maxRms, unit)}`,
          ].join('<br>'),
        ),
        hovertemplate: '%{customdata}<extra></extra>',
      },
      {
        type: 'scatter',
        mode: 'markers',
        x,
        y: bands.map(({ maxRms }) => (maxRms > 0 ? maxRms : null)),
        marker: { symbol: 'triangle-up-open', size: 7, color: palette.inkSoft },
        hoverinfo: 'skip',
      },
    ],
    layout: {
      margin: { l: 64, r: 12, t: 8, b: 30 },
      xaxis: {
        range: [(ends[0] ?? 0) - widthKHz, (ends[1] ?? 0) + widthKHz],
        fixedrange: true,
        ticksuffix: ' kHz',
        exponentformat: 'none',
        tickangle: 0,
        nticks: 8,
      },
      yaxis: amplitudeAxis(range, unit),
    },
  };
}
