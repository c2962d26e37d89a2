import { AnalysisInputError } from '../errors.js';

export interface GoalSeekOptions {
  from: number;
  to: number;
  /** Spacing of the grid, default linear; logarithmic for a range over decades, which must lie above 0. */
  scale?: 'linear' | 'logarithmic';
  /** Intervals of the grid, default 200. */
  intervals?: number;
  /** Width, as a share of the value, to which the answer is narrowed down, default 1e-9. */
  precision?: number;
}

export type GoalSeekResult =
  | {
      isFound: true;
      /** The condition holds there. */
      value: number;
      margin: number;
      /** Largest value found at which the condition does not hold just below; null when it holds from the start. */
      failsAt: number | null;
      evaluations: number;
      /** Width of the interval of the grid in which the answer lies: a shorter stretch that meets could be missed below. */
      gridStep: number;
    }
  | {
      isFound: false;
      /** Where the margin is largest on the grid, and how large; null when it has no value anywhere. */
      best: { value: number; margin: number } | null;
      evaluations: number;
      gridStep: number;
    };

const INTERVALS = 200;
const MAX_INTERVALS = 100_000;
const PRECISION = 1e-9;
const MAX_HALVINGS = 200;

/**
 * Smallest value in a range for which a condition holds. The margin is evaluated on a grid from the low end, so the search
 * does not rely on a margin that rises all along; the first interval in which it turns from not met to met is narrowed down
 * by bisection. A stretch of values that meet the condition and is shorter than a step of the grid can be missed: the result
 * states the step.
 *
 * @param margin 0 or more where the condition holds; NaN where it has no value (counts as not met). For a plain predicate
 *   give 1 and −1.
 * @throws AnalysisInputError for a range that is empty, not finite or, on a logarithmic scale, not above 0
 */
export function smallestMeeting(
  margin: (value: number) => number,
  { from, to, scale = 'linear', intervals = INTERVALS, precision = PRECISION }: GoalSeekOptions,
): GoalSeekResult {
  if (!(Number.isFinite(from) && Number.isFinite(to) && from < to)) {
    throw new AnalysisInputError(
      `The range from ${from} to ${to} is empty; its start must lie below its end.`,
    );
  }
  if (scale === 'logarithmic' && !(from > 0)) {
    throw new AnalysisInputError(`The range starts at ${from}; on a logarithmic scale it must lie above 0.`);
  }
  if (!(Number.isInteger(intervals) && intervals >= 1 && intervals <= MAX_INTERVALS)) {
    throw new AnalysisInputError(`The grid has ${intervals} intervals; it must have 1 to ${MAX_INTERVALS}.`);
  }
  const at = (i: number) => {
    if (i === intervals) return to;
    return scale === 'linear' ? from + ((to - from) * i) / intervals : from * (to / from) ** (i / intervals);
  };
  let best: { value: number; margin: number } | null = null;
  for (let i = 0; i <= intervals; i++) {
    const value = at(i);
    const reached = margin(value);
    if (reached >= 0) {
      const below = i === 0 ? null : at(i - 1);
      const gridStep = i === 0 ? at(1) - from : value - below!;
      if (below === null) {
        return { isFound: true, value, margin: reached, failsAt: null, evaluations: 1, gridStep };
      }
      return { ...narrowed(margin, below, value, reached, precision, i + 1), gridStep };
    }
    if (!Number.isNaN(reached) && (best === null || reached > best.margin)) best = { value, margin: reached };
  }
  return { isFound: false, best, evaluations: intervals + 1, gridStep: to - at(intervals - 1) };
}

function narrowed(
  margin: (value: number) => number,
  below: number,
  above: number,
  marginAbove: number,
  precision: number,
  evaluations: number,
) {
  let found = { value: above, margin: marginAbove };
  let failsAt = below;
  for (let i = 0; i < MAX_HALVINGS; i++) {
    const middle = failsAt + (found.value - failsAt) / 2;
    const isNarrow = found.value - failsAt <= precision * Math.abs(found.value);
    if (isNarrow || middle <= failsAt || middle >= found.value) break;
    const reached = margin(middle);
    evaluations++;
    if (reached >= 0) found = { value: middle, margin: reached };
    else failsAt = middle;
  }
  return { isFound: true as const, ...found, failsAt, evaluations };
}
