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
  /** Draws a stronger line under every row of this number, for long columns of figures. */
  groupOf?: number;
}

const padding = 4;
/** Words behind a column of figures keep away from it. */
const inset = 8;
/** Height of the writing above its line, and of that line in a row, as parts of size and row. */
const ascent = 1.025;
const baseline = 0.7;
const headLine = 8.5;
const headPadding = 4;

interface Placed extends Column {
  x: number;
  width: number;
  lines: string[];
}

/** A ruled table whose head stands again on each page it reaches. */
export function drawTable(sheet: Sheet, columns: Column[], rows: Cell[][], options: TableOptions = {}): void {
  const placed = place(sheet, columns);
  const { rowHeight, groupOf } = options;
  const heights = rows.map((row) => rowHeight ?? heightOfRow(sheet, placed, row));
  const least = heights.slice(0, 3).reduce((sum, height) => sum + height, 0);
  sheet.room(headHeight(placed) + least);
  sheet.group('Table', () => {
    sheet.group('THead', () => sheet.group('TR', () => drawHead(sheet, placed, false)));
    sheet.group('TBody', () => {
      rows.forEach((row, index) => {
        const height = heights[index]!;
        // The last two rows stay together, so that no page begins with a single one.
        const keep = index === rows.length - 2 ? height + heights[index + 1]! : height;
        if (sheet.room(keep)) sheet.artifact(() => drawHead(sheet, placed, true));
        const strong = groupOf !== undefined && (index + 1) % groupOf === 0;
        drawRow(sheet, placed, row, height, rowHeight !== undefined, strong);
      });
    });
  });
}

function place(sheet: Sheet, columns: Column[]): Placed[] {
  const whole = columns.reduce((sum, column) => sum + column.share, 0);
  let x = sheet.left;
  return columns.map((column, index) => {
    const width = (column.share / whole) * sheet.width;
    x += width;
    const shift = column.align !== 'right' && columns[index - 1]?.align === 'right' ? inset : 0;
    return { ...column, x: x - width + shift, width: width - shift, lines: column.header.split('\n') };
  });
}

const headHeight = (columns: Placed[]): number =>
  Math.max(...columns.map(({ lines }) => lines.length)) * headLine + 2 * headPadding;

function heightOfRow(sheet: Sheet, columns: Placed[], row: Cell[]): number {
  const heights = row.map((cell, index) =>
    cell.draw ? 16 : sheet.heightOf(cell.text, cell.style ?? text.cell, columns[index]!.width - 2 * padding),
  );
  return Math.max(...heights) + 2 * padding;
}

/** The head; drawn `again` on a further page it is no content of its own. */
function drawHead(sheet: Sheet, columns: Placed[], again: boolean): void {
  const y = sheet.y;
  const height = headHeight(columns);
  const ground = () => {
    sheet.doc.rect(sheet.left, y, sheet.width, height).fill(colours.paper);
    for (const [at, weight] of [
      [y, hairline],
      [y + height, hairline * 1.5],
    ] as const) {
      sheet.doc
        .lineWidth(weight)
        .moveTo(sheet.left, at)
        .lineTo(sheet.left + sheet.width, at)
        .stroke(colours.ruleStrong);
    }
  };
  if (again) ground();
  else sheet.artifact(ground);
  for (const { x, width, lines, align } of columns) {
    const top = y + height - headPadding - lines.length * headLine;
    const words = () =>
      lines.forEach((line, index) =>
        sheet.line(line, text.caption, x + padding, top + index * headLine, {
          width: width - 2 * padding,
          align,
        }),
      );
    if (again) words();
    else sheet.tag('TH', words, { scope: 'Column' });
  }
  sheet.y = y + height;
}

function drawRow(
  sheet: Sheet,
  columns: Placed[],
  row: Cell[],
  height: number,
  oneLine: boolean,
  strong: boolean,
): void {
  const y = sheet.y;
  sheet.group('TR', () => {
    row.forEach((cell, index) => drawCell(sheet, columns[index]!, cell, y, height, oneLine));
  });
  sheet.rule(y + height, hairline * 0.7, strong ? colours.ruleStrong : colours.rule);
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
  const { draw } = cell;
  if (draw) {
    sheet.group('TD', () =>
      sheet.tag('Figure', () => draw(x, y + padding, width, height - 2 * padding), { alt: cell.text }),
    );
  } else if (oneLine) {
    const top = y + height * baseline - style.size * ascent;
    sheet.tag('TD', () => sheet.line(cell.text, style, x, top, { width, align: column.align }));
  } else {
    sheet.tag('TD', () => sheet.flow(cell.text, style, { x, y: y + padding, width, align: column.align }));
  }
}
