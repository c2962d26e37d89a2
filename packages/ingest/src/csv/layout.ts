import { describeColumns } from '../header-cell.js';
import type { ImportOptions, LayoutColumn } from '../types.js';
import { unitMeaning } from '../units.js';
import { cellKind } from './cell.js';
import { type Dialect, refuseCommaClash, sniffDialect } from './dialect.js';
import { splitCells } from './lines.js';
import { readMetadata, statedSampleRateHz } from './metadata.js';
import { findSecondClocks } from './second-clock.js';
import { chooseTimeColumn, type TimeChoice } from './time-column.js';
import { refuseNoTable } from './no-table.js';
import { doubtDecimalCommas } from './thousands.js';

const SAMPLED_ROWS = 100;

/** Everything the body parser needs to know about a table. */
export interface CsvLayout {
  dialect: Dialect;
  headerCells: string[];
  /** 0-based line of the units row. */
  unitsLine: number | null;
  columns: LayoutColumn[];
  /** Columns in which the first rows hold numbers, the time column and clocks left out. */
  valueColumns: number[];
  leftOut: LayoutColumn[];
  /** Clocks beside the time column, which are no channels either. */
  clocks: LayoutColumn[];
  /** All columns that tell the time, the time column first. */
  clockColumns: number[];
  time: TimeChoice | null;
  metadata: Record<string, string>;
  statedSampleRateHz: number | null;
  doubts: string[];
}

interface HeaderLines {
  header: number | null;
  units: number | null;
}

function isUnitsRow(cells: string[]): boolean {
  const filled = cells
    .map((cell) => cell.replace(/^[[({]\s*(.*?)\s*[\])}]$/, '$1'))
    .filter((cell) => cell !== '');
  const known = filled.filter((cell) => unitMeaning(cell) !== null && cell !== '1');
  return known.length > 0 && known.length * 2 >= filled.length;
}

function isHeaderRow(cells: string[], dialect: Dialect): boolean {
  const filled = cells.filter((cell) => cell !== '');
  const words = filled.filter((cell) => cellKind(cell, dialect.decimal) !== 'number');
  const fits = cells.length >= dialect.columnCount - 1 && filled.length <= dialect.columnCount + 2;
  return words.length > 0 && (fits || (filled.length > 1 && 2 * filled.length - 1 <= dialect.columnCount));
}

function findHeaderLines(rows: string[][], dialect: Dialect): HeaderLines {
  const filled = rows.flatMap((cells, i) =>
    i < dialect.bodyLine && cells.some((cell) => cell !== '') ? [i] : [],
  );
  const last = filled.at(-1);
  if (last === undefined) return { header: null, units: null };
  const before = filled.at(-2);
  const cells = rows[last] as string[];
  if (isUnitsRow(cells) && before !== undefined && isHeaderRow(rows[before] as string[], dialect)) {
    return { header: before, units: last };
  }
  return { header: isHeaderRow(cells, dialect) ? last : null, units: null };
}

/** Between blanks a unit in brackets stands apart from its name; it belongs to the cell before. */
function joinUnits(cells: string[], { delimiter, columnCount }: Dialect): string[] {
  if (delimiter !== ' ' || cells.length <= columnCount) return cells;
  const joined: string[] = [];
  for (const cell of cells) {
    if (/^[[({].*[\])}]$/.test(cell) && joined.length > 0) joined.push(`${joined.pop()} ${cell}`);
    else joined.push(cell);
  }
  return joined.length === columnCount ? joined : cells;
}

function uncomment(cells: string[]): string[] {
  return cells.map((cell, i) => (i === 0 ? cell.replace(/^(#|%|\/\/)\s*/, '') : cell));
}

/**
 * Works out how a table is laid out from its first lines and what the user states.
 * Refuses text in which no table of numbers can be found.
 */
export function detectLayout(lines: string[], fileName: string, options: ImportOptions): CsvLayout {
  const dialect = sniffDialect(lines, options) ?? refuseNoTable(lines, fileName, options);
  const rows = lines
    .slice(0, dialect.bodyLine + SAMPLED_ROWS)
    .map((line) => splitCells(line, dialect.delimiter))
    .map((cells, i) => (i < dialect.bodyLine ? joinUnits(cells, dialect) : cells));
  const { header, units } = findHeaderLines(rows, dialect);
  const headerCells = header === null ? [] : uncomment(rows[header] as string[]);
  refuseCommaClash(dialect, headerCells);
  const body = rows.slice(dialect.bodyLine).filter((cells) => cells.some((cell) => cell !== ''));
  const named = headerCells.findLastIndex((cell) => cell !== '') + 1;
  const count = Math.max(
    dialect.columnCount,
    Math.min(named, Math.max(...body.map((cells) => cells.length))),
  );
  const columns = describeColumns(headerCells, units === null ? null : (rows[units] as string[]), count);
  const doubts: string[] = [];
  const commas = doubtDecimalCommas(rows, dialect, options);
  if (commas !== null) doubts.push(commas);
  if (dialect.ambiguous)
    doubts.push('The table can be read with more than one delimiter; check the columns.');
  const input = { columns, headerCells, body, dialect, options, doubts };
  const time = chooseTimeColumn(input);
  const clocks =
    time.column === null
      ? []
      : findSecondClocks(input, time.column, time.unit === null).filter((index) => !time.ignored.has(index));
  const holdsNumbers = (index: number) =>
    body.some((cells) =>
      ['number', 'grouped', 'other-mark'].includes(cellKind(cells[index] ?? '', dialect.decimal)),
    );
  const candidates = columns.filter(
    (column) =>
      column.index !== time.column && !time.ignored.has(column.index) && !clocks.includes(column.index),
  );
  const metadata = readMetadata(lines.slice(0, header ?? dialect.bodyLine), dialect.delimiter);
  return {
    dialect,
    headerCells,
    unitsLine: units,
    columns,
    valueColumns: candidates.filter(({ index }) => holdsNumbers(index)).map(({ index }) => index),
    leftOut: candidates.filter(({ index }) => !holdsNumbers(index)),
    clocks: columns.filter(({ index }) => clocks.includes(index)),
    clockColumns: [...(time.column === null ? time.unwanted : [time.column]), ...clocks],
    time:
      time.column === null
        ? null
        : { column: time.column, unit: time.unit, secondsPerUnit: time.secondsPerUnit },
    metadata,
    statedSampleRateHz: statedSampleRateHz(metadata),
    doubts,
  };
}
