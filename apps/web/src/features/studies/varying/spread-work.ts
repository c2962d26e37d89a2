import type { StudyDefinition } from '@overtally/contracts';
import {
  cornerStudy,
  drawStudy,
  spreadsOf,
  stageFigures,
  type FourierSeries,
  type StageSpec,
  type StageSpread,
} from '@overtally/dsp';
import { judgeOrders, type Judging } from './judged-figures.js';

/** Everything a study of tolerances needs, as plain data for a thread of its own. */
export interface SpreadWork extends Judging {
  kind: 'spread';
  /** Stages that are on. */
  specs: StageSpec[];
  places: StageSpread[];
  series: FourierSeries;
  frequenciesHz: number[];
  settings: NonNullable<StudyDefinition['spread']>;
}

export interface SpreadOutcome {
  kind: 'spread';
  orders: { order: number; nominal: number; min: number; max: number }[];
  /** In dB; NaN where the gain is 0 or there is no steady state in any trial. */
  response: { frequencyHz: number; minDb: number; maxDb: number }[];
  method: 'corners' | 'draws';
  seed: number | null;
  trials: number;
  /** Trials whose verdict is a pass; null where nothing is judged. */
  passing: number | null;
  /** Trials behind which there is no steady state. */
  unsteady: number;
  /** The order that takes the largest share of its limit in any trial. */
  worst: { order: number; sharePercent: number } | null;
}

/**
 * Spread of the orders and of the gain over the tolerances of values: at all corners, or over seeded draws. Each trial is
 * judged as the nominal output is; one without a steady state does not pass.
 *
 * @throws AnalysisInputError for tolerances or numbers that cannot be taken
 */
export function spreadOf(work: SpreadWork, onProgress: (share: number) => void): SpreadOutcome {
  const { specs, places, series, frequenciesHz, settings } = work;
  const spreads = spreadsOf(specs, places);
  const plain = stageFigures(specs, places, series, frequenciesHz);
  const count = series.components.length;
  const trials =
    settings.method === 'draws'
      ? settings.draws
      : 2 ** spreads.filter(({ tolerancePercent }) => tolerancePercent > 0).length;
  const step = Math.max(1, Math.floor(trials / 100));
  const seen = { calls: -1, passing: 0, unsteady: 0 };
  let worst: SpreadOutcome['worst'] = null;
  const figures = (values: Float64Array) => {
    const found = plain(values);
    // Both studies ask for the nominal values first.
    if (++seen.calls === 0) return found;
    if (seen.calls % step === 0) onProgress(seen.calls / trials);
    if (Number.isNaN(found[0])) {
      seen.unsteady++;
      return found;
    }
    const verdict = judgeOrders(series, found, work);
    if (verdict?.result === 'pass') seen.passing++;
    for (const { order, sharePercent, result } of verdict?.orders ?? []) {
      if (sharePercent === null || result === 'disregarded') continue;
      if (worst === null || sharePercent > worst.sharePercent) worst = { order, sharePercent };
    }
    return found;
  };
  const ranges =
    settings.method === 'draws'
      ? drawStudy(spreads, figures, { draws: settings.draws, seed: settings.seed }).figures
      : cornerStudy(spreads, figures).figures;
  const end = (value: number | null | undefined) => value ?? Number.NaN;
  const decibels = (gain: number) => (gain > 0 ? 20 * Math.log10(gain) : Number.NaN);
  return {
    kind: 'spread',
    orders: series.components.map(({ order }, i) => ({
      order,
      nominal: ranges[i]!.nominal,
      min: end(ranges[i]!.min),
      max: end(ranges[i]!.max),
    })),
    response: frequenciesHz.map((frequencyHz, i) => ({
      frequencyHz,
      minDb: decibels(end(ranges[count + i]!.min)),
      maxDb: decibels(end(ranges[count + i]!.max)),
    })),
    method: settings.method,
    seed: settings.method === 'draws' ? settings.seed : null,
    trials,
    passing: work.limitSet === null || work.judgement === null ? null : seen.passing,
    unsteady: seen.unsteady,
    worst,
  };
}
