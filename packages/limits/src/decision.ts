import type { DecisionRule, VerdictParameters, VerdictResult } from '@overtally/contracts';

/** Results that a comparison can end in, the worst first. */
const severity = ['fail', 'conditional-fail', 'not-decidable', 'conditional-pass', 'pass'] as const;
export type Judgement = (typeof severity)[number];

/** A value exactly at its limit passes; this covers the rounding of binary arithmetic. */
const roundingTolerance = 1e-9;
/** Whether a value is at most its limit. */
export const within = (value: number, limit: number): boolean => value <= limit * (1 + roundingTolerance);

export interface Decision {
  rule: DecisionRule;
  /** Expanded uncertainty (k = 2) in percent of the value; null when not stated. */
  uncertaintyPercent: number | null;
  /** Expanded uncertainty of this value from the measurement, in its unit; null or absent when there is none. */
  expanded?: number | null;
}

/**
 * Expanded uncertainty of a value, in its unit: that of the measurement or the stated percentage, whichever is
 * greater, so that a stated figure never narrows the guard band. Null when neither is known.
 */
export function expandedUncertainty({ uncertaintyPercent, expanded = null }: Decision, value: number) {
  if (uncertaintyPercent === null) return expanded;
  return Math.max(expanded ?? 0, (uncertaintyPercent / 100) * value);
}

/**
 * The decision for one value whose expanded uncertainty was measured. A larger value of the same order, such as
 * its largest smoothed one, has the same relative uncertainty.
 */
export function withMeasured(decision: Decision, value: number | null, expanded: number | null): Decision {
  if (expanded === null || value === null) return decision;
  const relative = value > 0 ? (100 * expanded) / value : 0;
  const uncertaintyPercent = Math.max(decision.uncertaintyPercent ?? 0, relative);
  return { ...decision, uncertaintyPercent, expanded };
}

/** The decision that a verdict asks for. */
export function decisionOf(rule: DecisionRule, parameters: VerdictParameters): Decision {
  return { rule, uncertaintyPercent: parameters.expandedUncertaintyPercent ?? null };
}

/**
 * Compares a value with an upper limit by a decision rule of ILAC-G8:09/2019.
 *
 * Simple acceptance (4.2.1, w = 0): pass up to and including the limit. Guarded acceptance (4.2.2): pass up to
 * limit - U. Non-binary (4.2.3): pass up to limit - U, conditional pass up to the limit, conditional fail up to
 * limit + U, fail above. U is the expanded uncertainty of the value. The last two rules are not decidable without
 * it.
 */
export function classify(value: number, limit: number, decision: Decision): Judgement {
  if (decision.rule === 'simple-acceptance') return within(value, limit) ? 'pass' : 'fail';
  const expanded = expandedUncertainty(decision, value);
  if (expanded === null) return 'not-decidable';
  if (within(value + expanded, limit)) return 'pass';
  if (decision.rule === 'guarded-acceptance') return 'fail';
  if (within(value, limit)) return 'conditional-pass';
  return within(value - expanded, limit) ? 'conditional-fail' : 'fail';
}

const isJudgement = (result: VerdictResult | 'disregarded'): result is Judgement =>
  (severity as readonly string[]).includes(result);

/** The worst of the results; `disregarded` and `not-applicable` weigh nothing; pass when nothing is left. */
export function worst(results: readonly (VerdictResult | 'disregarded')[]): Judgement {
  const ranks = results.filter(isJudgement).map((result) => severity.indexOf(result));
  return severity[Math.min(severity.length - 1, ...ranks)] ?? 'pass';
}

/** The better of two results: either way of passing is enough. */
export function better(first: Judgement, second: Judgement): Judgement {
  return severity.indexOf(first) > severity.indexOf(second) ? first : second;
}

function statedUncertainty(percent: number | null, isMeasured: boolean): string {
  const subject = 'the expanded uncertainty U (k = 2)';
  if (percent === null) {
    return isMeasured ? `${subject} of each order` : `${subject}, which was not stated`;
  }
  return isMeasured
    ? `${subject} of each order, at least ${percent} % of the value`
    : `${subject} of ${percent} % of the value`;
}

/** The decision rule in words, for the verdict and the report; `isMeasured`: orders carry their own uncertainty. */
export function describeDecision({ rule, uncertaintyPercent }: Decision, isMeasured = false): string {
  const stated = statedUncertainty(uncertaintyPercent, isMeasured);
  switch (rule) {
    case 'simple-acceptance':
      return 'Simple acceptance (ILAC-G8:09/2019, 4.2.1): a value up to and including its limit passes; measurement uncertainty is not taken into account, so the risk of a wrong pass is up to 50 % at the limit.';
    case 'guarded-acceptance':
      return `Guarded acceptance (ILAC-G8:09/2019, 4.2.2): a value passes up to its limit less a guard band w equal to ${stated}; the risk of a wrong pass is at most 2.5 %.`;
    case 'non-binary':
      return `Non-binary statement (ILAC-G8:09/2019, 4.2.3) with a guard band w equal to ${stated}: pass up to limit - U, conditional pass up to the limit, conditional fail up to limit + U, fail above.`;
  }
}
