import type { OrderVerdict, TotalVerdict, VerdictResult } from '@overtally/contracts';

/** Names up to `shown` orders and counts the rest: `15, 19, 21 and 9 more`. */
function listed(names: readonly (string | number)[], shown = 3): string {
  const rest = names.length - shown;
  if (rest > 0) return `${names.slice(0, shown).join(', ')} and ${rest} more`;
  if (names.length < 2) return names.join('');
  return `${names.slice(0, -1).join(', ')} and ${String(names.at(-1))}`;
}

function passed(orders: readonly OrderVerdict[]): string {
  const disregarded = orders.filter(({ result }) => result === 'disregarded').length;
  const relieved = orders.filter(
    ({ sharePercent, result }) => result === 'pass' && (sharePercent ?? 0) > 100,
  );
  const parts = ['Every limited order is within its limit'];
  if (relieved.length > 0) {
    parts[0] = `Above the limit at ${listed(relieved.map(({ order }) => order))} as the POHC relief allows; every other order is within its limit`;
  }
  if (disregarded > 0) parts.push(`${disregarded} too small to count`);
  return parts.join('; ');
}

function undecided(orders: readonly OrderVerdict[], totals: readonly TotalVerdict[]): string {
  const open = orders.filter(({ result }) => result === 'not-decidable');
  const reason = open[0]?.reason ?? totals.find(({ result }) => result === 'not-decidable')?.reason ?? '';
  if (open.length === 0 || open.length === orders.length) return reason;
  const same = open.filter((order) => order.reason === reason);
  return `Not decidable at ${listed(same.map(({ order }) => order))}: ${reason}`;
}

/** Why the verdict as a whole is what it is, naming the orders and totals that decide it. */
export function overallReason(
  result: VerdictResult,
  orders: readonly OrderVerdict[],
  totals: readonly TotalVerdict[],
): string {
  if (result === 'pass' || result === 'not-applicable') return passed(orders);
  if (result === 'not-decidable') return undecided(orders, totals);
  const names = [
    ...orders.filter((order) => order.result === result).map(({ order }) => order),
    ...totals.filter((total) => total.result === result).map(({ name }) => name),
  ];
  switch (result) {
    case 'fail':
      return `Over at ${listed(names)}`;
    case 'conditional-fail':
      return `Over by less than the uncertainty at ${listed(names)}`;
    case 'conditional-pass':
      return `Within by less than the uncertainty at ${listed(names)}`;
  }
}
