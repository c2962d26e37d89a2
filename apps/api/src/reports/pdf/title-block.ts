import type { Sheet } from './sheet.js';
import { colours, hairline, text, tinted, type TextStyle } from './theme.js';

export interface TitleCell {
  caption: string;
  value: string;
  /** Part of the row's width, relative to the other cells of the row. */
  share?: number;
  /** For figures and codes. */
  mono?: boolean;
  strong?: boolean;
  colour?: string;
}

const padding = 6;
const captionHeight = 10.5;

function styleOf({ mono = false, strong = false, colour }: TitleCell): TextStyle {
  const bold = strong || colour !== undefined;
  const base = mono ? (bold ? text.figureStrong : text.figure) : bold ? text.cellStrong : text.cell;
  return colour === undefined ? base : tinted(base, colour);
}

/** The title block over a part of the report, as on an engineering drawing: ruled cells with small captions. */
export function drawTitleBlock(sheet: Sheet, rows: TitleCell[][]): void {
  const heights = rows.map((row) => rowHeight(sheet, row));
  const total = heights.reduce((sum, height) => sum + height, 0);
  sheet.room(total);
  const top = sheet.y;
  drawLines(sheet, rows, heights, top, total);
  let y = top;
  rows.forEach((row, index) => {
    drawRow(sheet, row, y);
    y += heights[index]!;
  });
  sheet.y = top + total;
}

function cellWidths(sheet: Sheet, row: TitleCell[]): number[] {
  const shares = row.map((cell) => cell.share ?? 1);
  const whole = shares.reduce((sum, share) => sum + share, 0);
  return shares.map((share) => (share / whole) * sheet.width);
}

function rowHeight(sheet: Sheet, row: TitleCell[]): number {
  const widths = cellWidths(sheet, row);
  const heights = row.map((cell, index) =>
    sheet.heightOf(cell.value, styleOf(cell), widths[index]! - 2 * padding),
  );
  return captionHeight + Math.max(...heights) + 1.5 * padding;
}

function drawLines(sheet: Sheet, rows: TitleCell[][], heights: number[], top: number, total: number): void {
  const { doc } = sheet;
  sheet.artifact(() => {
    let y = top;
    rows.forEach((row, index) => {
      if (index > 0) doc.moveTo(sheet.left, y).lineTo(sheet.right, y);
      const widths = cellWidths(sheet, row);
      let x = sheet.left;
      for (const width of widths.slice(0, -1)) {
        x += width;
        doc.moveTo(x, y).lineTo(x, y + heights[index]!);
      }
      y += heights[index]!;
    });
    doc.lineWidth(hairline).stroke(colours.ruleStrong);
    doc.lineWidth(1).rect(sheet.left, top, sheet.width, total).stroke(colours.ink);
  });
}

function drawRow(sheet: Sheet, row: TitleCell[], y: number): void {
  const widths = cellWidths(sheet, row);
  let x = sheet.left;
  row.forEach((cell, index) => {
    const inner = {
      x: x + padding,
      y: y + 0.7 * padding + captionHeight,
      width: widths[index]! - 2 * padding,
    };
    sheet.tag('P', () => {
      sheet.line(cell.caption, text.caption, inner.x, y + 0.7 * padding, { width: inner.width });
      sheet.flow(cell.value, styleOf(cell), inner);
    });
    x += widths[index]!;
  });
}
