const pattern = /^(\d{1,3})(?:\s*(?:-|–|\.\.|to)\s*(\d{1,3}))?(?:\s+(odd|even|all))?$/i;
const lowest = 2;
const highest = 200;

export type OrdersCell = { orders: number[]; isRange: boolean } | { problem: string };

/** Orders that a cell names: `3`, `15-39`, `15-39 odd`, `8 to 40 even`. */
export function ordersOfCell(cell: string): OrdersCell {
  const match = pattern.exec(cell.trim());
  if (match === null) return { problem: `“${cell}” is not an order; give 3, 15-39 or 15-39 odd` };
  const first = Number(match[1]);
  const last = match[2] === undefined ? first : Number(match[2]);
  if (first < lowest || last > highest) return { problem: `Orders are from ${lowest} to ${highest}` };
  if (last < first) return { problem: `The range ${first} to ${last} runs backwards` };
  const which = match[3]?.toLowerCase();
  const all = Array.from({ length: last - first + 1 }, (_, i) => first + i);
  const orders = all.filter(
    (order) => which === undefined || which === 'all' || (order % 2 === 1) === (which === 'odd'),
  );
  return orders.length === 0
    ? { problem: `There is no ${which ?? ''} order in ${first} to ${last}` }
    : { orders, isRange: last > first };
}
