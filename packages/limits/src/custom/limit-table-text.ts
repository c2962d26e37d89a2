import type { LimitEntry, LimitSet, TotalLimit } from '@overtally/contracts';
import { readBy } from '../limit-for-order.js';
import { parseLimitRows } from './parse-limit-table.js';
import { symbolOf, unitCell } from './unit-cell.js';

type Limits = Pick<LimitSet, 'basis' | 'unit' | 'referenceParameter' | 'orders' | 'totals'>;

/** One row of a limit table; `cap` is empty but with limits in mA/W, and the highest order with totals. */
export type LimitTableRow = [orders: string, limit: string, unit: string, cap: string];

const leastRange = 3;

/** The formula of an entry where it gives its limit, else the number. */
function limitCell({ order, limit, timesParameter, formula }: LimitEntry): string {
  const number = timesParameter ? `${limit}*${symbolOf(timesParameter)}` : String(limit);
  if (formula === undefined) return number;
  const [read] = parseLimitRows([[String(order), formula]]).orders ?? [];
  return read?.limit === limit && read.timesParameter === timesParameter ? formula : number;
}

/** Orders in steps of one or two as one cell; fewer than three stand alone. */
function ordersCells(orders: readonly number[]): { first: number; cell: string }[] {
  const cells: { first: number; cell: string }[] = [];
  for (let i = 0; i < orders.length;) {
    const [first = 0, second = 0] = orders.slice(i);
    const step = second - first;
    let last = i;
    while ((step === 1 || step === 2) && orders[last + 1] === (orders[last] ?? 0) + step) last += 1;
    const length = last - i + 1;
    if (length < leastRange) {
      cells.push({ first, cell: String(first) });
      i += 1;
      continue;
    }
    const which = step === 1 ? '' : first % 2 === 1 ? ' odd' : ' even';
    cells.push({ first, cell: `${first}-${orders[last]}${which}` });
    i += length;
  }
  return cells;
}

function totalRow({ name, limit, maxOrder, basis }: TotalLimit, set: Limits): LimitTableRow {
  const ofName = name === 'THD' ? '%' : name === 'TDD' ? '% IL' : unitCell(set);
  return [name, String(limit), basis === undefined ? ofName : unitCell({ ...set, basis }), String(maxOrder)];
}

/** The limits of a set as rows of cells that `parseLimitRows` reads back; equal limits stand as a range of orders. */
export function limitTableRows(set: Limits): LimitTableRow[] {
  const groups = new Map<string, { cells: [string, string, string]; orders: number[] }>();
  for (const entry of [...set.orders].sort((one, other) => one.order - other.order)) {
    const cells: [string, string, string] = [
      limitCell(entry),
      unitCell(readBy(set, entry)),
      entry.capA === undefined ? '' : String(entry.capA),
    ];
    const key = JSON.stringify(cells);
    const group = groups.get(key) ?? { cells, orders: [] };
    group.orders.push(entry.order);
    groups.set(key, group);
  }
  const rows = [...groups.values()].flatMap(({ cells, orders }) =>
    ordersCells(orders).map(({ first, cell }) => ({ first, row: [cell, ...cells] satisfies LimitTableRow })),
  );
  return [
    ...rows.sort((one, other) => one.first - other.first).map(({ row }) => row),
    ...set.totals.map((total) => totalRow(total, set)),
  ];
}

const remark = (text: string): string => `# ${text.replace(/\s+/g, ' ').trim()}`;

/**
 * The limits of a set as CSV (RFC 4180, a remark behind `#` in each of the first lines) that `parseLimitTable`
 * reads back: the same orders, limits, formulas, units, caps and totals; of a formula
 * in words the number. Of a set with rows, give one of them.
 */
export function limitTableText(
  set: Limits & Pick<LimitSet, 'title' | 'edition' | 'version' | 'source'>,
): string {
  const remarks = [
    `${set.title}, version ${set.version}`,
    `Edition: ${set.edition || 'not stated'}`,
    ...set.source.map((source) => `Source: ${source}`),
    'Check the values against the edition that applies.',
  ];
  const rows = limitTableRows(set).map((row) => row.join(','));
  return [...remarks.map(remark), 'order,limit,unit,cap or highest order', ...rows, ''].join('\r\n');
}
