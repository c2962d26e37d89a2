import type { LimitSet, StudyDefinition } from '@overtally/contracts';
import {
  AnalysisInputError,
  chainOf,
  frequencyResponse,
  harmonicsThroughStages,
  logFrequencies,
  poles,
  resonancePeaks,
  resonanceWarnings,
  stability,
  unwrappedPhase,
  zeros,
  type FourierSeries,
  type ResonancePeak,
  type ResonanceWarning,
  type ResponsePoint,
  type Root,
  type SeriesFigures,
  type Stability,
  type StagesResult,
  type TransferFunction,
} from '@overtally/dsp';
import { evaluate, measurementOfSeries, type Evaluation } from '@overtally/limits';
import { specOf, stagesOn, type Physical, type StudyDraft } from './draft.js';

/** What follows from the stages alone. */
export interface ChainFacts {
  chain: TransferFunction[];
  stability: Stability;
  poles: Root[];
  zeros: Root[];
}

/** The steady state behind stable stages. */
export interface Steady {
  input: SeriesFigures;
  output: SeriesFigures;
  result: StagesResult;
  before: Evaluation | null;
  after: Evaluation | null;
  peaks: ResonancePeak[];
  warnings: ResonanceWarning[];
  bode: { points: ResponsePoint[]; phaseDeg: (number | null)[]; orders: ResponsePoint[] };
}

/** What the page shows of a draft. */
export type Prediction =
  | { kind: 'faulty'; reason: string }
  | { kind: 'unsteady'; facts: ChainFacts }
  | { kind: 'steady'; facts: ChainFacts; steady: Steady };

const POINTS_PER_DECADE = 120;

/** Everything the page shows, from the draft; pure and quick enough to run while a slider moves. */
export function predict(draft: StudyDraft, limitSet: LimitSet | null): Prediction {
  try {
    const facts = chainFacts(draft.stages);
    if (facts.stability.verdict !== 'stable') return { kind: 'unsteady', facts };
    return { kind: 'steady', facts, steady: steadyOf(draft, facts, limitSet) };
  } catch (error) {
    if (error instanceof AnalysisInputError) return { kind: 'faulty', reason: error.message };
    throw error;
  }
}

/** @throws AnalysisInputError that names the stage by its place on the page */
export function chainFacts(stages: StudyDraft['stages']): ChainFacts {
  const chain = stagesOn(stages).map(({ stage, index }) => {
    try {
      return chainOf([specOf(stage)])[0]!;
    } catch (error) {
      if (!(error instanceof AnalysisInputError)) throw error;
      throw new AnalysisInputError(error.message.replace(/^Stage 1:/, `Stage ${index + 1}:`));
    }
  });
  return { chain, stability: stability(chain), poles: chain.flatMap(poles), zeros: chain.flatMap(zeros) };
}

function steadyOf(draft: StudyDraft, { chain }: ChainFacts, limitSet: LimitSet | null): Steady {
  const { series, thdMaxOrder } = draft;
  const highest = series.components.reduce((most, { order }) => Math.max(most, order), 1);
  const result = harmonicsThroughStages(series, chain, {
    maxOrder: thdMaxOrder,
    pointsPerCycle: Math.max(400, 8 * highest),
  });
  if (!result.isDefined) throw new AnalysisInputError(result.reason);
  const peaks = resonancePeaks(chain);
  const held = series.components.flatMap(({ order, rms }) => (rms > 0 ? [order] : []));
  const points = frequencyResponse(chain, bodeFrequencies(series, peaks));
  return {
    input: result.input,
    output: result.output,
    result,
    before: judged(limitSet, draft.judgement, series, {
      quantity: draft.inputQuantity,
      unit: draft.inputUnit,
    }),
    after: judged(limitSet, draft.judgement, result.series, {
      quantity: draft.outputQuantity,
      unit: draft.outputUnit,
    }),
    peaks,
    warnings: resonanceWarnings(held, series.frequencyHz, peaks, {
      bandPercent: draft.resonance.bandPercent,
      leastGain: draft.resonance.minGain,
    }),
    bode: {
      points,
      phaseDeg: unwrappedPhase(points),
      orders: frequencyResponse(
        chain,
        held.map((order) => order * series.frequencyHz),
      ),
    },
  };
}

/** From a fifth of the fundamental to twice the highest order, with the peaks among them. */
export function bodeFrequencies(
  { frequencyHz, components }: FourierSeries,
  peaks: readonly ResonancePeak[] = [],
): number[] {
  const highest = components.reduce((most, { order }) => Math.max(most, order), 1);
  const grid = logFrequencies(frequencyHz / 5, 2 * highest * frequencyHz, POINTS_PER_DECADE);
  const inside = peaks.map((peak) => peak.frequencyHz).filter((f) => f > grid[0]! && f < grid.at(-1)!);
  return [...grid, ...inside].sort((a, b) => a - b);
}

/** A verdict on a periodic signal; null where nothing is judged. */
export function judged(
  limitSet: LimitSet | null,
  judgement: StudyDefinition['judgement'],
  series: FourierSeries,
  { quantity, unit }: Physical,
): Evaluation | null {
  if (limitSet === null || judgement === null) return null;
  return evaluate(limitSet, measurementOfSeries(series, quantity, unit), judgement);
}
