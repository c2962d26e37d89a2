import type { ReportStudy } from '@overtally/contracts';
import { formatFigure, formatQuantity, formatTick } from './format.js';
import type { Sheet } from './sheet.js';
import { colours, hairline, text } from './theme.js';
import { niceTicks } from './ticks.js';

const axisWidth = 44;
const axisHeight = 18;
const chartHeight = 96;
/** More orders than these are told by the table alone. */
const shownOrders = 50;

interface Frame {
  left: number;
  width: number;
  top: number;
  foot: number;
}

/** Harmonics before (open bars) and behind the stages (filled bars), with the ceilings of their limits. */
export function drawHarmonicsChart(sheet: Sheet, { result, inputUnit, outputUnit }: ReportStudy): void {
  const orders = result.orders.filter(({ order }) => order > 1 && order <= shownOrders);
  if (orders.length === 0) return;
  const limits = new Map(result.verdictAfter?.orders.map(({ order, limit }) => [order, limit]));
  const isSameUnit = inputUnit === outputUnit;
  const most = Math.max(
    ...orders.flatMap((each) => (isSameUnit ? [each.inputRms, each.outputRms] : [each.outputRms])),
  );
  if (!(most > 0)) return;
  const ceiling = most * 1.06;
  sheet.heading('Harmonics before and behind the stages, predicted', chartHeight + 40);
  const alt = `Orders ${orders[0]!.order} to ${orders.at(-1)!.order} before and behind the stages; the largest is ${formatQuantity(most, outputUnit)}.`;
  drawFrame(sheet, alt, (frame) => {
    const y = (value: number) => frame.foot - (Math.min(value, ceiling) / ceiling) * (frame.foot - frame.top);
    drawLevels(
      sheet,
      frame,
      niceTicks(0, most, 4).filter((tick) => tick <= ceiling),
      y,
      (tick) => formatTick(tick, outputUnit),
    );
    const slot = frame.width / orders.length;
    const bar = Math.min(8, slot * 0.36);
    orders.forEach(({ order, inputRms, outputRms }, index) => {
      const middle = frame.left + (index + 0.5) * slot;
      const { doc } = sheet;
      if (isSameUnit) {
        doc
          .lineWidth(hairline)
          .rect(middle - bar, y(inputRms), bar, frame.foot - y(inputRms))
          .stroke(colours.inkSoft);
      }
      doc.rect(middle, y(outputRms), bar, frame.foot - y(outputRms)).fill(colours.act);
      const limit = limits.get(order);
      if (limit !== undefined && limit !== null && limit <= ceiling) {
        doc
          .lineWidth(1)
          .moveTo(middle - slot * 0.45, y(limit))
          .lineTo(middle + slot * 0.45, y(limit))
          .stroke(colours.over);
      }
      if (orders.length <= 25 || order % 5 === 0) {
        sheet.line(String(order), text.axis, middle - 10, frame.foot + 4, { width: 20, align: 'center' });
      }
    });
  });
  sheet.paragraph(
    `${isSameUnit ? 'Open bars: before. ' : ''}Filled bars: behind, predicted. Lines: limits that lie within the scale.`,
    text.caption,
    'Caption',
  );
}

/** Gain of all stages over frequency with the orders marked on it. */
export function drawGainChart(sheet: Sheet, { response, result }: ReportStudy): void {
  const points = response.filter(
    (point): point is { frequencyHz: number; gainDb: number } => point.gainDb !== null,
  );
  if (points.length < 2) return;
  const gains = points.map(({ gainDb }) => gainDb);
  const [low, high] = [Math.min(...gains), Math.max(...gains, Math.min(...gains) + 1)];
  const air = (high - low) * 0.08;
  const [least, most] = [low - air, high + air];
  const [from, to] = [points[0]!.frequencyHz, points.at(-1)!.frequencyHz];
  sheet.heading('Gain of all stages, orders marked', chartHeight + 40);
  const alt = `Gain from ${formatFigure(low, 3)} dB to ${formatFigure(high, 3)} dB between ${formatQuantity(from, 'Hz', 3)} and ${formatQuantity(to, 'Hz', 3)}.`;
  drawFrame(sheet, alt, (frame) => {
    const { doc } = sheet;
    const y = (gain: number) => frame.foot - ((gain - least) / (most - least)) * (frame.foot - frame.top);
    const x = (hertz: number) => frame.left + (Math.log(hertz / from) / Math.log(to / from)) * frame.width;
    const levels = niceTicks(least, most, 4).filter((tick) => tick >= least && tick <= most);
    drawLevels(sheet, frame, levels, y, (tick) => formatTick(tick, 'dB'));
    points.forEach(({ frequencyHz, gainDb }, index) => {
      if (index === 0) doc.moveTo(x(frequencyHz), y(gainDb));
      else doc.lineTo(x(frequencyHz), y(gainDb));
    });
    doc.lineWidth(0.9).stroke(colours.ink);
    for (const { frequencyHz, gain, inputRms } of result.orders) {
      if (gain === null || gain <= 0 || inputRms <= 0 || frequencyHz > to) continue;
      const level = 20 * Math.log10(gain);
      if (level >= least) doc.circle(x(frequencyHz), y(level), 1.6).fill(colours.act);
    }
    for (const hertz of decadesBetween(from, to)) {
      sheet.line(formatTick(hertz, 'Hz'), text.axis, x(hertz) - 20, frame.foot + 4, {
        width: 40,
        align: 'center',
      });
    }
  });
  sheet.paragraph('Dots: orders that the input holds.', text.caption, 'Caption');
}

function decadesBetween(from: number, to: number): number[] {
  const first = Math.ceil(Math.log10(from) - 1e-9);
  const last = Math.floor(Math.log10(to) + 1e-9);
  return Array.from({ length: Math.max(0, last - first + 1) }, (_, index) => 10 ** (first + index));
}

function drawFrame(sheet: Sheet, alt: string, body: (frame: Frame) => void): void {
  sheet.room(chartHeight + axisHeight + 8);
  const top = sheet.y + 4;
  const frame = {
    left: sheet.left + axisWidth,
    width: sheet.width - axisWidth,
    top,
    foot: top + chartHeight,
  };
  sheet.tag(
    'Figure',
    () => {
      body(frame);
      sheet.doc
        .lineWidth(0.8)
        .moveTo(frame.left, frame.foot)
        .lineTo(frame.left + frame.width, frame.foot)
        .stroke(colours.ink);
    },
    { alt },
  );
  sheet.y = frame.foot + axisHeight;
}

function drawLevels(
  sheet: Sheet,
  { left, width }: Frame,
  levels: readonly number[],
  y: (level: number) => number,
  words: (level: number) => string,
): void {
  for (const level of levels) {
    sheet.doc
      .lineWidth(hairline)
      .moveTo(left, y(level))
      .lineTo(left + width, y(level))
      .stroke(colours.rule);
    sheet.line(words(level), text.axis, sheet.left, y(level) - 4, { width: axisWidth - 6, align: 'right' });
  }
}
