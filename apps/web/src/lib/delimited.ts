export type Cell = string | number | null;

/** A text that a spreadsheet would run as a formula gets an apostrophe in front. */
const defuse = (cell: string) => (/^[=+\-@\t\r]/.test(cell) ? `'${cell}` : cell);

function quoted(cell: Cell): string {
  if (cell === null) return '';
  if (typeof cell === 'number') return String(cell);
  const text = defuse(cell);
  return /[",\r\n]/.test(text) ? `"${text.replaceAll('"', '""')}"` : text;
}

/** Rows as CSV (RFC 4180): comma, CRLF, quotes where needed; numbers with all digits and a point. */
export function toCsv(rows: readonly (readonly Cell[])[]): string {
  return rows.map((row) => `${row.map(quoted).join(',')}\r\n`).join('');
}

/** Rows as tab-separated text for the clipboard. */
export function toTsv(rows: readonly (readonly Cell[])[]): string {
  const plain = (cell: Cell) =>
    typeof cell === 'string' ? defuse(cell).replaceAll(/[\t\r\n]+/g, ' ') : String(cell ?? '');
  return rows.map((row) => row.map(plain).join('\t')).join('\n');
}
