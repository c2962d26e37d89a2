import type {
  DecisionRule,
  LimitSet,
  OrderVerdict,
  Quantity,
  TotalVerdict,
  VerdictParameters,
  VerdictResult,
} from '@overtally/contracts';
import { comparisonReason } from './comparison-reason.js';
import { classify, decisionOf, describeDecision, worst, type Decision } from './decision.js';
import { judgeByIec61000_3_2 } from './iec61000-3-2.js';
import { limitUnit } from './limit-for-order.js';
import type { Measurement } from './measurement.js';
import { isDecidable, orderCases, orderVerdict, type OrderCase } from './order-cases.js';
import { overallReason } from './overall-reason.js';
import { judgeTotal } from './totals.js';
import { unitRatio } from './units.js';

/** A limit set applied to one channel. */
export interface Evaluation {
  result: VerdictResult;
  reason: string;
  /** The decision rule in words. */
  decisionRuleText: string;
  orders: OrderVerdict[];
  totals: TotalVerdict[];
}

/** Only class A allows single values up to 200 % (IEC 61000-3-2, 6.2.3). */
const setsWithShortExcursion: readonly string[] = ['iec61000-3-2.classA'];

const quantityNames: Readonly<Record<Quantity, string>> = {
  voltage: 'voltage',
  current: 'current',
  power: 'power',
  sound_pressure: 'sound pressure',
  acceleration: 'acceleration',
  velocity: 'velocity',
  dimensionless: 'a quantity without dimension',
  other: 'another quantity',
};

/** Sets of voltages that are judged by 95 % of the 10 min means of one week (as their notes say). */
const setsOfWeeks: readonly string[] = ['en50160.lv', 'iec61000-2-2.lv'];
const weekCondition =
  'The standard takes 10 min values of one week; a short record is compared with its values, which states no conformity';

/** Why the set cannot be applied to the channel at all; null when it can. */
function mismatch(set: LimitSet, measurement: Measurement): string | null {
  if (set.quantity !== measurement.quantity) {
    return `The set limits ${quantityNames[set.quantity]}; the channel holds ${quantityNames[measurement.quantity]}`;
  }
  const unit = limitUnit(set);
  if (unit !== null && unitRatio(unit, measurement.unit) === null) {
    const given = measurement.unit === '' ? 'has no unit' : `is in ${measurement.unit}`;
    return `The limits are in ${unit}; the channel ${given}: set the unit of the channel`;
  }
  return null;
}

/** Why no order can be decided: something that all of them need is missing. */
function commonGap(
  set: LimitSet,
  measurement: Measurement,
  parameters: VerdictParameters,
  decision: Decision,
): string | null {
  if (measurement.fundamentalRms === null || measurement.fundamentalRms === 0) {
    return 'No fundamental was found in the channel';
  }
  const needed = set.referenceParameter ? [...set.parameters, set.referenceParameter] : set.parameters;
  const missing = [...new Set(needed)].filter((name) => parameters[name] === undefined);
  if (missing.length > 0) return `The set needs ${missing.join(', ')}`;
  if (decision.rule !== 'simple-acceptance' && decision.uncertaintyPercent === null) {
    return 'The decision rule needs expandedUncertaintyPercent';
  }
  return null;
}

function judgePlainly(orderCase: OrderCase, decision: Decision): OrderVerdict {
  if (!isDecidable(orderCase)) return orderVerdict(orderCase, decision, 'not-decidable', orderCase.gap);
  const { mean, limit } = orderCase;
  const result = classify(mean, limit, decision);
  return orderVerdict(orderCase, decision, result, comparisonReason('Mean', mean, limit, result));
}

/**
 * Applies a limit set to one channel by a decision rule.
 *
 * Amounts are in the channel's unit. The whole is as bad as its worst part: fail, conditional-fail,
 * not-decidable, conditional-pass, pass. A channel of another quantity is `not-applicable`; without a
 * fundamental, a needed parameter or the uncertainty that the rule needs, the result is `not-decidable` and the
 * reason names what is missing.
 */
export function evaluate(
  set: LimitSet,
  measurement: Measurement,
  args: { parameters: VerdictParameters; decisionRule: DecisionRule },
): Evaluation {
  const decision = decisionOf(args.decisionRule, args.parameters);
  const decisionRuleText = describeDecision(decision);
  const unfit = mismatch(set, measurement);
  if (unfit !== null) {
    return { result: 'not-applicable', reason: unfit, decisionRuleText, orders: [], totals: [] };
  }
  const gap = commonGap(set, measurement, args.parameters, decision);
  const cases = orderCases(set, measurement, args.parameters, gap);
  const judged =
    set.procedure === 'iec61000-3-2'
      ? judgeByIec61000_3_2(cases, measurement, decision, setsWithShortExcursion.includes(set.id))
      : { orders: cases.map((orderCase) => judgePlainly(orderCase, decision)), totals: [] };
  const totals = set.totals.map((total) =>
    judgeTotal(total, set, measurement, args.parameters, decision, gap),
  );
  const result = worst([...judged.orders, ...totals].map((row) => row.result));
  const reason = overallReason(result, judged.orders, totals);
  const isConditional = setsOfWeeks.includes(set.id) && result !== 'not-decidable';
  return {
    result,
    reason: isConditional ? `${reason}. ${weekCondition}` : reason,
    decisionRuleText,
    orders: judged.orders,
    totals: [...judged.totals, ...totals],
  };
}
