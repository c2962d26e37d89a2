const NODES = 4;

/**
 * Rows whose values the cubic at an instant between `row` and `row` + 1 goes through: two on either side where they are
 * there, else the nearest; none beyond a pause.
 */
export function cubicNodes(times: Float64Array, row: number, filled: number, widest: number): number[] {
  let low = row;
  let high = row + 1;
  const canFall = () => low > 0 && (times[low] as number) - (times[low - 1] as number) <= widest;
  const canRise = () => high + 1 < filled && (times[high + 1] as number) - (times[high] as number) <= widest;
  if (canFall()) low -= 1;
  if (canRise()) high += 1;
  while (high - low + 1 < NODES && canRise()) high += 1;
  while (high - low + 1 < NODES && canFall()) low -= 1;
  return Array.from({ length: high - low + 1 }, (_, i) => low + i);
}

/**
 * Weights of the values at `nodes` in Lagrange's interpolation formula at `time` (Abramowitz and Stegun, Handbook of
 * Mathematical Functions, 25.2.1 and 25.2.2). The error of a cubic is |f''''| / 4! x |product of (time - node)|: for a
 * sine of even stamps it stays below 0.0235 (2 pi f / rate)^4 of the amplitude, 0.4 % at a tenth of the rate.
 */
export function weightsAt(time: number, times: Float64Array, nodes: number[]): number[] {
  return nodes.map((node) => {
    const own = times[node] as number;
    let weight = 1;
    for (const other of nodes) {
      const at = times[other] as number;
      if (other !== node) weight *= (time - at) / (own - at);
    }
    return weight;
  });
}

/** Value of a channel at `time`; NaN where one of the rows around it has none or there are no nodes. */
export function interpolate(
  time: number,
  times: Float64Array,
  values: Float64Array,
  row: number,
  nodes: number[],
  weights: number[],
): number {
  let sum = 0;
  for (let i = 0; i < nodes.length; i += 1)
    sum += (weights[i] as number) * (values[nodes[i] as number] as number);
  if (nodes.length === 0 || Number.isNaN(values[row]) || Number.isNaN(values[row + 1])) return NaN;
  if (!Number.isNaN(sum)) return sum;
  // A number is missing farther out: the polynomial goes through those there are.
  const present = nodes.filter((node) => !Number.isNaN(values[node]));
  return interpolate(time, times, values, row, present, weightsAt(time, times, present));
}
