import type { LimitSet, TotalVerdict, VerdictParameters } from '@overtally/contracts';
import { comparisonReason } from './comparison-reason.js';
import { classify, type Decision } from './decision.js';
import { limitScale } from './limit-for-order.js';
import type { Measurement } from './measurement.js';

type TotalLimit = LimitSet['totals'][number];

interface Sum {
  value: number;
  /** False when an order of the sum was not measured, so that the value is a lower bound. */
  complete: boolean;
}

/** Root of the weighted sum of squares of the orders' means. */
export function rootSumOfSquares(
  measurement: Measurement,
  orders: readonly number[],
  weight: (order: number) => number = () => 1,
): Sum {
  const measured = new Map(measurement.harmonics.map(({ order, mean }) => [order, mean]));
  let sum = 0;
  let complete = true;
  for (const order of orders) {
    const mean = order > measurement.highestMeasurableOrder ? undefined : measured.get(order);
    if (mean === undefined) complete = false;
    else sum += weight(order) * mean * mean;
  }
  return { value: Math.sqrt(sum), complete };
}

const ordersFrom = (first: number, last: number, step = 1): number[] =>
  Array.from({ length: Math.max(0, Math.floor((last - first) / step) + 1) }, (_, i) => first + i * step);

/** Odd orders of the partial odd harmonic current, IEC 61000-3-2, clause 3. */
export const pohcOrders: readonly number[] = ordersFrom(21, 39, 2);

/** THD, TDD and THC: orders 2 up; POHC: odd orders 21 up; PWHC: orders 14 up, weighted by the order (IEC 61000-3-12). */
function sumOfTotal({ name, maxOrder }: TotalLimit, measurement: Measurement): Sum {
  if (name === 'POHC') return rootSumOfSquares(measurement, ordersFrom(21, maxOrder, 2));
  if (name === 'PWHC') return rootSumOfSquares(measurement, ordersFrom(14, maxOrder), (order) => order);
  return rootSumOfSquares(measurement, ordersFrom(2, maxOrder));
}

/** What one unit of the total's limit amounts to in the channel's unit: THD refers to the fundamental, TDD to IL. */
function scaleOfTotal(
  { name }: TotalLimit,
  set: LimitSet,
  measurement: Measurement,
  parameters: VerdictParameters,
) {
  const context = { fundamentalRms: measurement.fundamentalRms, parameters, unit: measurement.unit };
  if (name === 'THD') return limitScale({ ...set, basis: 'percent-of-fundamental' }, context);
  if (name === 'TDD') {
    return limitScale({ ...set, basis: 'percent-of-reference', referenceParameter: 'ilA' }, context);
  }
  return limitScale(set, context);
}

function unitOfTotal({ name }: TotalLimit, set: LimitSet): string {
  return name === 'THD' || name === 'TDD' ? '%' : set.unit;
}

/** Verdict on one total of the set; `commonGap` says why nothing of the channel can be decided. */
export function judgeTotal(
  total: TotalLimit,
  set: LimitSet,
  measurement: Measurement,
  parameters: VerdictParameters,
  decision: Decision,
  commonGap: string | null,
): TotalVerdict {
  const scale = scaleOfTotal(total, set, measurement, parameters);
  const sum = sumOfTotal(total, measurement);
  const value = scale === null || scale === 0 ? null : sum.value / scale;
  const row = { name: total.name, unit: unitOfTotal(total, set), limit: total.limit };
  if (commonGap !== null || value === null) {
    return { ...row, value: null, sharePercent: null, result: 'not-decidable', reason: commonGap };
  }
  const result = classify(value, total.limit, decision);
  if (!sum.complete && result !== 'fail') {
    const reason = `Some orders up to ${total.maxOrder} were not measured`;
    return { ...row, value: null, sharePercent: null, result: 'not-decidable', reason };
  }
  return {
    ...row,
    value,
    sharePercent: (100 * value) / total.limit,
    result,
    reason: comparisonReason(total.name, value, total.limit, result),
  };
}
