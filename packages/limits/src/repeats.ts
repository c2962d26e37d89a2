import type { OrderVerdict, VerdictResult } from '@overtally/contracts';
import { worst } from './decision.js';
import type { Evaluation } from './evaluate.js';

/** One order over several repeats of the same test. */
export interface RepeatedOrder {
  order: number;
  /** Repeats in which the order was measured. */
  count: number;
  /** Mean of the means, in the unit of the channel; null when it was never measured. */
  mean: number | null;
  limit: number | null;
  /** Standard deviation of the means in percent of the limit; null below two repeats or without a limit. */
  repeatabilityPercent: number | null;
  /** Furthest mean from the mean of means, in percent of the limit; null like the repeatability. */
  deviationPercent: number | null;
  result: OrderVerdict['result'];
}

/** A verdict over several repeats. */
export interface CombinedRepeats {
  result: VerdictResult;
  reason: string;
  orders: RepeatedOrder[];
  /** Whether every order repeats within 5 % of its limit; null when that cannot be told. */
  isRepeatable: boolean | null;
}

/**
 * IEC 61000-3-2, 6.3.2.1: repeatability of the means better than 5 % of the applicable limit under the same
 * conditions. From memory and of medium confidence: some texts read it as 5 % of the value.
 */
export const repeatabilityLimitPercent = 5;

function sampleDeviation(values: readonly number[], mean: number): number {
  const sum = values.reduce((total, value) => total + (value - mean) ** 2, 0);
  return Math.sqrt(sum / (values.length - 1));
}

function combineOrder(order: number, rows: readonly OrderVerdict[]): RepeatedOrder {
  const means = rows.flatMap(({ mean }) => (mean === null ? [] : [mean]));
  const limits = rows.flatMap(({ limit }) => (limit === null ? [] : [limit]));
  const mean = means.length === 0 ? null : means.reduce((sum, value) => sum + value, 0) / means.length;
  // Limits that follow the fundamental or the power differ between repeats; the strictest is taken.
  const limit = limits.length === 0 ? null : Math.min(...limits);
  const comparable = mean !== null && limit !== null && means.length > 1;
  const percent = (value: number): number => (100 * value) / (limit ?? NaN);
  return {
    order,
    count: means.length,
    mean,
    limit,
    repeatabilityPercent: comparable ? percent(sampleDeviation(means, mean)) : null,
    deviationPercent: comparable ? percent(Math.max(...means.map((value) => Math.abs(value - mean)))) : null,
    result: rows.every(({ result }) => result === 'disregarded')
      ? 'disregarded'
      : worst(rows.map(({ result }) => result)),
  };
}

/** Result of all repeats: the worst; not applicable only when none of them is. */
function combinedResult(evaluations: readonly Evaluation[]): VerdictResult {
  if (evaluations.every(({ result }) => result === 'not-applicable')) return 'not-applicable';
  if (evaluations.some(({ result }) => result === 'not-applicable')) return 'not-decidable';
  return worst(evaluations.map(({ result }) => result));
}

function words(
  evaluations: readonly Evaluation[],
  result: VerdictResult,
  isRepeatable: boolean | null,
): string {
  const decisive = evaluations.findIndex((each) => each.result === result);
  const mixed = 'The set applies to some of the repeats only';
  const why = decisive === -1 ? mixed : `Repeat ${decisive + 1}: ${evaluations[decisive]?.reason ?? ''}`;
  const spread =
    isRepeatable === null
      ? 'Repeatability is not known'
      : isRepeatable
        ? `Every order repeats within ${repeatabilityLimitPercent} % of its limit`
        : `Some orders repeat worse than ${repeatabilityLimitPercent} % of their limit`;
  return `Worst of ${evaluations.length} repeats. ${why}. ${spread}`;
}

/**
 * Combines verdicts on repeats of one test by the same set: per order the mean of the means, their standard
 * deviation in percent of the limit and the worst result; over all the worst result.
 * @throws RangeError without any repeat
 */
export function combineRepeats(evaluations: readonly Evaluation[]): CombinedRepeats {
  if (evaluations.length === 0) throw new RangeError('Combining repeats needs at least one verdict');
  const numbers = new Set(evaluations.flatMap(({ orders }) => orders.map(({ order }) => order)));
  const orders = [...numbers]
    .sort((one, other) => one - other)
    .map((order) => combineOrder(order, rowsOf(evaluations, order)));
  const deviations = orders
    .filter(({ result }) => result !== 'disregarded')
    .map(({ deviationPercent }) => deviationPercent);
  const known = deviations.filter((value) => value !== null);
  const over = known.some((value) => value >= repeatabilityLimitPercent);
  const isComplete = evaluations.length > 1 && known.length === deviations.length;
  const isRepeatable = over ? false : isComplete ? true : null;
  const result = combinedResult(evaluations);
  return { result, reason: words(evaluations, result, isRepeatable), orders, isRepeatable };
}

const rowsOf = (evaluations: readonly Evaluation[], order: number): OrderVerdict[] =>
  evaluations.flatMap(({ orders }) => orders.filter((row) => row.order === order));
