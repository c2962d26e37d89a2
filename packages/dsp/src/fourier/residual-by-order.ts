import type { FourierSeries, SeriesComponent } from './types.js';

export interface ResidualByOrder {
  /** rms of the AC wave: all orders and the rest. */
  acRms: number;
  /** Orders from the largest to the smallest; of equals, the lower one first. */
  ordersByMagnitude: number[];
  /** Index n: rms of what is left of the AC wave after its n largest orders, n = 0..count. */
  byMagnitude: number[];
  /** Index n: rms of what is left after the orders 1..n, n = 0..highest order. */
  byOrder: number[];
}

/**
 * What is left of the AC wave when it is rebuilt order by order, by Parseval's theorem: the squares of the orders that are
 * missing and of the rest.
 */
export function residualRmsByOrder(series: FourierSeries): ResidualByOrder {
  const { components, restRms = 0 } = series;
  const sorted = [...components].sort((a, b) => b.rms - a.rms || a.order - b.order);
  const highest = components.reduce((max, { order }) => Math.max(max, order), 0);
  const inOrder = Array.from(
    { length: highest },
    (_, i) => components.find(({ order }) => order === i + 1)?.rms ?? 0,
  );
  const byMagnitude = remainders(
    sorted.map(({ rms }) => rms),
    restRms,
  );
  return {
    acRms: byMagnitude[0]!,
    ordersByMagnitude: sorted.map(({ order }: SeriesComponent) => order),
    byMagnitude,
    byOrder: remainders(inOrder, restRms),
  };
}

export interface OrdersForResidual {
  /** From the largest to the smallest. */
  orders: number[];
  /** rms of what they leave over, in percent of the rms of the AC wave. */
  residualPercent: number;
}

/**
 * The smallest number of orders, taken by magnitude, that rebuild the AC wave to within a residual.
 *
 * @param percent largest rms of the residual, in percent of the rms of the AC wave
 * @returns null when there is no AC wave or even all orders leave more over
 */
export function ordersForResidual(series: FourierSeries, percent: number): OrdersForResidual | null {
  const { acRms, ordersByMagnitude, byMagnitude } = residualRmsByOrder(series);
  if (acRms === 0) return null;
  const count = byMagnitude.findIndex((rms) => rms <= (percent / 100) * acRms);
  if (count < 0) return null;
  return {
    orders: ordersByMagnitude.slice(0, count),
    residualPercent: (100 * byMagnitude[count]!) / acRms,
  };
}

/** Index n: root of the sum of squares from the n-th value on, added from the end so that small ones count. */
function remainders(rms: readonly number[], restRms: number): number[] {
  const left = [restRms * restRms];
  for (let i = rms.length - 1; i >= 0; i--) left.push(left[left.length - 1]! + rms[i]! ** 2);
  return left.reverse().map(Math.sqrt);
}
