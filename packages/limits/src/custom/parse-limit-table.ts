import type { LimitEntry, ParameterName, TotalLimit } from '@overtally/contracts';
import { ExpressionError, parseExpression, type Expression } from './arithmetic.js';
import { ordersOfCell } from './orders-cell.js';
import { decimalPoints, splitLine, type Cell } from './split-line.js';
import { parameterOf, readUnitCell } from './unit-cell.js';

/** What is wrong at a place of the text; line and column count from 1. */
export interface TableProblem {
  line: number;
  column: number;
  /** Which cell of the line, from 0: orders or total, limit, unit, cap or highest order. */
  cell: number;
  message: string;
}

export type LimitTable =
  | { orders: LimitEntry[]; totals: TotalLimit[]; problems: null }
  | { orders: null; totals: null; problems: TableProblem[] };

class CellError extends Error {
  constructor(
    message: string,
    readonly cell: number,
    /** Characters into the cell. */
    readonly at = 0,
  ) {
    super(message);
  }
}

const totalNames = ['THD', 'THC', 'POHC', 'PWHC', 'TDD'] as const;
const lastOrderOfTotals = 40;
const units = 'give A, mA, V, %, % IL, % Iref, % Un or mA/W';
const timesPattern = /^(.+)\*\s*([a-z]+)$/i;

const textAt = (cells: readonly Cell[], cell: number): string => cells[cell]?.text ?? '';

function expressionAt(cells: readonly Cell[], cell: number, what: string, text: string): Expression {
  if (text === '') throw new CellError(`The ${what} is missing: give a number, or arithmetic of n`, cell);
  try {
    return parseExpression(text);
  } catch (error) {
    if (!(error instanceof ExpressionError)) throw error;
    const cure = 'give a number or arithmetic of n, such as 0.15*15/n';
    throw new CellError(`${what} “${textAt(cells, cell)}”: ${error.message}; ${cure}`, cell, error.at);
  }
}

function valueAt(expression: Expression, order: number, cells: readonly Cell[], cell: number): number {
  const value = expression(order);
  if (Number.isFinite(value) && value > 0) return value;
  throw new CellError(`“${textAt(cells, cell)}” is not a number above zero at order ${order}`, cell);
}

/** Whether a text depends on the order or a parameter, so that it is kept for display. */
const isFormula = (text: string): boolean => /[nh*/()]/i.test(text);

/** A limit that a parameter multiplies, as `30*lambda`, apart from the parameter. */
function timesParameterOf(text: string): { expression: string; timesParameter?: ParameterName } {
  const [, expression, name = ''] = timesPattern.exec(text) ?? [];
  const timesParameter = parameterOf(name);
  return expression === undefined || !timesParameter ? { expression: text } : { expression, timesParameter };
}

function readOrders(cells: readonly Cell[]): LimitEntry[] {
  const named = ordersOfCell(textAt(cells, 0));
  if ('problem' in named) throw new CellError(named.problem, 0);
  const { expression, timesParameter } = timesParameterOf(textAt(cells, 1));
  const limit = expressionAt(cells, 1, 'limit', expression);
  const reading = readUnitCell(textAt(cells, 2));
  if (reading === null) throw new CellError(`“${textAt(cells, 2)}” is not a unit of limits; ${units}`, 2);
  const hasCap = textAt(cells, 3) !== '';
  if (hasCap && reading.basis !== undefined && reading.basis !== 'milliampere-per-watt') {
    throw new CellError('Only limits in mA/W have a cap in A; leave the cell empty', 3);
  }
  const cap = hasCap ? expressionAt(cells, 3, 'cap', textAt(cells, 3)) : null;
  const formula = textAt(cells, 1);
  return named.orders.map((order) => ({
    order,
    limit: valueAt(limit, order, cells, 1),
    ...(cap ? { capA: valueAt(cap, order, cells, 3) } : {}),
    ...(timesParameter ? { timesParameter } : {}),
    ...reading,
    ...(isFormula(formula) ? { formula } : {}),
  }));
}

/** What a total refers to without being told: THD to the fundamental, TDD to IL. */
const ownBasis: Partial<Record<TotalLimit['name'], TotalLimit['basis']>> = {
  THD: 'percent-of-fundamental',
  TDD: 'percent-of-reference',
};

/** A total: `THD; 8; %; 40`, the last cell the highest order that counts. */
function readTotal(name: TotalLimit['name'], cells: readonly Cell[]): TotalLimit {
  const limit = valueAt(expressionAt(cells, 1, 'limit', textAt(cells, 1)), lastOrderOfTotals, cells, 1);
  const reading = readUnitCell(textAt(cells, 2));
  if (reading === null) throw new CellError(`“${textAt(cells, 2)}” is not a unit of limits; ${units}`, 2);
  const last = textAt(cells, 3);
  const maxOrder = last === '' ? lastOrderOfTotals : Number(last);
  if (!Number.isInteger(maxOrder) || maxOrder < 2 || maxOrder > 200) {
    throw new CellError('The highest order is a whole number from 2 to 200', 3);
  }
  const isOwn = reading.basis === undefined || reading.basis === ownBasis[name] || name === 'TDD';
  return { name, limit, maxOrder, ...(isOwn ? {} : { basis: reading.basis }) };
}

interface TableLine {
  cells: readonly Cell[];
  /** From 1. */
  line: number;
}

function readLines(lines: readonly TableLine[]): LimitTable {
  const problems: TableProblem[] = [];
  const orders = new Map<number, { entry: LimitEntry; line: number }>();
  const totals = new Map<string, TotalLimit>();
  const take = ({ cells, line }: TableLine): void => {
    const total = totalOf(textAt(cells, 0));
    if (total !== undefined) {
      if (totals.has(total)) throw new CellError(`${total} stands twice; leave one out`, 0);
      totals.set(total, readTotal(total, cells));
      return;
    }
    for (const entry of readOrders(cells)) {
      const earlier = orders.get(entry.order);
      if (earlier)
        throw new CellError(`Order ${entry.order} stands in line ${earlier.line} already; leave one out`, 0);
      orders.set(entry.order, { entry, line });
    }
  };
  for (const each of lines) {
    try {
      take(each);
    } catch (error) {
      if (!(error instanceof CellError)) throw error;
      const { message, cell, at } = error;
      const last = each.cells.at(-1);
      const column = (each.cells[cell] ?? last)?.column ?? 1;
      problems.push({ line: each.line, column: column + at, cell, message });
    }
  }
  if (problems.length === 0 && orders.size === 0) {
    const message = 'There is no order with a limit; give lines such as 3; 2.30; A';
    problems.push({ line: 1, column: 1, cell: 0, message });
  }
  if (problems.length > 0) return { orders: null, totals: null, problems };
  const entries = [...orders.values()].map(({ entry }) => entry);
  return { orders: entries.sort((a, b) => a.order - b.order), totals: [...totals.values()], problems: null };
}

const totalOf = (text: string) => totalNames.find((name) => name === text.toUpperCase());

/** Lines that hold something, cell by cell, from the first that begins with an order or a total. */
export function limitTableLines(text: string): TableLine[] {
  const lines = text
    .replace(/^\uFEFF/, '')
    .split(/\r\n|\r|\n/)
    .map((line, index) => ({ text: line.trim(), cells: splitLine(line), line: index + 1 }))
    .filter((line) => line.text !== '' && !line.text.startsWith('#'));
  const first = lines.findIndex(({ cells }) => /^\d/.test(textAt(cells, 0)) || totalOf(textAt(cells, 0)));
  return first === -1 ? [] : lines.slice(first).map(({ cells, line }) => ({ cells, line }));
}

/**
 * Reads a table of limits from delimited text: `order; limit; unit; cap` on each line.
 *
 * Cells are parted by tab, semicolon or comma, the order also by a colon; with tab or semicolon a decimal comma is
 * read. An order is `3`, `15-39` or `15-39 odd`; a limit is a number or arithmetic of n, as `0.15*15/n`, worked out
 * for each order and kept as its formula, and may be multiplied by a parameter, as `30*lambda`; the unit is an
 * amount, `%`, `% IL`, `% Iref`, `% Un` or `mA/W`, as the set says when empty; the cap in A goes with mA/W. Lines
 * `THD; 8; %; 40` give totals. Lines before the first that begins with an order or a total are headings; `#` begins
 * a remark. All problems are listed, none is skipped.
 */
export const parseLimitTable = (text: string): LimitTable => readLines(limitTableLines(text));

/** Reads rows of cells as `parseLimitTable` reads lines; row 0 is line 1, and the column counts characters. */
export const parseLimitRows = (rows: readonly (readonly string[])[]): LimitTable =>
  readLines(
    rows.map((texts, index) => ({
      cells: texts.map((text) => ({ text: decimalPoints(text.trim()), column: 1 })),
      line: index + 1,
    })),
  );
