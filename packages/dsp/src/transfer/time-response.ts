import { AnalysisInputError } from '../errors.js';
import { turningPoint } from '../search/turning-point.js';
import { inSeries } from './compose.js';
import { chainPoles, uniteRoots } from './chain-poles.js';
import type { StageChain } from './frequency-response.js';
import {
  exponentialTerms,
  lastTimeOutside,
  roundingOf,
  scanTimes,
  sumAt,
  type ExponentialTerm,
} from './exponential-sum.js';
import { partialFractions } from './partial-fractions.js';
import { stability } from './stability.js';
import { dcGain } from './transfer-function.js';

export type TestInput = 'impulse' | 'step' | 'ramp';

/** Answer of stages at rest to an impulse of area 1, a step of height 1 or a ramp of slope 1 at t = 0. */
export interface TimeResponse {
  input: TestInput;
  /** Nothing comes out before. */
  delayS: number;
  /** From the delay on; times in the terms count from there. */
  terms: ExponentialTerm[];
  /**
   * What comes out at the delay itself: areas of δ, δ', … that no curve can show; empty for most stages. A stage whose
   * numerator has the degree of its denominator passes an impulse on, an improper one also differentiates steps.
   */
  impulses: number[];
  /** Value at a time in seconds, without the impulses. */
  at: (timeS: number) => number;
  sample: (timesS: ArrayLike<number>) => Float64Array;
  /** Rounding that the values may hold, in the unit of the output, from terms that nearly cancel. */
  rounding: number;
}

/**
 * Response in time by inverse Laplace transform: H(s), H(s)/s or H(s)/s² in partial fractions, repeated poles included, as
 * a sum of exponentials in closed form, so that any time can be asked for.
 */
export function timeResponse(chain: StageChain, input: TestInput): TimeResponse {
  const { numerator, denominator, delayS = 0 } = inSeries(chain);
  const integrations = { impulse: 0, step: 1, ramp: 2 }[input];
  const origin = integrations > 0 ? [{ re: 0, im: 0, multiplicity: integrations }] : [];
  const { fractions, direct } = partialFractions(
    numerator,
    [...denominator, ...new Array<number>(integrations).fill(0)],
    uniteRoots([...chainPoles(chain), ...origin]),
  );
  const terms = exponentialTerms(fractions);
  const at = (timeS: number) => (timeS < delayS ? 0 : sumAt(terms, timeS - delayS));
  return {
    ...{ input, delayS, terms, at },
    impulses: [...direct].reverse(),
    sample: (timesS) => Float64Array.from(timesS, at),
    rounding: roundingOf(terms),
  };
}

/** Figures of a step response (IEC 60050-351, 351-45). */
export interface StepFigures {
  finalValue: number;
  /** From 10 % to 90 % of the final value, each reached for the first time; null when the final value is 0. */
  riseTimeS: number | null;
  /** How far the answer goes beyond its final value, in percent of it; null when the final value is 0. */
  overshootPercent: number | null;
  peakTimeS: number | null;
  /** After which it stays within the band about the final value, from the step on; null when that is 0. */
  settlingTimeS: number | null;
}

/**
 * Rise, overshoot and settling of the step response of stable stages.
 *
 * @param bandPercent half width of the settling band in percent of the final value, default 2
 * @returns null when a stage is not stable: the answer then has no final value
 * @throws AnalysisInputError for a band that is not between 0 and 100 %
 */
export function stepFigures(chain: StageChain, bandPercent = 2): StepFigures | null {
  if (!(bandPercent > 0 && bandPercent < 100)) {
    throw new AnalysisInputError(`The settling band is ${bandPercent} %; it must lie between 0 and 100 %.`);
  }
  if (stability(chain).verdict !== 'stable') return null;
  const finalValue = dcGain(inSeries(chain))!;
  if (finalValue === 0) {
    return { finalValue, riseTimeS: null, overshootPercent: null, peakTimeS: null, settlingTimeS: null };
  }
  const response = timeResponse(chain, 'step');
  const { delayS, terms } = response;
  const transient = terms.filter(({ pole }) => pole.re !== 0 || pole.im !== 0);
  const settled = lastTimeOutside(transient, (bandPercent / 100) * Math.abs(finalValue));
  // Beyond the time at which 0.1 % is left nothing new is reached.
  const end = lastTimeOutside(transient, 1e-3 * Math.abs(finalValue)) ?? 0;
  const times = scanTimes(transient, end, Math.abs(finalValue)) ?? [];
  const share = (t: number) => sumAt(terms, t) / finalValue;
  const shares = times.map(share);
  const [tenth, ninetieth] = [0.1, 0.9].map((level) => firstReached(share, level, times, shares));
  const top = highest(share, times, shares);
  return {
    finalValue,
    riseTimeS: typeof tenth !== 'number' || typeof ninetieth !== 'number' ? null : ninetieth - tenth,
    overshootPercent: Math.max(0, 100 * (top.value - 1)),
    peakTimeS: top.value > 1 ? delayS + top.timeS : null,
    settlingTimeS: settled === null ? null : delayS + settled,
  };
}

function firstReached(
  share: (t: number) => number,
  level: number,
  times: readonly number[],
  shares: readonly number[],
): number | null {
  const at = shares.findIndex((x) => x >= level);
  if (at < 0) return null;
  return turningPoint((t) => share(t) >= level, times[at]!, times[Math.max(0, at - 1)]!);
}

/** The largest of the scanned points, made finer by halving steps about it. */
function highest(
  share: (t: number) => number,
  times: readonly number[],
  shares: readonly number[],
): { timeS: number; value: number } {
  const at = shares.reduce((best, x, i) => (x > shares[best]! ? i : best), 0);
  let best = { timeS: times[at] ?? 0, value: shares[at] ?? 0 };
  let step = (times[at + 1] ?? best.timeS) - best.timeS;
  for (let i = 0; i < 40; i++) {
    step /= 2;
    for (const timeS of [Math.max(0, best.timeS - step), best.timeS + step]) {
      const value = share(timeS);
      if (value > best.value) best = { timeS, value };
    }
  }
  return best;
}
