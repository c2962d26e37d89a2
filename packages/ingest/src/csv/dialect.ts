import { refuse } from '../refusal.js';
import type { DecimalMark, Delimiter, ImportOptions } from '../types.js';
import { cellKind } from './cell.js';
import { splitCells } from './lines.js';

const SNIFFED_LINES = 300;
const RUN = 4;
const DELIMITERS: Delimiter[] = ['\t', ';', ',', '|', ' '];

/** How the cells of a table are written, and where its numbers begin. */
export interface Dialect {
  delimiter: Delimiter;
  decimal: DecimalMark;
  /** 0-based index of the first data line. */
  bodyLine: number;
  /** Cells of a data row, a trailing blank one not counted. */
  columnCount: number;
  /** Another way to read the table fits as well. */
  ambiguous: boolean;
}

interface Candidate extends Dialect {
  score: number;
}

function withoutTrailingBlanks(cells: string[]): string[] {
  let count = cells.length;
  while (count > 1 && cells[count - 1] === '') count -= 1;
  return cells.slice(0, count);
}

/** Share of the cells that are numbers or stamps, 0 when the row cannot be data. */
function dataShare(cells: string[], decimal: DecimalMark): number {
  let filled = 0;
  let numeric = 0;
  let first = 0;
  cells.forEach((cell, i) => {
    const kind = cellKind(cell, decimal);
    const weight = kind === 'number' || kind === 'stamp' ? 1 : kind === 'grouped' ? 0.5 : 0;
    if (kind !== 'blank' && kind !== 'missing') filled += 1;
    numeric += weight;
    if (i === 0) first = kind === 'missing' || kind === 'blank' ? 0.5 : weight;
  });
  const share = filled === 0 ? 0 : numeric / filled;
  return (first > 0 && share >= 0.5) || share > 0.5 ? share : 0;
}

function mostFrequent(counts: number[]): number {
  const tally = new Map<number, number>();
  for (const count of counts) tally.set(count, (tally.get(count) ?? 0) + 1);
  return [...tally].sort((a, b) => b[1] - a[1])[0]?.[0] ?? 0;
}

/** Index of the first of `RUN` successive filled rows that all look like data; fewer at the end of the lines. */
function findBody(shares: number[], filled: boolean[], stated: number | undefined): number {
  if (stated !== undefined) return stated;
  for (let i = 0; i < shares.length; i += 1) {
    if (!filled[i]) continue;
    let seen = 0;
    let j = i;
    for (; j < shares.length && seen < RUN; j += 1) {
      if (!filled[j]) continue;
      if (shares[j] === 0) break;
      seen += 1;
    }
    const rest = filled.slice(j).filter(Boolean).length;
    if (seen === RUN || (seen > 0 && rest <= 1)) return i;
  }
  return -1;
}

function evaluate(
  lines: string[],
  delimiter: Delimiter,
  decimal: DecimalMark,
  options: ImportOptions,
): Candidate | null {
  const rows = lines.map((line) => splitCells(line, delimiter));
  const filled = rows.map((cells) => cells.some((cell) => cell !== ''));
  const shares = rows.map((cells) => dataShare(cells, decimal));
  const bodyLine = findBody(shares, filled, options.headerRows);
  if (bodyLine < 0) return null;
  const body = rows.map((cells, i) => ({ cells, share: shares[i] ?? 0 })).slice(bodyLine);
  const used = body.filter((_, i) => filled[i + bodyLine]);
  if (used.length === 0) return null;
  const columnCount = mostFrequent(used.map(({ cells }) => withoutTrailingBlanks(cells).length));
  const fits = used.filter(({ cells }) => withoutTrailingBlanks(cells).length === columnCount);
  const score = fits.reduce((sum, { share }) => sum + share, 0) / used.length;
  if (score < 0.25) return null;
  const header = rows.slice(0, bodyLine).findLast((_, i) => filled[i]);
  const headerFits = header === undefined || withoutTrailingBlanks(header).length === columnCount;
  return {
    delimiter,
    decimal,
    bodyLine,
    columnCount,
    ambiguous: false,
    score: score + (headerFits ? 0.1 : 0),
  };
}

/** A comma as decimal mark with commas as delimiter is possible only where the cells are quoted. */
function isPossible(delimiter: Delimiter, decimal: DecimalMark, lines: string[]): boolean {
  if (delimiter !== ',' || decimal !== ',') return true;
  return lines.some((line) => /"[+-]?\d*,\d+"/.test(line));
}

/**
 * Finds delimiter, decimal mark and first data line by trying all pairs and keeping the one under which most cells of
 * the body are numbers; more columns win a tie.
 * @returns null when no line holds numbers under any of them
 */
export function sniffDialect(allLines: string[], options: ImportOptions): Dialect | null {
  const lines = allLines.slice(0, SNIFFED_LINES + (options.headerRows ?? 0));
  const candidates: Candidate[] = [];
  for (const delimiter of options.delimiter === undefined ? DELIMITERS : [options.delimiter]) {
    for (const decimal of options.decimal === undefined ? (['.', ','] as const) : [options.decimal]) {
      if (!isPossible(delimiter, decimal, lines)) continue;
      const candidate = evaluate(lines, delimiter, decimal, options);
      if (candidate !== null) candidates.push(candidate);
    }
  }
  candidates.sort((a, b) =>
    Math.abs(a.score - b.score) > 0.02 ? b.score - a.score : b.columnCount - a.columnCount,
  );
  const [best, second] = candidates;
  if (best === undefined) return null;
  const rival =
    second !== undefined && best.score - second.score <= 0.02 && second.delimiter !== best.delimiter;
  return { ...best, ambiguous: rival && second.columnCount > 1 };
}

/** Refuses a table whose header names half as many columns as its rows hold: decimal commas between comma cells. */
export function refuseCommaClash(dialect: Dialect, headerCells: string[]): void {
  const named = withoutTrailingBlanks(headerCells).length;
  if (dialect.delimiter !== ',' || named < 2 || dialect.columnCount < 2 * named - 1) return;
  refuse(
    'ambiguous-delimiter',
    `Line ${dialect.bodyLine + 1} holds ${dialect.columnCount} cells but the header names ${named} columns: the comma seems to serve both as decimal mark and between the cells.`,
    'Export the table again with semicolons or tabs between the cells, or with a decimal point.',
    { line: dialect.bodyLine + 1 },
  );
}
