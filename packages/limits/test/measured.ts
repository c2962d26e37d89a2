import type { DecisionRule, LimitSet, VerdictParameters } from '@overtally/contracts';
import { evaluate } from '../src/evaluate.js';
import type { Measurement } from '../src/measurement.js';
import { findPublishedLimitSet } from '../src/sets/index.js';

/** The published set of this id. */
export function setOf(id: string): LimitSet {
  const set = findPublishedLimitSet(id);
  if (set === undefined) throw new Error(`No set ${id}`);
  return set;
}
export const classA = setOf('iec61000-3-2.classA');
export const classB = setOf('iec61000-3-2.classB');
export const classD = setOf('iec61000-3-2.classD');
export const en50160 = setOf('en50160.lv');

type Amount = number | { mean: number; smoothedMax: number | null };

/** A channel with the given orders, all others zero, steady unless a largest smoothed value is given. */
export function measured(amounts: Record<number, Amount>, rest: Partial<Measurement> = {}): Measurement {
  const harmonics = Array.from({ length: 50 }, (_, i) => {
    const amount = amounts[i + 1] ?? 0;
    return typeof amount === 'number'
      ? { order: i + 1, mean: amount, smoothedMax: amount }
      : { order: i + 1, ...amount };
  });
  const fundamentalRms = harmonics[0]?.mean ?? null;
  const rms = Math.hypot(...harmonics.map(({ mean }) => mean));
  return {
    quantity: 'current',
    unit: 'A',
    rms,
    fundamentalRms,
    harmonics,
    highestMeasurableOrder: 99,
    ...rest,
  };
}

export const judge = (
  set: LimitSet,
  measurement: Measurement,
  parameters: VerdictParameters = {},
  decisionRule: DecisionRule = 'simple-acceptance',
) => evaluate(set, measurement, { parameters, decisionRule });
export const orderOf = (evaluation: ReturnType<typeof evaluate>, order: number) => {
  const row = evaluation.orders.find((candidate) => candidate.order === order);
  if (row === undefined) throw new Error(`No order ${order}`);
  return row;
};
export const failing = (evaluation: ReturnType<typeof evaluate>) =>
  evaluation.orders.filter(({ result }) => result === 'fail').map(({ order }) => order);
