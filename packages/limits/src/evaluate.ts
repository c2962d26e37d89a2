import type {
  DecisionRule,
  LimitSet,
  OrderVerdict,
  TotalVerdict,
  VerdictParameters,
  VerdictResult,
} from '@overtally/contracts';
import { better, decisionOf, describeDecision, type Decision } from './decision.js';
import { judgeLimits, type JudgedLimits, type Judging } from './judge-limits.js';
import type { Measurement } from './measurement.js';
import { resolveLimits, shownLimits, type Resolution, type ResolvedLimits } from './resolve.js';
import { mismatch, referredToChannel, scopeCaution } from './scope.js';

/** A limit set applied to one channel. */
export interface Evaluation {
  result: VerdictResult;
  reason: string;
  /** The decision rule in words. */
  decisionRuleText: string;
  orders: OrderVerdict[];
  totals: TotalVerdict[];
}

const hasUncertainty = ({ harmonics }: Measurement): boolean =>
  harmonics.some(({ uncertainty }) => uncertainty !== undefined && uncertainty !== null);

/** Why no order can be decided: something that all of them need is missing. */
function commonGap(measurement: Measurement, resolution: Resolution, decision: Decision): string | null {
  if (measurement.fundamentalRms === null || measurement.fundamentalRms === 0) {
    return 'No fundamental was found in the channel';
  }
  if (resolution.gap !== null) return resolution.gap.reason;
  const isStated = decision.uncertaintyPercent !== null || hasUncertainty(measurement);
  if (decision.rule !== 'simple-acceptance' && !isStated) {
    return 'The decision rule needs expandedUncertaintyPercent';
  }
  return null;
}

/** The alternative that judges best, the first of equals; all of them are said in the reason. */
function bestOf(
  judged: readonly JudgedLimits[],
): Pick<JudgedLimits, 'result' | 'reason' | 'orders' | 'totals'> {
  const [first, ...rest] = judged as [JudgedLimits, ...JudgedLimits[]];
  if (rest.length === 0) {
    const row = first.label === null ? '' : `. Limits of ${first.label}`;
    return { ...first, reason: `${first.reason}${row}` };
  }
  const best = rest.reduce(
    (held, next) =>
      next.result !== held.result && better(held.result, next.result) === next.result ? next : held,
    first,
  );
  const others = judged
    .filter((each) => each !== best)
    .map(({ label, reason }) => `${label ?? ''}: ${reason}`);
  const isMet = best.result === 'pass' || best.result === 'conditional-pass';
  const used = isMet ? 'One alternative is enough' : 'No alternative is shown to be met';
  return {
    ...best,
    reason: [best.reason, `${used}; these are the limits of ${best.label ?? ''}`, ...others].join('. '),
  };
}

const chosenLimits = (
  set: LimitSet,
  parameters: VerdictParameters,
  resolution: Resolution,
): ResolvedLimits[] =>
  resolution.limits ?? [{ set: shownLimits(set, parameters), label: null, waveform: null }];

/**
 * Applies a limit set to one channel by a decision rule.
 *
 * Amounts are in the channel's unit. The whole is as bad as its worst part: fail, conditional-fail,
 * not-decidable, conditional-pass, pass; of alternatives the best counts. A channel of another quantity or
 * nominal voltage, and parameters outside the set's conditions of use, are `not-applicable`; without a
 * fundamental, a needed parameter or the uncertainty that the rule needs, the result is `not-decidable` and the
 * reason names what is missing.
 */
export function evaluate(
  set: LimitSet,
  measurement: Measurement,
  args: { parameters: VerdictParameters; decisionRule: DecisionRule },
): Evaluation {
  const decision = decisionOf(args.decisionRule, args.parameters);
  const decisionRuleText = describeDecision(decision, hasUncertainty(measurement));
  const resolution = resolveLimits(set, args.parameters);
  const chosen = chosenLimits(set, args.parameters, resolution);
  const referred = referredToChannel(set, measurement, args.parameters);
  const misfits = chosen.map((limits) => mismatch(limits.set, measurement));
  const unfit =
    misfits.find((reason) => reason !== null) ??
    (resolution.gap?.result === 'not-applicable' ? resolution.gap.reason : referred.unfit);
  if (unfit !== null) {
    return { result: 'not-applicable', reason: unfit, decisionRuleText, orders: [], totals: [] };
  }
  const gap = commonGap(measurement, resolution, decision);
  const judging: Judging = { measurement, parameters: referred.parameters, decision, gap };
  const { result, reason, orders, totals } = bestOf(chosen.map((limits) => judgeLimits(limits, judging)));
  const cautions = result === 'not-decidable' ? [] : [scopeCaution(set, measurement), set.statistic];
  const said = [reason, ...cautions.filter((caution) => caution !== null && caution !== undefined)];
  return { result, reason: said.join('. '), decisionRuleText, orders, totals };
}
