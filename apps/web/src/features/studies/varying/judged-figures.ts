import type { LimitSet, StudyDefinition } from '@overtally/contracts';
import type { FourierSeries } from '@overtally/dsp';
import type { Evaluation } from '@overtally/limits';
import type { Physical } from '../draft.js';
import { judged } from '../predict.js';

/** What an output is judged by while values vary. */
export interface Judging {
  limitSet: LimitSet | null;
  judgement: StudyDefinition['judgement'];
  output: Physical;
}

/** The verdict on an output given by the rms of each order of the input, in their sequence. */
export function judgeOrders(
  input: FourierSeries,
  rms: ArrayLike<number>,
  { limitSet, judgement, output }: Judging,
): Evaluation | null {
  const components = input.components.map(({ order }, i) => ({ order, rms: rms[i]!, phaseDeg: null }));
  return judged(limitSet, judgement, { frequencyHz: input.frequencyHz, dc: 0, components }, output);
}

/** The largest share of its limit that an order or total takes, in percent; null where none has a limit that counts. */
export function largestShare({ orders, totals }: Evaluation): number | null {
  return [...orders, ...totals].reduce<number | null>((most, { result, sharePercent }) => {
    if (sharePercent === null || result === 'disregarded') return most;
    return most === null ? sharePercent : Math.max(most, sharePercent);
  }, null);
}
