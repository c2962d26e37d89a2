import type { Note, ReportSection } from '@overtally/contracts';
import { formatList, formatQuantity, formatTick, noteLetter } from './format.js';
import { drawCeiling, drawHatching, slotLeft, type Plot } from './order-chart-ceiling.js';
import { drawLegend } from './order-chart-legend.js';
import { chartBars, chartScale, heightOn, type ChartBar, type ChartScale } from './order-chart-scale.js';
import type { Sheet } from './sheet.js';
import { colours, hairline, text, tinted } from './theme.js';

const height = 172;
const axisWidth = 44;
const axisHeight = 32;
const badgeRadius = 5;
/** Points between the labels of two orders. */
const leastLabelStep = 16;

/** The spectrum by order against its limits, drawn with vectors; the alternative text names what is over. */
export function drawOrderChart(sheet: Sheet, section: ReportSection): void {
  const bars = chartBars(section);
  const scale = chartScale(bars);
  if (scale === null) {
    sheet.paragraph('No order of this channel has a value that could be drawn.', text.soft);
    return;
  }
  sheet.room(height + axisHeight);
  const top = sheet.y;
  const first = bars[0]!.order;
  const count = bars[bars.length - 1]!.order - first + 1;
  const width = sheet.width - axisWidth;
  const plot: Plot = {
    left: sheet.left + axisWidth,
    top,
    width,
    height,
    slot: width / count,
    firstOrder: first,
  };
  sheet.tag(
    'Figure',
    () => {
      drawGrid(sheet, plot, scale, section.verdict.unit);
      drawHatching(sheet.doc, plot, scale, bars);
      for (const bar of bars) drawBar(sheet, plot, scale, bar);
      drawCeiling(sheet.doc, plot, scale, bars);
      drawOrderAxis(sheet, plot, count);
      drawLegend(sheet, plot, bars);
      drawBadges(sheet, plot, scale, bars, section);
    },
    { alt: describe(section, bars) },
  );
  sheet.y = top + height + axisHeight;
}

function drawGrid(sheet: Sheet, plot: Plot, scale: ChartScale, unit: string): void {
  const { doc } = sheet;
  for (const tick of scale.ticks) {
    const y = plot.top + plot.height * (1 - heightOn(scale, tick));
    doc
      .lineWidth(hairline)
      .moveTo(plot.left, y)
      .lineTo(plot.left + plot.width, y)
      .stroke(colours.rule);
    sheet.line(formatTick(tick, unit), text.axis, sheet.left, y - 4, {
      width: axisWidth - 6,
      align: 'right',
    });
  }
}

const barColours = { fundamental: colours.ruleStrong, plain: colours.ink, over: colours.over } as const;

function drawBar(sheet: Sheet, plot: Plot, scale: ChartScale, bar: ChartBar): void {
  if (bar.value === null || bar.value <= 0) return;
  const tall = Math.max(heightOn(scale, bar.value) * plot.height, 0.8);
  const wide = Math.min(plot.slot * 0.56, 12);
  const x = slotLeft(plot, bar.order) + (plot.slot - wide) / 2;
  sheet.doc.rect(x, plot.top + plot.height - tall, wide, tall).fill(barColours[bar.kind]);
}

function drawOrderAxis(sheet: Sheet, plot: Plot, count: number): void {
  const foot = plot.top + plot.height;
  sheet.doc
    .lineWidth(0.8)
    .moveTo(plot.left, foot)
    .lineTo(plot.left + plot.width, foot)
    .stroke(colours.ink);
  const every = [1, 2, 5, 10, 20].find((step) => step * plot.slot >= leastLabelStep) ?? 50;
  for (let order = plot.firstOrder; order < plot.firstOrder + count; order += 1) {
    const labelled = every === 2 ? order % 2 === 1 : order % every === 0;
    if (!labelled) continue;
    const middle = slotLeft(plot, order) + plot.slot / 2;
    sheet.line(String(order), text.axis, middle - 12, foot + 3, { width: 24, align: 'center' });
  }
  sheet.line('Order', text.axis, sheet.left, foot + 3, { width: axisWidth - 6, align: 'right' });
}

/** The order that a note speaks of: its own, or that of its line where one is drawn there. */
function noteOrder(note: Note, section: ReportSection): number | null {
  if (note.target.kind === 'order') return note.target.order;
  const fundamentalHz = section.analysis.channel.fundamental?.frequencyHz;
  if (note.target.kind === 'span' || fundamentalHz === undefined) return null;
  return note.target.frequencyHz / fundamentalHz;
}

function drawBadges(
  sheet: Sheet,
  plot: Plot,
  scale: ChartScale,
  bars: readonly ChartBar[],
  section: ReportSection,
): void {
  const taken = new Map<number, number>();
  section.notes.forEach((note, index) => {
    const order = noteOrder(note, section);
    const nearest = order === null ? undefined : bars.find((bar) => bar.order === Math.round(order));
    if (order === null || nearest === undefined) return;
    const storey = taken.get(nearest.order) ?? 0;
    taken.set(nearest.order, storey + 1);
    const x = slotLeft(plot, order) + plot.slot / 2;
    const crown = Math.max(nearest.value ?? 0, nearest.limit ?? 0) || scale.low;
    const over = plot.top + plot.height * (1 - heightOn(scale, crown)) - badgeRadius - 3;
    const y = Math.max(over - storey * (2 * badgeRadius + 1), plot.top + badgeRadius);
    const colour = nearest.kind === 'over' ? colours.over : colours.ink;
    sheet.doc.lineWidth(0.7).circle(x, y, badgeRadius).fillAndStroke(colours.page, colour);
    sheet.line(noteLetter(index), tinted(text.axis, colour), x - 6, y - 4.2, { width: 12, align: 'center' });
  });
}

function describe(section: ReportSection, bars: readonly ChartBar[]): string {
  const over = bars.filter((bar) => bar.kind === 'over');
  const { unit, limitSet } = section.verdict;
  const worst = over.map((bar) => `order ${bar.order} at ${formatQuantity(bar.value, unit)}`);
  return `Bar chart of ${bars.length} orders of ${section.verdict.channelName} on a logarithmic scale against the limits of ${limitSet.title}: ${
    worst.length === 0 ? 'no order is over' : `over are ${formatList(worst)}`
  }.`;
}
