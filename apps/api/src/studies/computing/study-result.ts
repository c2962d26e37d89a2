import type { LimitSet, StudyDefinition, StudyResult, StudySeries } from '@overtally/contracts';
import {
  engineVersion,
  harmonicsThroughStages,
  poles,
  resonancePeaks,
  resonanceWarnings,
  seriesFigures,
  stability,
  type StagesResult,
} from '@overtally/dsp';
import { evaluate, measurementOfSeries } from '@overtally/limits';
import { chainOfStudy } from './stage-chain.js';
import { spreadOfStudy } from './study-spread.js';

type Predicted = NonNullable<StudyResult['verdictAfter']>;
type Side = Pick<StudyDefinition, 'inputQuantity' | 'inputUnit'>;

/**
 * What a study predicts: nothing but its definition, the harmonics that it starts from and its limits go in. Without a steady
 * state there are no figures behind the stages.
 *
 * @param limitSet null where nothing is judged
 * @param between called between pieces of work; may throw to stop
 * @throws StudyFault that names stage and value, and AnalysisInputError for a series that is none
 */
export function resultOfStudy(
  definition: StudyDefinition,
  series: StudySeries,
  limitSet: LimitSet | null,
  between: () => void = () => undefined,
): StudyResult {
  const { thdMaxOrder, judgement, inputQuantity, inputUnit } = definition;
  const chain = chainOfStudy(definition);
  const { verdict, reason } = stability(chain);
  const judge = limitSet === null || judgement === null ? null : { limitSet, judgement };
  const before =
    judge && judgement?.of !== 'output' ? predict(judge, series, { inputQuantity, inputUnit }) : null;
  const behind = harmonicsThroughStages(series, chain, {
    maxOrder: thdMaxOrder,
    pointsPerCycle: 2,
    cycles: 1,
  });
  const common = {
    engineVersion,
    stability: { verdict, reason, poles: chain.flatMap(poles) },
    input: seriesFigures(series, thdMaxOrder),
    verdictBefore: before && {
      ...before,
      reason: `Of the harmonics that the study starts from: ${before.reason}`,
    },
  };
  if (!behind.isDefined) {
    return { ...common, output: null, orders: [], verdictAfter: null, warnings: [], spread: null };
  }
  const outcome = judgement?.of === 'input' ? null : judge;
  const after = outcome && predict(outcome, behind.series, outputSide(definition));
  const limits = behind.orders.map(
    ({ order }) => after?.orders.find((each) => each.order === order)?.limit ?? null,
  );
  between();
  return {
    ...common,
    output: behind.output,
    orders: behind.orders,
    verdictAfter: after && { ...after, reason: `A prediction, not a measurement: ${after.reason}` },
    warnings: warningsOf(definition, behind, resonancePeaks(chain)),
    spread: spreadOfStudy(definition, series, { judge: outcome, limits, between }),
  };
}

const outputSide = ({ outputQuantity, outputUnit }: StudyDefinition): Side => ({
  inputQuantity: outputQuantity,
  inputUnit: outputUnit,
});

function predict(
  { limitSet, judgement }: { limitSet: LimitSet; judgement: NonNullable<StudyDefinition['judgement']> },
  series: Parameters<typeof measurementOfSeries>[0],
  { inputQuantity, inputUnit }: Side,
): Predicted {
  return evaluate(limitSet, measurementOfSeries(series, inputQuantity, inputUnit), judgement);
}

const figure = (value: number) => String(Number(value.toPrecision(4)));

function warningsOf(
  { resonance }: StudyDefinition,
  { orders, series }: StagesResult,
  peaks: ReturnType<typeof resonancePeaks>,
): StudyResult['warnings'] {
  const held = orders.filter(({ inputRms }) => inputRms > 0).map(({ order }) => order);
  const { bandPercent, minGain: leastGain } = resonance;
  return resonanceWarnings(held, series.frequencyHz, peaks, { bandPercent, leastGain }).map(
    ({ order, frequencyHz, peak, distancePercent }) => ({
      ...{ order, peakHz: peak.frequencyHz, peakGain: peak.gain },
      message:
        `Order ${order} (${figure(frequencyHz)} Hz) lies ${figure(Math.abs(distancePercent))} % ` +
        `${distancePercent < 0 ? 'below' : 'above'} a resonance at ${figure(peak.frequencyHz)} Hz ` +
        `with gain ${figure(peak.gain)}`,
    }),
  );
}
