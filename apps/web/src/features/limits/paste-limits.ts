/** One line of pasted limits as the form holds it. */
export interface PastedRow {
  order: string;
  limit: string;
}

export interface PastedLimits {
  rows: PastedRow[];
  /** Lines that were not understood, counted from 1, with what was wrong. */
  problems: { line: number; message: string }[];
}

/** What taking over the pasted lines will do; lines that were not understood are left out openly. */
export function pasteWords({ rows, problems }: PastedLimits): string {
  if (rows.length === 0) return 'Use these orders';
  const orders = rows.length === 1 ? '1 order' : `${rows.length} orders`;
  if (problems.length === 0) return `Use ${orders} in place of the rows`;
  return `Use ${orders}, leave out ${problems.length === 1 ? '1 line' : `${problems.length} lines`}`;
}

const number = /^[+-]?(\d+([.,]\d*)?|[.,]\d+)(e[+-]?\d+)?$/i;
const range = /^(\d+)\s*(?:-|–|\.\.|to)\s*(\d+)$/i;

/** Cells of a line: tabs (spreadsheets) or semicolons; else white space, with a comma only where spaces are none. */
function cellsOf(line: string): string[] {
  if (/[\t;]/.test(line)) return line.split(/[\t;]/).map((cell) => cell.trim());
  const bySpace = line.trim().split(/\s{2,}|\s(?=[^\s]+$)/);
  return bySpace.length > 1 ? bySpace.map((cell) => cell.trim()) : line.split(',').map((cell) => cell.trim());
}

/** "3" is one order, "15-39" all of them; null for anything else. */
function ordersOf(cell: string): number[] | null {
  if (/^\d+$/.test(cell)) return [Number(cell)];
  const ends = range.exec(cell);
  if (!ends) return null;
  const [first, last] = [Number(ends[1]), Number(ends[2])];
  if (last < first || last - first > 198) return null;
  return Array.from({ length: last - first + 1 }, (_, i) => first + i);
}

/**
 * Reads order and limit from text copied out of a spreadsheet: first column the order or a range of orders,
 * second the limit, with point or comma. Lines before the first number are headings and are left out.
 */
export function parsePastedLimits(text: string): PastedLimits {
  const rows: PastedRow[] = [];
  const problems: PastedLimits['problems'] = [];
  text.split(/\r\n|\r|\n/).forEach((line, index) => {
    if (line.trim() === '') return;
    const [orderCell = '', limitCell = ''] = cellsOf(line);
    const isHeading = rows.length === 0 && problems.length === 0 && !/^\d/.test(orderCell);
    if (isHeading) return;
    const orders = ordersOf(orderCell);
    if (orders === null) {
      problems.push({ line: index + 1, message: `“${orderCell}” is not an order` });
    } else if (!number.test(limitCell)) {
      problems.push({ line: index + 1, message: `“${limitCell}” is not a limit` });
    } else {
      rows.push(...orders.map((order) => ({ order: String(order), limit: limitCell.replace(',', '.') })));
    }
  });
  return { rows, problems };
}
