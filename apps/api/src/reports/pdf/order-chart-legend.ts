import type { Plot } from './order-chart-ceiling.js';
import type { ChartBar } from './order-chart-scale.js';
import type { Sheet } from './sheet.js';
import { colours, text } from './theme.js';

const swatch = 7;
const gap = 4;
const between = 14;

/** Says in words what the chart's bars and its ceiling are, for what is drawn in it. */
export function drawLegend(sheet: Sheet, plot: Plot, bars: readonly ChartBar[]): void {
  const y = plot.top + plot.height + 16;
  const has = (kind: ChartBar['kind']): boolean => bars.some((bar) => bar.kind === kind);
  let x = plot.left;
  const add = (name: string, draw: (x: number) => void): void => {
    draw(x);
    sheet.line(name, text.axis, x + swatch + gap, y);
    x += swatch + gap + sheet.widthOf(name, text.axis) + between;
  };
  const bar = (colour: string) => (at: number) => sheet.doc.rect(at, y + 1.5, swatch, 5).fill(colour);
  if (has('fundamental')) add('fundamental', bar(colours.ruleStrong));
  if (has('plain')) add('not over', bar(colours.ink));
  if (has('over')) add('over', bar(colours.over));
  if (bars.some(({ limit }) => limit !== null)) {
    add('limit, hatched above', (at) =>
      sheet.doc
        .lineWidth(1)
        .moveTo(at, y + 4)
        .lineTo(at + swatch, y + 4)
        .stroke(colours.act),
    );
  }
  sheet.line('rms, logarithmic', text.axis, plot.left, y, { width: plot.width, align: 'right' });
}
