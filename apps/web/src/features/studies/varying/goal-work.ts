import {
  AnalysisInputError,
  smallestMeeting,
  stageFigures,
  thdF,
  type FourierSeries,
  type GoalSeekResult,
  type StageSpec,
  type StageValue,
} from '@overtally/dsp';
import { judgeOrders, largestShare, type Judging } from './judged-figures.js';

export type Goal = { kind: 'verdict'; marginPercent: number } | { kind: 'thd'; maxPercent: number };

/** A search for the smallest value that meets a goal, as plain data for a thread of its own. */
export interface GoalWork extends Judging {
  kind: 'goal';
  /** Stages that are on. */
  specs: StageSpec[];
  place: StageValue;
  from: number;
  to: number;
  intervals: number;
  goal: Goal;
  series: FourierSeries;
  thdMaxOrder: number;
}

export interface GoalOutcome {
  kind: 'goal';
  result: GoalSeekResult;
  scale: 'linear' | 'logarithmic';
  intervals: number;
}

/**
 * The smallest value in a range with which the goal is met, by a grid from its low end and bisection (`smallestMeeting` of
 * packages/dsp); logarithmic where the range lies above 0.
 *
 * @throws AnalysisInputError for a range or grid that cannot be taken, or a verdict without limits
 */
export function seekGoal(work: GoalWork, onProgress: (share: number) => void): GoalOutcome {
  const { specs, place, from, to, intervals, series, goal } = work;
  if (goal.kind === 'verdict' && (work.limitSet === null || work.judgement === null)) {
    throw new AnalysisInputError('Nothing is judged yet; choose limits first.');
  }
  const figures = stageFigures(specs, [place], series);
  const scale = from > 0 ? 'logarithmic' : 'linear';
  const step = Math.max(1, Math.floor(intervals / 100));
  let calls = 0;
  const margin = (value: number) => {
    if (++calls % step === 0) onProgress(Math.min(1, calls / intervals));
    try {
      return goalMargin(figures(Float64Array.of(value)), work);
    } catch (error) {
      // A value that makes no stage, such as 0 for a capacitance, does not meet the goal.
      if (error instanceof AnalysisInputError) return Number.NaN;
      throw error;
    }
  };
  return { kind: 'goal', scale, intervals, result: smallestMeeting(margin, { from, to, scale, intervals }) };
}

/** How far a goal is met, 0 or more where it is; NaN without a steady state or a decidable verdict. */
function goalMargin(rms: ArrayLike<number>, work: GoalWork): number {
  const { goal, series, thdMaxOrder } = work;
  if (Number.isNaN(rms[0])) return Number.NaN;
  if (goal.kind === 'thd') {
    const highest = series.components.reduce((most, { order }) => Math.max(most, order), 1);
    const byOrder = new Float64Array(highest);
    series.components.forEach(({ order }, i) => (byOrder[order - 1] = rms[i]!));
    const thd = thdF(byOrder, thdMaxOrder);
    return thd === null ? Number.NaN : 1 - (100 * thd) / goal.maxPercent;
  }
  const verdict = judgeOrders(series, rms, work);
  if (verdict === null || verdict.result === 'not-decidable' || verdict.result === 'not-applicable')
    return Number.NaN;
  const left = 1 - (largestShare(verdict) ?? 0) / 100 - goal.marginPercent / 100;
  // A verdict that fails by more than its largest share tells is still none that passes.
  return verdict.result === 'pass' ? left : Math.min(left, -Number.EPSILON);
}
