import type { OrderVerdict, TotalVerdict } from '@overtally/contracts';
import { comparisonReason } from './comparison-reason.js';
import { better, classify, withMeasured, worst, type Decision, type Judgement } from './decision.js';
import type { Measurement } from './measurement.js';
import { isDecidable, orderVerdict, type DecidableCase, type OrderCase } from './order-cases.js';
import { allWithin150, judgeSingleValues, type Outcome, type SingleValueRule } from './single-values.js';
import { pohcOrders, rootSumOfSquares } from './totals.js';
import { unitRatio } from './units.js';

const reliefFactor = 1.5;
const floorA = 0.005;
const floorShare = 0.006;

interface Procedure extends SingleValueRule {
  decision: Decision;
  measurement: Measurement;
  /** Currents below this are disregarded, in the channel's unit. */
  floor: number;
}

/** Floor of IEC 61000-3-2: 0.6 % of the input current or 5 mA, whichever is greater, in the channel's unit. */
export function disregardFloor(measurement: Measurement): number {
  return Math.max(floorA * (unitRatio('A', measurement.unit) ?? 1), floorShare * (measurement.rms ?? 0));
}

const isDisregarded = (orderCase: DecidableCase, floor: number): boolean =>
  Math.max(orderCase.mean, orderCase.smoothedMax ?? 0) < floor;

/** POHC of the means against the POHC of the limits. */
function judgePohc(cases: readonly OrderCase[], { measurement, decision }: Procedure): TotalVerdict | null {
  const limits = cases.filter(({ order }) => pohcOrders.includes(order)).map(({ limit }) => limit);
  if (limits.length === 0) return null;
  const limit = limits.every((value) => value !== null) ? Math.hypot(...limits) : null;
  const { value, complete, expanded } = rootSumOfSquares(measurement, pohcOrders);
  const judged =
    limit === null ? 'not-decidable' : classify(value, limit, withMeasured(decision, value, expanded));
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

/** Mean of an order against its limit; from order 21 up an odd order may use the POHC relief. */
function judgeMean(orderCase: DecidableCase, procedure: Procedure, relief: Judgement | null): Outcome {
  const { order, mean, limit, decision } = orderCase;
  const plain = mean < procedure.floor ? 'pass' : classify(mean, limit, decision);
  const plainOutcome = { result: plain, reason: comparisonReason('Mean', mean, limit, plain) };
  if (plain === 'pass' || relief === null || !pohcOrders.includes(order)) return plainOutcome;
  const relieved = worst([relief, classify(mean, reliefFactor * limit, decision)]);
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

function asksForRelief(orderCase: OrderCase, { floor }: Procedure): boolean {
  if (!isDecidable(orderCase) || !pohcOrders.includes(orderCase.order) || orderCase.mean < floor)
    return false;
  return classify(orderCase.mean, orderCase.limit, orderCase.decision) !== 'pass';
}

function judgeOrder(orderCase: OrderCase, procedure: Procedure, relief: Judgement | null): OrderVerdict {
  const { floor } = procedure;
  if (!isDecidable(orderCase)) return orderVerdict(orderCase, 'not-decidable', orderCase.gap);
  if (isDisregarded(orderCase, floor)) {
    const reason = 'Below 0.6 % of the input current or 5 mA, whichever is greater';
    return orderVerdict(orderCase, 'disregarded', reason);
  }
  const mean = judgeMean(orderCase, procedure, relief);
  const single = judgeSingleValues(orderCase, procedure);
  const result = worst([mean.result, single.result]);
  const reasons = [mean, single].filter((outcome) => outcome.result === result || result === 'pass');
  const reason = reasons.flatMap((outcome) => outcome.reason ?? []).join('; ');
  return orderVerdict(orderCase, result, reason === '' ? null : reason);
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
  const floor = disregardFloor(measurement);
  const observationS = measurement.observationS ?? null;
  const procedure = { decision, measurement, allowsShortExcursion, observationS, floor };
  const pohc = judgePohc(cases, procedure);
  const relief =
    pohc === null
      ? null
      : worst([pohc.result, allWithin150(cases, (orderCase) => isDisregarded(orderCase, floor))]);
  const orders = cases.map((orderCase) => judgeOrder(orderCase, procedure, relief));
  if (pohc === null) return { orders, totals: [] };
  const needed = cases.some((orderCase) => asksForRelief(orderCase, procedure));
  const reason = 'Counts only when the mean of an odd order from 21 up is above its limit';
  const counted = needed
    ? pohc
    : { ...pohc, result: 'not-applicable' as const, reason: pohc.reason ?? reason };
  return { orders, totals: [counted] };
}
