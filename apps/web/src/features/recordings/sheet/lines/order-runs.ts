/** Orders with runs shortened: "1, 3, 5 to 9, 13". A run has at least three neighbours. */
export function orderRuns(orders: readonly number[]): string {
  const runs: number[][] = [];
  for (const order of orders.toSorted((a, b) => a - b)) {
    const last = runs.at(-1);
    if (last && order - (last.at(-1) ?? 0) === 1) last.push(order);
    else runs.push([order]);
  }
  return runs.map((run) => (run.length < 3 ? run.join(', ') : `${run[0]} to ${run.at(-1)}`)).join(', ');
}
