import { findColumn } from '../channels.js';
import type { ImportOptions, LayoutColumn } from '../types.js';
import { secondsPerUnit } from '../units.js';
import { cellKind, cellNumber } from './cell.js';
import type { Dialect } from './dialect.js';

const TIME_NAME =
  /^(time|zeit|temps|tiempo|tempo|tijd|timestamp|seconds?|secs?|sekunden?|elapsed|uhrzeit|date|datum|x.?axis)(?![a-z])|(time|zeit)(stamp|stempel)?$|^t$/i;
const INDEX_NAME =
  /^(index|idx|no\.?|nr\.?|n|#|samples?|sample.?(no|nr|number|index)\.?|row|point|counter|scan)$/i;
const UNIT_SECONDS = { s: 1, ms: 1e-3, us: 1e-6, ns: 1e-9 } as const;

/** The time column, the unit of its stamps, and seconds per unit. Unit null: calendar or clock stamps. */
export interface TimeChoice {
  column: number;
  unit: string | null;
  secondsPerUnit: number;
}

interface Choice {
  column: number | null;
  unit: string | null;
  secondsPerUnit: number;
  /** Columns that are no values: sample counters, and time columns the user does not want. */
  ignored: Set<number>;
  /** Time columns among the ignored. */
  unwanted: number[];
}

export interface TimeColumnInput {
  columns: LayoutColumn[];
  headerCells: string[];
  body: string[][];
  dialect: Dialect;
  options: ImportOptions;
  /** Receives what a person should look at. */
  doubts: string[];
}

/** True for a name that says time, in the words that instruments use. */
export function isTimeName(name: string): boolean {
  return TIME_NAME.test(name) && !INDEX_NAME.test(name);
}

function numbersOf(input: TimeColumnInput, index: number): number[] {
  const { decimal } = input.dialect;
  const cells = input.body.map((row) => row[index] ?? '');
  return cells
    .filter((cell) => cellKind(cell, decimal) === 'number')
    .map((cell) => cellNumber(cell, decimal));
}

function isRegular(values: number[]): boolean {
  if (values.length < 3) return false;
  const steps = values.slice(1).map((value, i) => value - (values[i] as number));
  const mean = ((values.at(-1) as number) - (values[0] as number)) / steps.length;
  return mean > 0 && steps.every((step) => step > 0 && Math.abs(step - mean) <= 0.1 * mean);
}

function isCounter(values: number[]): boolean {
  return isRegular(values) && (values[0] === 0 || values[0] === 1) && (values[1] as number) - values[0] === 1;
}

/** A column that is no time by its unit or quantity cannot be the time, whatever its name. */
function mayBeTime(column: LayoutColumn): boolean {
  return column.unit === '' || secondsPerUnit(column.unit) !== null;
}

function hasStamps(input: TimeColumnInput, index: number): boolean {
  return cellKind(input.body[0]?.[index] ?? '', input.dialect.decimal) === 'stamp';
}

function findByHeader(input: TimeColumnInput): number | null {
  const usable = (column: LayoutColumn) =>
    hasStamps(input, column.index) || numbersOf(input, column.index).length > 0;
  const candidates = input.columns.filter((column) => mayBeTime(column) && usable(column));
  const named = candidates.find((column) => isTimeName(column.name));
  const stamped = candidates.find((column) => hasStamps(input, column.index));
  const byUnit = candidates.find((column) => column.index === 0 && secondsPerUnit(column.unit) !== null);
  return (named ?? stamped ?? byUnit)?.index ?? null;
}

function findByValues(input: TimeColumnInput): number | null {
  const [first] = input.columns;
  if (input.options.sampleRateHz !== undefined) return null;
  if (first === undefined || input.columns.length < 2 || first.quantity !== 'other' || !mayBeTime(first))
    return null;
  const values = numbersOf(input, 0);
  if (!isRegular(values) || isCounter(values) || INDEX_NAME.test(first.name)) return null;
  input.doubts.push(
    `The column "${first.name}" rises in equal steps, so it was taken as the time in seconds; nothing in the file says so.`,
  );
  return 0;
}

function counters(input: TimeColumnInput): number[] {
  const named = input.columns.filter(
    (column) => INDEX_NAME.test(column.name) || (column.index === 0 && /^column \d+$/.test(column.name)),
  );
  const found = named.filter(
    (column) => isCounter(numbersOf(input, column.index)) && input.columns.length > 1,
  );
  return found.map((column) => column.index);
}

/** Chooses the time column: what the user states, else by header, stamps or unit, else a first column in equal steps. */
export function chooseTimeColumn(input: TimeColumnInput): Choice {
  const { options, columns } = input;
  const ignored = new Set(counters(input));
  const byHeader = findByHeader(input);
  if (options.timeColumn === null) {
    const unwanted = byHeader !== null && input.headerCells.length > 0 ? [byHeader] : [];
    for (const index of unwanted) ignored.add(index);
    return { column: null, unit: null, secondsPerUnit: 1, ignored, unwanted };
  }
  const column =
    options.timeColumn === undefined
      ? (byHeader ?? findByValues(input))
      : findColumn(options.timeColumn, columns, input.headerCells, 'time column');
  const rest = { column, ignored, unwanted: [] };
  if (column === null) return { ...rest, unit: null, secondsPerUnit: 1 };
  ignored.delete(column);
  if (hasStamps(input, column)) return { ...rest, unit: null, secondsPerUnit: 1 };
  if (options.timeUnit !== undefined) {
    return { ...rest, unit: options.timeUnit, secondsPerUnit: UNIT_SECONDS[options.timeUnit] };
  }
  const stated = secondsPerUnit(columns[column]?.unit ?? '') ?? secondsPerUnit(columns[column]?.name ?? '');
  if (stated === null && input.headerCells.length > 0) {
    const values = numbersOf(input, column);
    const wholeSteps = values.length > 2 && values.every((value) => Number.isInteger(value));
    if (wholeSteps)
      input.doubts.push('The time column names no unit; its whole numbers were taken as seconds.');
  }
  const written = Object.entries(UNIT_SECONDS).find(([, seconds]) => seconds === (stated ?? 1))?.[0];
  return { ...rest, unit: written ?? columns[column]?.unit ?? 's', secondsPerUnit: stated ?? 1 };
}
