import { refuse } from '../refusal.js';
import type { DecimalMark, Delimiter, ImportOptions } from '../types.js';
import { cellKind } from './cell.js';
import { splitCells } from './lines.js';

const SNIFFED_LINES = 200;
const RUN = 4;
const TIE = 0.02;
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
  hasHeader: boolean;
  headerFits: boolean;
}

/** Several columns before one (1,2 are two numbers unless the header says one), then the share of numbers, then width. */
function byPreference(a: Candidate, b: Candidate): number {
  const several = (one: Candidate) => Number(one.columnCount > 1 && one.headerFits && one.score > 0.6);
  const score = Math.abs(a.score - b.score) > TIE ? b.score - a.score : 0;
  return several(b) - several(a) || score || b.columnCount - a.columnCount;
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
    const weight =
      kind === 'number' || kind === 'stamp' || kind === 'date' ? 1 : kind === 'grouped' ? 0.5 : 0;
    if (kind !== 'blank' && kind !== 'missing') filled += 1;
    numeric += weight;
    if (i === 0) first = kind === 'missing' || kind === 'blank' ? 0.5 : weight;
  });
  if (filled === 0) return cells.some((cell) => /[a-z#]/i.test(cell)) ? 0.5 : 0;
  const share = numeric / filled;
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

/**
 * Rows of nothing but numbers before the run belong to the table too: a line of text between them and the run must
 * not make them vanish with the header.
 */
function includeEarlier(run: number, columnCount: number, widths: number[], shares: number[]): number {
  const isRow = (i: number) => widths[i] === columnCount && shares[i] === 1;
  const earlier = widths.findIndex((_, i) => i < run && isRow(i) && (columnCount > 1 || isRow(i + 1)));
  return earlier < 0 ? run : earlier;
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
  const run = findBody(shares, filled, options.headerRows);
  if (run < 0) return null;
  const widths = rows.map((cells) => withoutTrailingBlanks(cells).length);
  const used = widths
    .map((width, i) => ({ width, share: shares[i] ?? 0 }))
    .filter((_, i) => i >= run && filled[i]);
  if (used.length === 0) return null;
  const columnCount = mostFrequent(used.map(({ width }) => width));
  const fits = used.filter(({ width }) => width === columnCount);
  const score = fits.reduce((sum, { share }) => sum + share, 0) / used.length;
  const bodyLine = options.headerRows ?? includeEarlier(run, columnCount, widths, shares);
  // One number after lines of text is no table.
  const lone = used.length === 1 && columnCount === 1 && bodyLine > 1 && options.headerRows === undefined;
  if (score < 0.25 || lone) return null;
  const header = rows.slice(0, bodyLine).findLast((_, i) => filled[i]);
  const headerFits = header === undefined || withoutTrailingBlanks(header).length === columnCount;
  return {
    delimiter,
    decimal,
    bodyLine,
    columnCount,
    ambiguous: false,
    score: score + (headerFits ? 0.1 : 0),
    hasHeader: header !== undefined,
    headerFits,
  };
}

/** Blanks between cells include tabs, so a table with tabs reads the same under both. */
function sameSplit(a: Dialect, b: Dialect): boolean {
  return a.delimiter === b.delimiter || (a.delimiter === '\t' && b.delimiter === ' ');
}

/** Delimiters that occur in the lines, and one more that stands for a single column. */
function delimitersIn(lines: string[]): Delimiter[] {
  const text = lines.join('\n');
  const found = DELIMITERS.filter((delimiter) => text.includes(delimiter));
  return found.includes(';') ? found : [...found, ';'];
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
  for (const delimiter of options.delimiter === undefined ? delimitersIn(lines) : [options.delimiter]) {
    for (const decimal of options.decimal === undefined ? (['.', ','] as const) : [options.decimal]) {
      if (!isPossible(delimiter, decimal, lines)) continue;
      const candidate = evaluate(lines, delimiter, decimal, options);
      if (candidate !== null) candidates.push(candidate);
    }
  }
  candidates.sort(byPreference);
  const [best, second] = candidates;
  if (best === undefined) return null;
  const rival = second !== undefined && !sameSplit(best, second) && best.score - second.score <= TIE;
  return { ...best, ambiguous: rival && (second.columnCount > 1 || !best.hasHeader) };
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
