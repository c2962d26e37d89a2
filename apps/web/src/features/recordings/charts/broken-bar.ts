import type { Palette } from '../../../lib/theme/palette.js';

/** Place of the break, as a share of the height of the plot, and how far it slants and gapes. */
const breakAt = 0.86;
const slant = 0.035;
const gape = 0.03;
const halfWidth = 0.42;

/**
 * Shapes that cut the bar at `x` in two, as a drawing shows that something is longer than there is room for. The bar
 * itself is drawn to the end of the axis; its value has to be written beside it (`brokenLabel`).
 */
export function brokenBarShapes(x: number, isDown: boolean, palette: Palette): Record<string, unknown>[] {
  const place = (y: number) => (isDown ? 1 - y : y);
  const [left, right] = [x - halfWidth, x + halfWidth];
  const edge = (y: number) => ({
    type: 'line',
    layer: 'above',
    yref: 'paper',
    ...{ x0: left, y0: place(y), x1: right, y1: place(y + slant) },
    line: { color: palette.inkSoft, width: 1 },
  });
  const gap = [
    [left, breakAt],
    [right, breakAt + slant],
    [right, breakAt + slant + gape],
    [left, breakAt + gape],
  ].map(([cornerX = 0, y = 0]) => `${cornerX},${place(y)}`);
  return [
    {
      type: 'path',
      layer: 'above',
      yref: 'paper',
      path: `M${gap.join('L')}Z`,
      fillcolor: palette.sheet,
      line: { width: 0 },
    },
    edge(breakAt),
    edge(breakAt + gape),
  ];
}

/** The value of a broken bar at the end where it is cut. */
export function brokenLabel(x: number, text: string, isDown: boolean, palette: Palette) {
  return {
    ...{ x: x - halfWidth, xanchor: 'left', yref: 'paper', y: isDown ? 0 : 1 },
    yanchor: isDown ? 'top' : 'bottom',
    ...{ text, showarrow: false, font: { size: 12, color: palette.inkSoft } },
  };
}
