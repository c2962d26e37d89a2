import type { OrderVerdict, TotalVerdict } from '@overtally/contracts';
import { comparisonReason } from './comparison-reason.js';
import { better, classify, worst, type Decision, type Judgement } from './decision.js';
import type { Measurement } from './measurement.js';
import { isDecidable, orderVerdict, type DecidableCase, type OrderCase } from './order-cases.js';
import { pohcOrders, rootSumOfSquares } from './totals.js';
import { unitRatio } from './units.js';

const singleValueFactor = 1.5;
const shortExcursionFactor = 2;
const shortExcursionMeanShare = 0.9;
const floorA = 0.005;
const floorShare = 0.006;

interface Procedure {
  decision: Decision;
  measurement: Measurement;
  /** Class A alone allows single values up to 200 % for a short share of the time. */
  allowsShortExcursion: boolean;
  /** Currents below this are disregarded, in the channel's unit. */
  floor: number;
}

interface Outcome {
  result: Judgement;
  reason: string | null;
}

/** Floor of IEC 61000-3-2: 0.6 % of the input current or 5 mA, whichever is greater, in the channel's unit. */
export function disregardFloor(measurement: Measurement): number {
  return Math.max(floorA * (unitRatio('A', measurement.unit) ?? 1), floorShare * (measurement.rms ?? 0));
}

const isDisregarded = (orderCase: DecidableCase, floor: number): boolean =>
  Math.max(orderCase.mean, orderCase.smoothedMax ?? 0) < floor;

/**
 * Rule on single values: every 1.5 s smoothed value within 150 % of the limit. In class A a value up to 200 %
 * is allowed when the mean is below 90 % and the time above 150 % is short; that time is not recorded, so the
 * order is then not decidable. It fails as soon as one of the other conditions is missed.
 */
function judgeSingleValues({ mean, limit, smoothedMax }: DecidableCase, procedure: Procedure): Outcome {
  if (smoothedMax === null) {
    return {
      result: 'not-decidable',
      reason: 'No 1.5 s smoothed values: analyse at least ten cycles with the mains profile',
    };
  }
  const result = classify(smoothedMax, singleValueFactor * limit, procedure.decision);
  if (result === 'pass') return { result, reason: null };
  const share = `A single smoothed value is at ${((100 * smoothedMax) / limit).toFixed(0)} % of the limit, 150 % is allowed`;
  const excursionOpen =
    procedure.allowsShortExcursion &&
    (result === 'fail' || result === 'conditional-fail') &&
    mean < shortExcursionMeanShare * limit &&
    classify(smoothedMax, shortExcursionFactor * limit, procedure.decision) !== 'fail';
  return excursionOpen
    ? { result: 'not-decidable', reason: `${share}, up to 200 % for a short time that is not known here` }
    : { result, reason: share };
}

/** POHC of the means against the POHC of the limits. */
function judgePohc(cases: readonly OrderCase[], { measurement, decision }: Procedure): TotalVerdict | null {
  const limits = cases.filter(({ order }) => pohcOrders.includes(order)).map(({ limit }) => limit);
  if (limits.length === 0) return null;
  const limit = limits.every((value) => value !== null) ? Math.hypot(...limits) : null;
  const { value, complete } = rootSumOfSquares(measurement, pohcOrders);
  const judged = limit === null ? 'not-decidable' : classify(value, limit, decision);
  const decidable = complete || judged === 'fail';
  return {
    name: 'POHC',
    value: decidable ? value : null,
    unit: measurement.unit,
    limit,
    sharePercent: decidable && limit !== null ? (100 * value) / limit : null,
    result: decidable ? judged : 'not-decidable',
    reason: decidable
      ? comparisonReason('POHC', value, limit ?? 0, judged)
      : 'Some odd orders from 21 to 39 were not measured',
  };
}

/** Whether every smoothed value of every order is within 150 % of its limit. */
function judgeAllSingleValues(cases: readonly OrderCase[], { decision, floor }: Procedure): Judgement {
  return worst(
    cases.map((orderCase) => {
      if (!isDecidable(orderCase)) return 'not-decidable';
      if (isDisregarded(orderCase, floor)) return 'pass';
      if (orderCase.smoothedMax === null) return 'not-decidable';
      return classify(orderCase.smoothedMax, singleValueFactor * orderCase.limit, decision);
    }),
  );
}

/** Mean of an order against its limit; from order 21 up an odd order may use the POHC relief. */
function judgeMean(orderCase: DecidableCase, procedure: Procedure, relief: Judgement | null): Outcome {
  const { order, mean, limit } = orderCase;
  const plain = mean < procedure.floor ? 'pass' : classify(mean, limit, procedure.decision);
  const plainOutcome = { result: plain, reason: comparisonReason('Mean', mean, limit, plain) };
  if (plain === 'pass' || relief === null || !pohcOrders.includes(order)) return plainOutcome;
  const relieved = worst([relief, classify(mean, singleValueFactor * limit, procedure.decision)]);
  const result = better(plain, relieved);
  if (result === plain) return plainOutcome;
  return {
    result,
    reason:
      result === 'pass'
        ? 'Mean above the limit, allowed because POHC is within its limit'
        : 'Mean above the limit; whether the POHC relief allows it is not certain',
  };
}

function asksForRelief(orderCase: OrderCase, { decision, floor }: Procedure): boolean {
  if (!isDecidable(orderCase) || !pohcOrders.includes(orderCase.order) || orderCase.mean < floor)
    return false;
  return classify(orderCase.mean, orderCase.limit, decision) !== 'pass';
}

function judgeOrder(orderCase: OrderCase, procedure: Procedure, relief: Judgement | null): OrderVerdict {
  const { decision, floor } = procedure;
  if (!isDecidable(orderCase)) return orderVerdict(orderCase, decision, 'not-decidable', orderCase.gap);
  if (isDisregarded(orderCase, floor)) {
    const reason = 'Below 0.6 % of the input current or 5 mA, whichever is greater';
    return orderVerdict(orderCase, decision, 'disregarded', reason);
  }
  const mean = judgeMean(orderCase, procedure, relief);
  const single = judgeSingleValues(orderCase, procedure);
  const result = worst([mean.result, single.result]);
  const reasons = [mean, single].filter((outcome) => outcome.result === result || result === 'pass');
  const reason = reasons.flatMap((outcome) => outcome.reason ?? []).join('; ');
  return orderVerdict(orderCase, decision, result, reason === '' ? null : reason);
}

/**
 * Assessment of IEC 61000-3-2, clauses 6.2 and 6.3.
 *
 * Mean of the 1.5 s smoothed values within the limit; single smoothed values within 150 %; means of odd orders
 * from 21 up within 150 % when POHC is within the POHC of the limits and every smoothed value of every order is
 * within 150 %; currents below 0.6 % of the input current or 5 mA, whichever is greater, disregarded. POHC is
 * listed as a total for the reader; it acts on the verdict through the orders that need it.
 */
export function judgeByIec61000_3_2(
  cases: readonly OrderCase[],
  measurement: Measurement,
  decision: Decision,
  allowsShortExcursion: boolean,
): { orders: OrderVerdict[]; totals: TotalVerdict[] } {
  const procedure = { decision, measurement, allowsShortExcursion, floor: disregardFloor(measurement) };
  const pohc = judgePohc(cases, procedure);
  const relief = pohc === null ? null : worst([pohc.result, judgeAllSingleValues(cases, procedure)]);
  const orders = cases.map((orderCase) => judgeOrder(orderCase, procedure, relief));
  if (pohc === null) return { orders, totals: [] };
  const needed = cases.some((orderCase) => asksForRelief(orderCase, procedure));
  const reason = 'Counts only when the mean of an odd order from 21 up is above its limit';
  const counted = needed
    ? pohc
    : { ...pohc, result: 'not-applicable' as const, reason: pohc.reason ?? reason };
  return { orders, totals: [counted] };
}
