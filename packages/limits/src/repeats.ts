import type { OrderVerdict, RepeatOrder, TotalVerdict, VerdictResult } from '@overtally/contracts';
import { worst } from './decision.js';
import type { Evaluation } from './evaluate.js';

/** A verdict over several repeats. */
export interface CombinedRepeats {
  result: VerdictResult;
  reason: string;
  /** Per order the mean of the means, the largest smoothed value, the strictest limit and the worst result. */
  orders: OrderVerdict[];
  /** Per total the repeat that it is worst in. */
  totals: TotalVerdict[];
  repeatability: {
    /** Whether every order repeats within 5 % of its limit; null when that cannot be told. */
    isRepeatable: boolean | null;
    orders: RepeatOrder[];
  };
}

/**
 * IEC 61000-3-2, 6.3.2.1: repeatability of the means better than 5 % of the applicable limit under the same
 * conditions. From memory and of medium confidence: some texts read it as 5 % of the value.
 */
export const repeatabilityLimitPercent = 5;

type Row = Pick<OrderVerdict | TotalVerdict, 'result' | 'reason'>;

/** What repeat n (from 1) says of one order or total. */
interface InRepeat<Each extends Row> {
  repeat: number;
  row: Each;
}

function sampleDeviation(values: readonly number[], mean: number): number {
  const sum = values.reduce((total, value) => total + (value - mean) ** 2, 0);
  return Math.sqrt(sum / (values.length - 1));
}

/** The worst of the repeats, the first of equals, with the reason it gives; one that counts goes before others. */
function worstOf<Each extends Row>(found: readonly InRepeat<Each>[]): Each {
  const [first] = found as [InRepeat<Each>];
  const result = worst(found.map(({ row }) => row.result));
  const decisive = found.find(({ row }) => row.result === result) ?? first;
  const { reason } = decisive.row;
  return { ...decisive.row, reason: reason === null ? null : `Repeat ${decisive.repeat}: ${reason}` };
}

const known = (values: readonly (number | null)[]): number[] => values.filter((value) => value !== null);
const largest = (values: readonly (number | null)[]): number | null =>
  known(values).length === 0 ? null : Math.max(...known(values));

function combineOrder(found: readonly InRepeat<OrderVerdict>[]): { row: OrderVerdict; spread: RepeatOrder } {
  const rows = found.map(({ row }) => row);
  const { order, result, reason } = worstOf(found);
  const means = known(rows.map(({ mean }) => mean));
  const limits = known(rows.map(({ limit }) => limit));
  const mean = means.length === 0 ? null : means.reduce((sum, value) => sum + value, 0) / means.length;
  // Limits that follow the fundamental or the power differ between repeats; the strictest is taken.
  const limit = limits.length === 0 ? null : Math.min(...limits);
  const percent = (value: number): number => (100 * value) / (limit ?? NaN);
  const comparable = mean !== null && limit !== null && means.length > 1;
  return {
    row: {
      order,
      mean,
      smoothedMax: largest(rows.map(({ smoothedMax }) => smoothedMax)),
      uncertainty: largest(rows.map(({ uncertainty }) => uncertainty)),
      limit,
      margin: mean === null || limit === null ? null : limit - mean,
      sharePercent: mean === null || limit === null ? null : percent(mean),
      result,
      reason,
    },
    spread: {
      order,
      count: means.length,
      repeatabilityPercent: comparable ? percent(sampleDeviation(means, mean)) : null,
      deviationPercent: comparable
        ? percent(Math.max(...means.map((value) => Math.abs(value - mean))))
        : null,
    },
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

/** What each repeat says under one key, the keys as they come. */
function byKey<Each extends Row>(
  evaluations: readonly Evaluation[],
  rowsOf: (evaluation: Evaluation) => readonly Each[],
  keyOf: (row: Each) => string | number,
): InRepeat<Each>[][] {
  const found = new Map<string | number, InRepeat<Each>[]>();
  evaluations.forEach((evaluation, index) => {
    for (const row of rowsOf(evaluation)) {
      found.set(keyOf(row), [...(found.get(keyOf(row)) ?? []), { repeat: index + 1, row }]);
    }
  });
  return [...found.values()];
}

/**
 * Combines verdicts on repeats of one test by the same set: per order the mean of the means, their standard
 * deviation in percent of the limit and the worst result; over all the worst result.
 * @throws RangeError without any repeat
 */
export function combineRepeats(evaluations: readonly Evaluation[]): CombinedRepeats {
  if (evaluations.length === 0) throw new RangeError('Combining repeats needs at least one verdict');
  const orders = byKey(
    evaluations,
    (each) => each.orders,
    ({ order }) => order,
  )
    .map(combineOrder)
    .sort((one, other) => one.row.order - other.row.order);
  const totals = byKey(
    evaluations,
    (each) => each.totals,
    ({ name }) => name,
  ).map(worstOf);
  const deviations = orders
    .filter(({ row }) => row.result !== 'disregarded')
    .map(({ spread }) => spread.deviationPercent);
  const over = known(deviations).some((value) => value >= repeatabilityLimitPercent);
  const isComplete = evaluations.length > 1 && !deviations.includes(null);
  const isRepeatable = over ? false : isComplete && deviations.length > 0 ? true : null;
  const result = combinedResult(evaluations);
  return {
    result,
    reason: words(evaluations, result, isRepeatable),
    orders: orders.map(({ row }) => row),
    totals,
    repeatability: { isRepeatable, orders: orders.map(({ spread }) => spread) },
  };
}
