import type { LimitSet, TotalLimit, TotalVerdict, VerdictParameters } from '@overtally/contracts';
import { comparisonReason } from './comparison-reason.js';
import { classify, withMeasured, type Decision } from './decision.js';
import { limitScale } from './limit-for-order.js';
import type { Measurement } from './measurement.js';

interface Sum {
  value: number;
  /** False when an order of the sum was not measured, so that the value is a lower bound. */
  complete: boolean;
  /** Expanded uncertainty of the value; null when an order that counts has none. */
  expanded: number | null;
}

/**
 * Root of the weighted sum of squares of the orders' means.
 *
 * Its expanded uncertainty takes the orders as fully correlated, since they share one measuring chain
 * (JCGM 100:2008, 5.2.2, note 1): the sum of |c_i| U_i with c_i = w_i x_i / value. This is an upper bound.
 */
export function rootSumOfSquares(
  measurement: Measurement,
  orders: readonly number[],
  weight: (order: number) => number = () => 1,
): Sum {
  const measured = new Map(measurement.harmonics.map((harmonic) => [harmonic.order, harmonic]));
  let sum = 0;
  let weighted: number | null = 0;
  let complete = true;
  for (const order of orders) {
    const harmonic = order > measurement.highestMeasurableOrder ? undefined : measured.get(order);
    if (harmonic === undefined) {
      complete = false;
      continue;
    }
    const { mean, uncertainty = null } = harmonic;
    sum += weight(order) * mean * mean;
    weighted =
      weighted === null || uncertainty === null ? null : weighted + weight(order) * mean * uncertainty;
  }
  const value = Math.sqrt(sum);
  return { value, complete, expanded: weighted === null || value === 0 ? weighted : weighted / value };
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

/** The set as the total reads it: THD refers to the fundamental, TDD to IL, unless the total says otherwise. */
function readByTotal({ name, basis }: TotalLimit, set: LimitSet): LimitSet {
  if (basis !== undefined) return { ...set, basis };
  if (name === 'THD') return { ...set, basis: 'percent-of-fundamental' };
  if (name === 'TDD') return { ...set, basis: 'percent-of-reference', referenceParameter: 'ilA' };
  return set;
}

function unitOfTotal({ basis, unit }: LimitSet): string {
  if (basis === 'absolute') return unit;
  return basis === 'milliampere-per-watt' ? 'mA/W' : '%';
}

/** The measurement without the orders below an amount. */
const above = (measurement: Measurement, floor: number): Measurement => ({
  ...measurement,
  harmonics: measurement.harmonics.map((harmonic) =>
    harmonic.mean < floor ? { ...harmonic, mean: 0, uncertainty: 0 } : harmonic,
  ),
});

/**
 * Verdict on one total of the set; `commonGap` says why nothing of the channel can be decided. Orders below `floor`
 * count in the value; where they alone put it over the limit, whether they count is left open.
 */
export function judgeTotal(
  total: TotalLimit,
  set: LimitSet,
  measurement: Measurement,
  parameters: VerdictParameters,
  decision: Decision,
  commonGap: string | null,
  floor = 0,
): TotalVerdict {
  const read = readByTotal(total, set);
  const context = { fundamentalRms: measurement.fundamentalRms, parameters, unit: measurement.unit };
  const scale = limitScale(read, context);
  const sum = sumOfTotal(total, measurement);
  const value = scale === null || scale === 0 ? null : sum.value / scale;
  const row = { name: total.name, unit: unitOfTotal(read), limit: total.limit };
  if (commonGap !== null || value === null || scale === null) {
    return { ...row, value: null, sharePercent: null, result: 'not-decidable', reason: commonGap };
  }
  const expanded = sum.expanded === null ? null : sum.expanded / scale;
  const result = classify(value, total.limit, withMeasured(decision, value, expanded));
  if (!sum.complete && result !== 'fail') {
    const reason = `Some orders up to ${total.maxOrder} were not measured`;
    return { ...row, value: null, sharePercent: null, result: 'not-decidable', reason };
  }
  const share = { ...row, value, sharePercent: (100 * value) / total.limit };
  const withoutSmall = floor === 0 ? value : sumOfTotal(total, above(measurement, floor)).value / scale;
  if (result === 'fail' && classify(withoutSmall, total.limit, decision) === 'pass') {
    const reason = `${total.name} is above the limit only with the currents below 1 % of Iref; check whether they count`;
    return { ...share, result: 'not-decidable', reason };
  }
  return {
    ...share,
    result,
    reason: comparisonReason(total.name, value, total.limit, result),
  };
}
