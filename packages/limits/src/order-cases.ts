import type { LimitSet, OrderVerdict, VerdictParameters } from '@overtally/contracts';
import type { Decision } from './decision.js';
import { limitForOrder } from './limit-for-order.js';
import type { Measurement } from './measurement.js';

/** One limited order with what was measured of it; `gap` says why it cannot be decided. */
export interface OrderCase {
  order: number;
  limit: number | null;
  mean: number | null;
  smoothedMax: number | null;
  gap: string | null;
}

/** An order that can be compared: nothing is missing. */
export interface DecidableCase extends OrderCase {
  limit: number;
  mean: number;
  gap: null;
}

export const isDecidable = (orderCase: OrderCase): orderCase is DecidableCase => orderCase.gap === null;

/** The orders that the set limits, in rising order, beside the measured values. */
export function orderCases(
  set: LimitSet,
  measurement: Measurement,
  parameters: VerdictParameters,
  commonGap: string | null,
): OrderCase[] {
  const context = { fundamentalRms: measurement.fundamentalRms, parameters, unit: measurement.unit };
  const measured = new Map(measurement.harmonics.map((harmonic) => [harmonic.order, harmonic]));
  return set.orders
    .map(({ order }) => {
      const beyond = order > measurement.highestMeasurableOrder;
      const harmonic = beyond ? undefined : measured.get(order);
      const ownGap = beyond
        ? `Beyond the highest order that the sample rate allows (${measurement.highestMeasurableOrder})`
        : harmonic === undefined
          ? 'Not analysed: raise the highest order of the analysis'
          : null;
      return {
        order,
        limit: limitForOrder(set, order, context),
        mean: harmonic?.mean ?? null,
        smoothedMax: harmonic?.smoothedMax ?? null,
        gap: commonGap ?? ownGap,
      };
    })
    .sort((a, b) => a.order - b.order);
}

/** The row of a verdict for one order. */
export function orderVerdict(
  { order, limit, mean, smoothedMax }: OrderCase,
  decision: Decision,
  result: OrderVerdict['result'],
  reason: string | null,
): OrderVerdict {
  const known = limit !== null && mean !== null;
  const { uncertaintyPercent } = decision;
  return {
    order,
    mean,
    smoothedMax,
    uncertainty: mean === null || uncertaintyPercent === null ? null : (uncertaintyPercent / 100) * mean,
    limit,
    margin: known ? limit - mean : null,
    sharePercent: known ? (100 * mean) / limit : null,
    result,
    reason,
  };
}
