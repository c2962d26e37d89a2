import { heightOn, type ChartBar, type ChartScale } from './order-chart-scale.js';
import { colours } from './theme.js';

export interface Plot {
  left: number;
  top: number;
  width: number;
  height: number;
  /** Width of one order. */
  slot: number;
  firstOrder: number;
}

interface Step {
  from: number;
  to: number;
  y: number;
}

const hatchStep = 5;

/** Left edge of an order's slot. */
export const slotLeft = (plot: Plot, order: number): number =>
  plot.left + (order - plot.firstOrder) * plot.slot;

/** Neighbouring orders with a limit, as runs of steps; an order without a limit breaks the ceiling. */
function runs(plot: Plot, scale: ChartScale, bars: readonly ChartBar[]): Step[][] {
  const result: Step[][] = [];
  let previous = Number.NaN;
  for (const { order, limit } of bars) {
    if (limit === null || limit <= 0) continue;
    const from = slotLeft(plot, order);
    const step = { from, to: from + plot.slot, y: plot.top + plot.height * (1 - heightOn(scale, limit)) };
    if (order === previous + 1) result[result.length - 1]!.push(step);
    else result.push([step]);
    previous = order;
  }
  return result;
}

/** Draws the limits as a ceiling: hatching above, and a stepped line where they lie. */
export function drawHatching(
  doc: PDFKit.PDFDocument,
  plot: Plot,
  scale: ChartScale,
  bars: readonly ChartBar[],
): void {
  for (const run of runs(plot, scale, bars)) {
    const left = run[0]!.from;
    const right = run[run.length - 1]!.to;
    doc.save().moveTo(left, plot.top);
    for (const step of run) doc.lineTo(step.from, step.y).lineTo(step.to, step.y);
    doc.lineTo(right, plot.top).closePath().clip();
    for (let x = left - plot.height; x < right; x += hatchStep) {
      doc.moveTo(x, plot.top + plot.height).lineTo(x + plot.height, plot.top);
    }
    doc.lineWidth(0.4).stroke(colours.rule);
    doc.restore();
  }
}

/** The stepped ink-blue line at the limits themselves. */
export function drawCeiling(
  doc: PDFKit.PDFDocument,
  plot: Plot,
  scale: ChartScale,
  bars: readonly ChartBar[],
): void {
  for (const run of runs(plot, scale, bars)) {
    doc.moveTo(run[0]!.from, run[0]!.y);
    for (const step of run) doc.lineTo(step.from, step.y).lineTo(step.to, step.y);
    doc.lineWidth(1).lineJoin('miter').stroke(colours.act);
  }
}
