import type { LimitEntry, TotalLimit } from '@overtally/contracts';
import { ExpressionError, parseExpression, type Expression } from './arithmetic.js';
import { ordersOfCell } from './orders-cell.js';
import { splitLine, type Cell } from './split-line.js';
import { readUnitCell } from './unit-cell.js';

/** What is wrong at a place of the text; line and column count from 1. */
export interface TableProblem {
  line: number;
  column: number;
  message: string;
}

export type LimitTable =
  | { orders: LimitEntry[]; totals: TotalLimit[]; problems: null }
  | { orders: null; totals: null; problems: TableProblem[] };

class CellError extends Error {
  constructor(
    message: string,
    readonly column: number,
  ) {
    super(message);
  }
}

const totalNames = ['THD', 'THC', 'POHC', 'PWHC', 'TDD'] as const;
const lastOrderOfTotals = 40;
const none: Cell = { text: '', column: 1 };

/** Shortest number that still says what it was worked out to: 12 digits hide the rounding of binary arithmetic. */
const rounded = (value: number): number => Number(value.toPrecision(12));

function expressionOf({ text, column }: Cell, what: string): Expression {
  if (text === '') throw new CellError(`The ${what} is missing`, column);
  try {
    return parseExpression(text);
  } catch (error) {
    if (error instanceof ExpressionError)
      throw new CellError(`${what} “${text}”: ${error.message}`, column + error.at);
    throw error;
  }
}

function valueAt(expression: Expression, order: number, { text, column }: Cell): number {
  const value = rounded(expression(order));
  if (Number.isFinite(value) && value > 0) return value;
  throw new CellError(`“${text}” is not a number above zero at order ${order}`, column);
}

/** Whether a text depends on the order, so that it is kept for display. */
const isFormula = (text: string): boolean => /[nh*/()]/i.test(text);

function readOrders(cells: readonly Cell[]): LimitEntry[] {
  const [ordersCell = none, limitCell = none, unitCell = none, capCell] = cells;
  const named = ordersOfCell(ordersCell.text);
  if ('problem' in named) throw new CellError(named.problem, ordersCell.column);
  const limit = expressionOf(limitCell, 'limit');
  const reading = readUnitCell(unitCell.text);
  if (reading === null) {
    const known = 'give A, mA, V, %, % IL, % Iref, % Un or mA/W';
    throw new CellError(`“${unitCell.text}” is not a unit of limits; ${known}`, unitCell.column);
  }
  const hasCap = capCell !== undefined && capCell.text !== '';
  if (hasCap && reading.basis !== undefined && reading.basis !== 'milliampere-per-watt') {
    throw new CellError('Only limits in mA/W have a cap in A', capCell.column);
  }
  const cap = hasCap ? expressionOf(capCell, 'cap') : null;
  return named.orders.map((order) => ({
    order,
    limit: valueAt(limit, order, limitCell),
    ...(hasCap && cap ? { capA: valueAt(cap, order, capCell) } : {}),
    ...reading,
    ...(isFormula(limitCell.text) ? { formula: limitCell.text } : {}),
  }));
}

/** A total: `THD; 8; %; 40`, the last cell the highest order that counts. */
function readTotal(name: TotalLimit['name'], cells: readonly Cell[]): TotalLimit {
  const [nameCell = none, limitCell = none, unitCell = none, lastCell = none] = cells;
  const limit = valueAt(expressionOf(limitCell, 'limit'), lastOrderOfTotals, limitCell);
  const reading = readUnitCell(unitCell.text);
  if (reading === null) throw new CellError(`“${unitCell.text}” is not a unit of limits`, unitCell.column);
  const maxOrder = lastCell.text === '' ? lastOrderOfTotals : Number(lastCell.text);
  if (!Number.isInteger(maxOrder) || maxOrder < 2 || maxOrder > 200) {
    throw new CellError(
      'The highest order is a whole number from 2 to 200',
      lastCell.column || nameCell.column,
    );
  }
  const isPercent = name === 'THD' || name === 'TDD';
  const basis = reading.basis === undefined || isPercent ? {} : { basis: reading.basis };
  return { name, limit, maxOrder, ...basis };
}

/**
 * Reads a table of limits from delimited text: `order; limit; unit; cap` on each line.
 *
 * Cells are parted by tab, semicolon or comma, the order also by a colon; with tab or semicolon a decimal comma is
 * read. An order is `3`, `15-39` or `15-39 odd`; a limit is a number or arithmetic of n, as `0.15*15/n`, worked out
 * for each order and kept as its formula; the unit is an amount, `%`, `% IL`, `% Iref`, `% Un` or `mA/W`, as the set
 * says when empty; the cap in A goes with mA/W. Lines `THD; 8; %; 40` give totals. Lines before the first that
 * begins with an order or a total are headings; `#` begins a remark. All problems are listed, none is skipped.
 */
export function parseLimitTable(text: string): LimitTable {
  const problems: TableProblem[] = [];
  const orders = new Map<number, { entry: LimitEntry; line: number }>();
  const totals = new Map<string, TotalLimit>();
  let hasBegun = false;
  const take = (cells: readonly Cell[], line: number): void => {
    const [first = none] = cells;
    const total = totalNames.find((name) => name === first.text.toUpperCase());
    if (!hasBegun && total === undefined && !/^\d/.test(first.text)) return;
    hasBegun = true;
    if (total !== undefined) {
      if (totals.has(total)) throw new CellError(`${total} stands twice`, first.column);
      totals.set(total, readTotal(total, cells));
      return;
    }
    for (const entry of readOrders(cells)) {
      const earlier = orders.get(entry.order);
      if (earlier)
        throw new CellError(`Order ${entry.order} stands in line ${earlier.line} already`, first.column);
      orders.set(entry.order, { entry, line });
    }
  };
  text
    .replace(/^\uFEFF/, '')
    .split(/\r\n|\r|\n/)
    .forEach((line, index) => {
      if (line.trim() === '' || line.trimStart().startsWith('#')) return;
      try {
        take(splitLine(line), index + 1);
      } catch (error) {
        if (!(error instanceof CellError)) throw error;
        problems.push({ line: index + 1, column: error.column, message: error.message });
      }
    });
  if (problems.length === 0 && orders.size === 0) {
    problems.push({
      line: 1,
      column: 1,
      message: 'There is no order with a limit; give lines such as 3; 2.30; A',
    });
  }
  if (problems.length > 0) return { orders: null, totals: null, problems };
  const entries = [...orders.values()].map(({ entry }) => entry);
  return { orders: entries.sort((a, b) => a.order - b.order), totals: [...totals.values()], problems: null };
}
