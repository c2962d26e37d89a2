import type { Palette } from '../lib/theme/palette.js';

/** A layout in Plotly's own form. */
export type PlotLayout = Record<string, unknown> & {
  xaxis?: Record<string, unknown>;
  yaxis?: Record<string, unknown>;
};

/** No tool bar and no wheel zoom: drag zooms, a double click goes back. */
export const plotConfig = {
  displayModeBar: false,
  displaylogo: false,
  responsive: true,
  scrollZoom: false,
  doubleClick: 'reset',
  showTips: false,
};

const font = "'IBM Plex Sans', system-ui, sans-serif";

function axis(palette: Palette): Record<string, unknown> {
  return {
    gridcolor: palette.rule,
    gridwidth: 1,
    linecolor: palette.inkSoft,
    zeroline: false,
    showline: false,
    ticks: '',
    tickfont: { family: font, size: 12, color: palette.inkSoft },
    title: { font: { family: font, size: 12, color: palette.inkSoft }, standoff: 8 },
    automargin: true,
    exponentformat: 'SI',
    minorloglabels: 'none',
  };
}

/** `overrides` over an axis; the font of its title stays. */
function over(
  base: Record<string, unknown>,
  overrides: Record<string, unknown> = {},
): Record<string, unknown> {
  const title = { ...(base.title as object), ...(overrides.title as object | undefined) };
  return { ...base, ...overrides, title };
}

/** Layout of a chart on a sheet: Plex, hairline grid, no frame; `overrides` are laid over it axis by axis. */
export function plotLayout(palette: Palette, overrides: PlotLayout = {}): PlotLayout {
  const base = axis(palette);
  return {
    autosize: true,
    paper_bgcolor: 'rgba(0,0,0,0)',
    plot_bgcolor: 'rgba(0,0,0,0)',
    font: { family: font, size: 12, color: palette.ink },
    margin: { l: 56, r: 12, t: 12, b: 36 },
    showlegend: false,
    bargap: 0.45,
    dragmode: 'zoom',
    hovermode: 'closest',
    hoverlabel: {
      bgcolor: palette.sheet,
      bordercolor: palette.ruleStrong,
      font: { family: font, size: 12, color: palette.ink },
    },
    ...overrides,
    xaxis: over({ ...base, showgrid: false, showline: true }, overrides.xaxis),
    yaxis: over(base, overrides.yaxis),
  };
}
