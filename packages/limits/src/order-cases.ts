import type { LimitSet, OrderVerdict, VerdictParameters } from '@overtally/contracts';
import { expandedUncertainty, within, withMeasured, type Decision } from './decision.js';
import { amountOf } from './limit-for-order.js';
import type { Measurement } from './measurement.js';

type MeasuredOrder = Measurement['harmonics'][number];

/** One limited order with what was measured of it; `gap` says why it cannot be decided. */
export interface OrderCase {
  order: number;
  limit: number | null;
  mean: number | null;
  smoothedMax: number | null;
  /** Decision on this order, with its own expanded uncertainty where it has one. */
  decision: Decision;
  /** Share of the observation with smoothed values above 150 % of the limit; null when not known. */
  timeAbove150Share: number | null;
  gap: string | null;
}

/** An order that can be compared: nothing is missing. */
export interface DecidableCase extends OrderCase {
  limit: number;
  mean: number;
  gap: null;
}

export const isDecidable = (orderCase: OrderCase): orderCase is DecidableCase => orderCase.gap === null;

const guardGap = 'The decision rule needs the expanded uncertainty of this order';

/** Share of smoothed values above 150 % of the limit, given or counted; null when neither is known. */
function timeAbove150({ timeAbove150Share, smoothed }: MeasuredOrder, limit: number | null): number | null {
  if (timeAbove150Share !== undefined) return timeAbove150Share;
  if (limit === null || smoothed === undefined || smoothed.length === 0) return null;
  return smoothed.filter((value) => !within(value, 1.5 * limit)).length / smoothed.length;
}

/**
 * The orders that the set limits, in rising order, beside the measured values. `set` is one whose limits are
 * chosen (`resolveLimits`); `commonGap` says why nothing of the channel can be decided.
 */
export function orderCases(
  set: LimitSet,
  measurement: Measurement,
  parameters: VerdictParameters,
  decision: Decision,
  commonGap: string | null,
): OrderCase[] {
  const context = { fundamentalRms: measurement.fundamentalRms, parameters, unit: measurement.unit };
  const measured = new Map(measurement.harmonics.map((harmonic) => [harmonic.order, harmonic]));
  return set.orders
    .map((entry) => {
      const { order } = entry;
      const beyond = order > measurement.highestMeasurableOrder;
      const harmonic = beyond ? undefined : measured.get(order);
      const ownGap = beyond
        ? `Beyond the highest order that the sample rate allows (${measurement.highestMeasurableOrder})`
        : harmonic === undefined
          ? 'Not analysed: raise the highest order of the analysis'
          : null;
      const limit = amountOf(entry, set, context);
      const mean = harmonic?.mean ?? null;
      const own = withMeasured(decision, mean, harmonic?.uncertainty ?? null);
      const guarded = own.rule === 'simple-acceptance' || own.uncertaintyPercent !== null;
      return {
        order,
        limit,
        mean,
        smoothedMax: harmonic?.smoothedMax ?? null,
        decision: own,
        timeAbove150Share: harmonic ? timeAbove150(harmonic, limit) : null,
        gap: commonGap ?? ownGap ?? (guarded ? null : guardGap),
      };
    })
    .sort((a, b) => a.order - b.order);
}

/** The row of a verdict for one order. */
export function orderVerdict(
  { order, limit, mean, smoothedMax, decision }: OrderCase,
  result: OrderVerdict['result'],
  reason: string | null,
): OrderVerdict {
  const known = limit !== null && mean !== null;
  return {
    order,
    mean,
    smoothedMax,
    uncertainty: mean === null ? null : expandedUncertainty(decision, mean),
    limit,
    margin: known ? limit - mean : null,
    sharePercent: known ? (100 * mean) / limit : null,
    result,
    reason,
  };
}
