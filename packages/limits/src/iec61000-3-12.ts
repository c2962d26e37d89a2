import type { OrderVerdict, VerdictParameters } from '@overtally/contracts';
import { comparisonReason } from './comparison-reason.js';
import { classify, worst } from './decision.js';
import type { Measurement } from './measurement.js';
import { isDecidable, orderVerdict, type OrderCase } from './order-cases.js';
import { judgeSingleValues } from './single-values.js';
import { unitRatio } from './units.js';

const floorShare = 0.01;
const floorReason = 'Below 1 % of the reference current';

/** Currents below 1 % of Iref are not counted; in the channel's unit, 0 without Iref. */
export const referenceFloor = (measurement: Measurement, { irefA = 0 }: VerdictParameters): number =>
  floorShare * irefA * (unitRatio('A', measurement.unit) ?? 1);

/**
 * Assessment of IEC 61000-3-12: mean of the 1.5 s smoothed values within the limit, single smoothed values within
 * 150 %, currents below 1 % of the reference current ignored. THC and PWHC are totals of the set.
 */
export function judgeByIec61000_3_12(
  cases: readonly OrderCase[],
  measurement: Measurement,
  parameters: VerdictParameters,
): OrderVerdict[] {
  const floor = referenceFloor(measurement, parameters);
  const rule = { allowsShortExcursion: false, observationS: measurement.observationS ?? null };
  return cases.map((orderCase) => {
    if (!isDecidable(orderCase)) return orderVerdict(orderCase, 'not-decidable', orderCase.gap);
    const { mean, limit, smoothedMax, decision } = orderCase;
    if (Math.max(mean, smoothedMax ?? 0) < floor) return orderVerdict(orderCase, 'disregarded', floorReason);
    const compared = mean < floor ? 'pass' : classify(mean, limit, decision);
    const single = judgeSingleValues(orderCase, rule);
    const result = worst([compared, single.result]);
    const reasons = [
      compared === result ? comparisonReason('Mean', mean, limit, compared) : null,
      single.result === result ? single.reason : null,
    ].filter((reason) => reason !== null);
    return orderVerdict(orderCase, result, reasons.length > 0 ? reasons.join('; ') : null);
  });
}
