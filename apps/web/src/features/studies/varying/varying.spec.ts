import { textbookSeries } from '@overtally/dsp';
import { findPublishedLimitSet } from '@overtally/limits';
import { describe, expect, it } from 'vitest';
import { seekGoal, type GoalWork } from './goal-work.js';
import { spreadOf, type SpreadWork } from './spread-work.js';

const limitSet = findPublishedLimitSet('iec61000-3-2.classA')!;
const series = textbookSeries({ shape: 'six-pulse', amplitude: 10, frequencyHz: 50, maxOrder: 40 });
const judging = {
  limitSet,
  judgement: { limitSetId: limitSet.id, parameters: {}, decisionRule: 'simple-acceptance', of: 'both' },
  output: { quantity: 'current', unit: 'A' },
} as const;
const lowPass = (timeConstantS: number) => ({
  kind: 'circuit' as const,
  circuit: 'first-order-low-pass',
  values: { timeConstantS },
});
const ignore = () => undefined;

const goal = (change: Partial<GoalWork>): GoalWork => ({
  ...judging,
  ...{ kind: 'goal', specs: [lowPass(1e-3)], place: { stage: 0, parameter: 'timeConstantS' } },
  ...{ from: 1e-5, to: 1, intervals: 200, series, thdMaxOrder: 40 },
  goal: { kind: 'verdict', marginPercent: 10 },
  ...change,
});

/** Gain of order h behind 1/(1 + sτ). */
const gain = (order: number, tau: number) => 1 / Math.hypot(1, 2 * Math.PI * 50 * order * tau);
/** rms of order h of the line current of an ideal bridge: 2√3/(πh) of the direct current, over √2. */
const line = (order: number) => (10 * 2 * Math.sqrt(3)) / Math.PI / Math.SQRT2 / order;

describe('the smallest value for a goal', () => {
  it('makes the verdict pass with the margin, and none below does', () => {
    const { result } = seekGoal(goal({}), ignore);
    if (!result.isFound) throw new Error('Nothing was found');
    // Class A limits by IEC 61000-3-2, table 1.
    const limits = new Map([
      ...([
        [5, 1.14],
        [7, 0.77],
        [11, 0.33],
        [13, 0.21],
      ] as const),
      ...[17, 19, 23, 25, 29, 31, 35, 37].map((order) => [order, (0.15 * 15) / order] as const),
    ]);
    const worst = (tau: number) =>
      Math.max(...[...limits].map(([order, limit]) => (line(order) * gain(order, tau)) / limit));
    expect(worst(result.value)).toBeLessThanOrEqual(0.9 + 1e-9);
    expect(worst(result.value * (1 - 1e-6))).toBeGreaterThan(0.9);
  });

  it('brings THD to the figure asked for', () => {
    const { result } = seekGoal(goal({ goal: { kind: 'thd', maxPercent: 8 } }), ignore);
    if (!result.isFound) throw new Error('Nothing was found');
    const orders = series.components.filter(({ rms, order }) => rms > 0 && order > 1);
    const thd = Math.hypot(...orders.map(({ order }) => line(order) * gain(order, result.value)));
    expect((100 * thd) / (line(1) * gain(1, result.value))).toBeCloseTo(8, 6);
  });

  it('says when there is none in the range', () => {
    const { result } = seekGoal(goal({ from: 1e-6, to: 1e-5 }), ignore);
    expect(result.isFound).toBe(false);
    expect(result.isFound ? null : result.best?.value).toBeCloseTo(1e-5, 12);
  });

  it('asks for limits before it seeks a verdict', () => {
    expect(() => seekGoal(goal({ judgement: null }), ignore)).toThrow(/choose limits/);
  });
});

describe('the spread over tolerances', () => {
  const work = (settings: SpreadWork['settings']): SpreadWork => ({
    ...judging,
    ...{ kind: 'spread', specs: [lowPass(5e-3)], series, frequenciesHz: [100], settings },
    places: [{ stage: 0, parameter: 'timeConstantS', tolerancePercent: 20 }],
  });
  const corners = { method: 'corners', draws: 1000, seed: 1 } as const;

  it('ends at the corners, as the closed form has them', () => {
    const outcome = spreadOf(work(corners), ignore);
    const fifth = outcome.orders.find(({ order }) => order === 5)!;
    expect(fifth.min).toBeCloseTo(line(5) * gain(5, 6e-3), 12);
    expect(fifth.max).toBeCloseTo(line(5) * gain(5, 4e-3), 12);
    expect(outcome.response[0]!.maxDb).toBeCloseTo(20 * Math.log10(gain(2, 4e-3)), 9);
    expect(outcome).toMatchObject({ trials: 2, unsteady: 0 });
  });

  it('repeats its draws with the seed, and names it', () => {
    const draws = { method: 'draws', draws: 200, seed: 7 } as const;
    const first = spreadOf(work(draws), ignore);
    expect(spreadOf(work(draws), ignore)).toEqual(first);
    expect(spreadOf(work({ ...draws, seed: 8 }), ignore).orders).not.toEqual(first.orders);
    expect(first).toMatchObject({ seed: 7, trials: 200 });
  });

  it('counts the share that passes: a wide spread about the value that just does, about half', () => {
    const found = seekGoal(goal({ goal: { kind: 'verdict', marginPercent: 0 } }), ignore).result;
    if (!found.isFound) throw new Error('Nothing was found');
    const draws = { method: 'draws', draws: 2000, seed: 3 } as const;
    const outcome = spreadOf({ ...work(draws), specs: [lowPass(found.value)] }, ignore);
    // Even draws about the border: binomial, five standard deviations of 0.5/√2000.
    expect(Math.abs(outcome.passing! / 2000 - 0.5)).toBeLessThan(5 * (0.5 / Math.sqrt(2000)));
    expect(outcome.worst!.sharePercent).toBeGreaterThan(100);
  });

  it('tells how far it is', () => {
    const seen: number[] = [];
    spreadOf(work({ method: 'draws', draws: 500, seed: 1 }), (share) => seen.push(share));
    expect(seen.length).toBeGreaterThan(50);
    expect(seen.at(-1)).toBe(1);
  });
});
