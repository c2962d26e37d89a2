import type { LimitSet, VerdictParameters } from '@overtally/contracts';
import { amountOf } from './limit-for-order.js';
import { within } from './decision.js';
import type { Measurement } from './measurement.js';
import { resolveLimits } from './resolve.js';

/**
 * Orders whose largest smoothed value is above 150 % of their limit under a set that allows this for a short time
 * (class A of IEC 61000-3-2): the verdict on them hangs on their smoothed values over time.
 */
export function ordersAbove150(
  set: LimitSet,
  measurement: Measurement,
  parameters: VerdictParameters,
): number[] {
  if (!set.shortExcursion) return [];
  const { fundamentalRms, unit, harmonics } = measurement;
  const context = { fundamentalRms, parameters, unit };
  const largest = new Map(harmonics.map(({ order, smoothedMax }) => [order, smoothedMax]));
  const limited = (resolveLimits(set, parameters).limits ?? []).flatMap((limits) =>
    limits.set.orders.map((entry) => ({ order: entry.order, limit: amountOf(entry, limits.set, context) })),
  );
  const above = limited.filter(({ order, limit }) => {
    const value = largest.get(order) ?? null;
    return limit !== null && value !== null && !within(value, 1.5 * limit);
  });
  return [...new Set(above.map(({ order }) => order))];
}
