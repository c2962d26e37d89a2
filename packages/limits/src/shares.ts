import type { ChannelSummary, LimitSet, VerdictParameters } from '@overtally/contracts';
import { amountOf } from './limit-for-order.js';
import { resolveLimits } from './resolve.js';

const firstOrder = 2;
const lastOrder = 40;

/**
 * Share of its limit that each order from 2 to 40 uses, in percent, for the tally strip of a list row.
 *
 * Taken from the plain rms values of the summary, so it shows where a channel stands; a verdict uses the
 * grouped and smoothed values. Null where the set has no limit, the order was not computed, a parameter is
 * missing, or the set is for another quantity.
 */
export function sharesOfSummary(
  set: LimitSet,
  summary: ChannelSummary,
  parameters: VerdictParameters = {},
): { order: number; sharePercent: number | null }[] {
  const fits = set.quantity === summary.quantity;
  const held = fits ? resolveLimits(set, parameters).limits?.[0]?.set : undefined;
  const entries = new Map(held?.orders.map((entry) => [entry.order, entry]));
  const context = { fundamentalRms: summary.harmonicRms[0] ?? null, parameters, unit: summary.unit };
  return Array.from({ length: lastOrder - firstOrder + 1 }, (_, i) => {
    const order = firstOrder + i;
    const rms = summary.harmonicRms[order - 1];
    const entry = entries.get(order);
    const limit = held && entry ? amountOf(entry, held, context) : null;
    const known = rms !== undefined && limit !== null && limit > 0;
    return { order, sharePercent: known ? (100 * rms) / limit : null };
  });
}
