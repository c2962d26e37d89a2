import type { Sheet } from './sheet.js';
import { colours, hairline, text, tinted, type TextStyle } from './theme.js';

export interface Column {
  header: string;
  /** Part of the table's width, relative to the other columns. */
  share: number;
  align?: 'left' | 'right';
}

export interface Cell {
  text: string;
  style?: TextStyle;
  /** Drawn instead of the text; `text` then says it in words. */
  draw?: (x: number, y: number, width: number, height: number) => void;
}

export interface TableOptions {
  /** Rows of one line each, all of this height; without it rows grow with their text. */
  rowHeight?: number;
}

const padding = 4;
const headHeight = 17;

interface Placed extends Column {
  x: number;
  width: number;
}

/** A ruled table whose head stands again on each page it reaches. */
export function drawTable(sheet: Sheet, columns: Column[], rows: Cell[][], options: TableOptions = {}): void {
  const placed = place(sheet, columns);
  const heights = rows.map((row) => options.rowHeight ?? heightOfRow(sheet, placed, row));
  sheet.room(headHeight + (heights[0] ?? 0) + (heights[1] ?? 0));
  sheet.group('Table', () => {
    drawHead(sheet, placed);
    rows.forEach((row, index) => {
      if (sheet.room(heights[index]!)) drawHead(sheet, placed);
      drawRow(sheet, placed, row, heights[index]!, options.rowHeight !== undefined);
    });
  });
}

function place(sheet: Sheet, columns: Column[]): Placed[] {
  const whole = columns.reduce((sum, column) => sum + column.share, 0);
  let x = sheet.left;
  return columns.map((column) => {
    const width = (column.share / whole) * sheet.width;
    x += width;
    return { ...column, x: x - width, width };
  });
}

function heightOfRow(sheet: Sheet, columns: Placed[], row: Cell[]): number {
  const heights = row.map((cell, index) =>
    cell.draw ? 16 : sheet.heightOf(cell.text, cell.style ?? text.cell, columns[index]!.width - 2 * padding),
  );
  return Math.max(...heights) + 2 * padding;
}

function drawHead(sheet: Sheet, columns: Placed[]): void {
  const y = sheet.y;
  sheet.group('TR', () => {
    for (const column of columns) {
      sheet.tag('TH', () =>
        sheet.line(column.header, text.caption, column.x + padding, y + 4, {
          width: column.width - 2 * padding,
          align: column.align,
        }),
      );
    }
  });
  sheet.rule(y + headHeight - 1, hairline * 1.5, colours.ruleStrong);
  sheet.y = y + headHeight;
}

function drawRow(sheet: Sheet, columns: Placed[], row: Cell[], height: number, oneLine: boolean): void {
  const y = sheet.y;
  sheet.group('TR', () => {
    row.forEach((cell, index) => drawCell(sheet, columns[index]!, cell, y, height, oneLine));
  });
  sheet.rule(y + height, hairline * 0.7);
  sheet.y = y + height;
}

function drawCell(
  sheet: Sheet,
  column: Placed,
  cell: Cell,
  y: number,
  height: number,
  oneLine: boolean,
): void {
  const style = cell.style ?? tinted(text.cell, colours.ink);
  const x = column.x + padding;
  const width = column.width - 2 * padding;
  if (cell.draw) {
    sheet.tag('TD', () => sheet.doc.moveTo(x, y), cell.text);
    cell.draw(x, y + padding, width, height - 2 * padding);
  } else if (oneLine) {
    const top = y + (height - style.size * 1.25) / 2;
    sheet.tag('TD', () => sheet.line(cell.text, style, x, top, { width, align: column.align }));
  } else {
    sheet.tag('TD', () => sheet.flow(cell.text, style, { x, y: y + padding, width, align: column.align }));
  }
}
