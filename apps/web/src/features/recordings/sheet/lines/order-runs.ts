interface Run {
  step: number;
  orders: number[];
}

/** Neighbours from which on a run is shortened, by the step between them: 5 to 8, and 1, 3 … 39. */
const shortenedFrom: Record<number, number> = { 1: 3, 2: 4 };

/** The longest run of equal steps that begins at `from`; steps of more than 2 make no run. */
function runAt(orders: readonly number[], from: number): Run {
  const step = (orders[from + 1] ?? Infinity) - (orders[from] ?? 0);
  const run = [orders[from] ?? 0];
  if (step > 2) return { step: 1, orders: run };
  for (let i = from + 1; (orders[i] ?? Infinity) - (orders[i - 1] ?? 0) === step; i++)
    run.push(orders[i] ?? 0);
  return { step, orders: run };
}

/** Orders with runs shortened: "1, 3, 5 to 9, 13", "1, 3 … 39". */
export function orderRuns(orders: readonly number[]): string {
  const sorted = orders.toSorted((a, b) => a - b);
  const parts: string[] = [];
  for (let at = 0; at < sorted.length;) {
    const { step, orders: run } = runAt(sorted, at);
    const isLong = run.length >= (shortenedFrom[step] ?? Infinity);
    if (!isLong) {
      parts.push(String(run[0]));
      at += 1;
      continue;
    }
    parts.push(step === 1 ? `${run[0]} to ${run.at(-1)}` : `${run[0]}, ${run[1]} … ${run.at(-1)}`);
    at += run.length;
  }
  return parts.join(', ');
}
