import type { Sheet } from './sheet.js';
import { colours, hairline, text, tinted, type TextStyle } from './theme.js';

export interface TitleCell {
  caption: string;
  value: string;
  /** Part of the row's width, relative to the other cells of the row. */
  share?: number;
  /** For figures and codes. */
  mono?: boolean;
  colour?: string;
}

const padding = 6;
const captionHeight = 11;

function styleOf(cell: TitleCell): TextStyle {
  if (cell.colour !== undefined) return tinted(cell.mono ? text.figureStrong : text.cellStrong, cell.colour);
  return cell.mono ? text.figure : text.cell;
}

/** The title block over a part of the report, as on an engineering drawing: ruled cells with small captions. */
export function drawTitleBlock(sheet: Sheet, rows: TitleCell[][]): void {
  const heights = rows.map((row) => rowHeight(sheet, row));
  const total = heights.reduce((sum, height) => sum + height, 0);
  sheet.room(total);
  const top = sheet.y;
  sheet.artifact(() =>
    sheet.doc.lineWidth(hairline).rect(sheet.left, top, sheet.width, total).stroke(colours.ruleStrong),
  );
  let y = top;
  rows.forEach((row, index) => {
    if (index > 0) sheet.rule(y);
    drawRow(sheet, row, y, heights[index]!);
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
  return captionHeight + Math.max(...heights) + 1.6 * padding;
}

function drawRow(sheet: Sheet, row: TitleCell[], y: number, height: number): void {
  const widths = cellWidths(sheet, row);
  let x = sheet.left;
  row.forEach((cell, index) => {
    if (index > 0) {
      const at = x;
      sheet.artifact(() =>
        sheet.doc
          .lineWidth(hairline)
          .moveTo(at, y)
          .lineTo(at, y + height)
          .stroke(colours.rule),
      );
    }
    const inner = {
      x: x + padding,
      y: y + 0.8 * padding + captionHeight,
      width: widths[index]! - 2 * padding,
    };
    sheet.tag('P', () => {
      sheet.line(cell.caption, text.caption, inner.x, y + 0.8 * padding);
      sheet.flow(cell.value, styleOf(cell), inner);
    });
    x += widths[index]!;
  });
}
