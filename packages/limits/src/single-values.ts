import { classify, worst, type Judgement } from './decision.js';
import { isDecidable, type DecidableCase, type OrderCase } from './order-cases.js';

const singleValueFactor = 1.5;
const shortExcursionFactor = 2;
const shortExcursionMeanShare = 0.9;
const shortExcursionTimeShare = 0.1;
const shortExcursionS = 600;

export interface Outcome {
  result: Judgement;
  reason: string | null;
}

/** What the rule on single values may make use of. */
export interface SingleValueRule {
  /** Class A of IEC 61000-3-2 alone allows single values up to 200 % for a short time. */
  allowsShortExcursion: boolean;
  /** Length of the observation in s; null when not known. */
  observationS: number | null;
}

/** Largest smoothed value of an order against 150 % of its limit. */
export const within150 = ({ smoothedMax, limit, decision }: DecidableCase): Judgement =>
  smoothedMax === null ? 'not-decidable' : classify(smoothedMax, singleValueFactor * limit, decision);

const percent = (share: number): string => `${(100 * share).toFixed(share < 0.01 ? 1 : 0)} %`;

/**
 * Whether the time above 150 % is short: under 10 % of the observation and under 10 min in all, whichever is
 * smaller (IEC 61000-3-2, 6.2.3). Null when it cannot be told.
 */
function isShort(share: number | null, observationS: number | null): boolean | null {
  if (share === null) return null;
  if (share >= shortExcursionTimeShare) return false;
  // Below 6000 s a tenth of the observation is the smaller of the two.
  return observationS === null ? null : share * observationS < shortExcursionS;
}

/** Single values up to 200 % of class A, once one is above 150 %; null when another condition of the rule is missed. */
function judgeExcursion(
  orderCase: DecidableCase,
  observationS: number | null,
  share: string,
): Outcome | null {
  const { mean, limit, smoothedMax, timeAbove150Share, decision } = orderCase;
  if (mean >= shortExcursionMeanShare * limit) return null;
  const upper = smoothedMax === null ? 'fail' : classify(smoothedMax, shortExcursionFactor * limit, decision);
  if (upper === 'fail') return null;
  const short = isShort(timeAbove150Share, observationS);
  if (short === null) {
    const open = 'up to 200 % for a short time that is not known here';
    return { result: 'not-decidable', reason: `${share}, ${open}` };
  }
  const time = `${percent(timeAbove150Share ?? 0)} of the time above 150 %`;
  if (!short) return { result: 'fail', reason: `${share}, and ${time} is too long for the 200 % rule` };
  return { result: upper, reason: `${share}; allowed by the 200 % rule: ${time}, mean below 90 %` };
}

/**
 * Rule on single values: every 1.5 s smoothed value within 150 % of the limit (IEC 61000-3-2, 6.2.3;
 * IEC 61000-3-12, clause 5). In class A a value up to 200 % is allowed when the mean is below 90 % of the limit
 * and the time above 150 % is short; not decidable when that time is not known.
 */
export function judgeSingleValues(orderCase: DecidableCase, rule: SingleValueRule): Outcome {
  const { smoothedMax, limit } = orderCase;
  if (smoothedMax === null) {
    return {
      result: 'not-decidable',
      reason: 'No 1.5 s smoothed values: analyse at least ten cycles with the mains profile',
    };
  }
  const result = within150(orderCase);
  if (result === 'pass') return { result, reason: null };
  const share = `A single smoothed value is at ${((100 * smoothedMax) / limit).toFixed(0)} % of the limit, 150 % is allowed`;
  const over = result === 'fail' || result === 'conditional-fail';
  const excursion =
    rule.allowsShortExcursion && over ? judgeExcursion(orderCase, rule.observationS, share) : null;
  return excursion ?? { result, reason: share };
}

/** Whether every smoothed value of every order is within 150 % of its limit; small currents do not count. */
export function allWithin150(
  cases: readonly OrderCase[],
  isDisregarded: (orderCase: DecidableCase) => boolean,
): Judgement {
  return worst(
    cases.map((orderCase) => {
      if (!isDecidable(orderCase)) return 'not-decidable';
      return isDisregarded(orderCase) ? 'pass' : within150(orderCase);
    }),
  );
}
