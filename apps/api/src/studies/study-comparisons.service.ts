import { Injectable } from '@nestjs/common';
import type { ChannelAnalysis, StudyComparison, StudyComparisonQuery } from '@overtally/contracts';
import { thdF } from '@overtally/dsp';
import { unitRatio } from '@overtally/limits';
import { AnalysesService } from '../analyses/analyses.service.js';
import { problem } from '../common/problem.js';
import type { StudyVersionRow } from './studies.repository.js';
import { StudiesService } from './studies.service.js';

/** Frequencies nearer than this count as the same: what supplies deviate from nominal in ordinary operation. */
const frequencyTolerancePercent = 2;

/** Holds what a study predicts against a recording of what was built. */
@Injectable()
export class StudyComparisons {
  constructor(
    private readonly studies: StudiesService,
    private readonly analyses: AnalysesService,
  ) {}

  /**
   * Predicted against measured, in the unit of the prediction; the measured side is the single line of each order.
   * @throws 404 for a version that is not there, 409 where one of the sides has no figures, 422 for an analysis or channel
   * that the project does not have, and for a channel of another quantity or in a unit that does not convert
   */
  async compare(
    id: string,
    { version, analysisId, channel: index }: StudyComparisonQuery,
  ): Promise<StudyComparison> {
    const [study, found] = await Promise.all([
      this.studies.get(id, version),
      this.studies.version(id, version),
    ]);
    if (found.result.output === null) {
      const detail = `Version ${found.version} has no steady state, so there is nothing to compare with`;
      throw problem(409, 'no-steady-state', detail);
    }
    const channel = await this.channel(study.projectId, analysisId, index);
    const { outputQuantity, outputUnit } = found.definition;
    const factor = unitRatio(channel.unit, outputUnit);
    if (channel.quantity !== outputQuantity || factor === null) {
      const measured = `${channel.quantity} in ${channel.unit || 'no unit'}`;
      const message = `${channel.name} is ${measured}; the study predicts ${outputQuantity} in ${outputUnit || 'no unit'}`;
      throw problem(422, 'not-comparable', message, [{ path: 'channel', message }]);
    }
    return comparison(found, analysisId, channel, factor);
  }

  private async channel(projectId: string, analysisId: string, index: number): Promise<ChannelAnalysis> {
    const refuse = (path: string, message: string) =>
      problem(422, 'not-comparable', message, [{ path, message }]);
    const analysis = await this.analyses.find(analysisId);
    if (analysis?.projectId !== projectId) throw refuse('analysisId', 'The project has no such analysis');
    if (analysis.status !== 'done') {
      const detail = `The analysis is ${analysis.status}; a comparison needs one that is done`;
      throw problem(409, 'analysis-not-done', detail);
    }
    const channel = analysis.channels.find((each) => each.index === index);
    if (!channel) throw refuse('channel', `The analysis has no channel ${index}`);
    return channel;
  }
}

function comparison(
  { id, version, definition, series, result }: StudyVersionRow,
  analysisId: string,
  { index, fundamental, harmonics }: ChannelAnalysis,
  factor: number,
): StudyComparison {
  const predicted = new Map(result.orders.map(({ order, outputRms }) => [order, outputRms]));
  const measured = new Map(harmonics.map((harmonic) => [harmonic.order, harmonic]));
  const orders = [...new Set([...predicted.keys(), ...measured.keys()])].sort((a, b) => a - b);
  return {
    study: { id, version },
    ...{ analysisId, channel: index, unit: definition.outputUnit },
    ...{ predictedHz: series.frequencyHz, measuredHz: fundamental?.frequencyHz ?? null },
    orders: orders.map((order) => {
      const harmonic = measured.get(order);
      const predictedRms = predicted.get(order) ?? null;
      const measuredRms = harmonic ? harmonic.rms * factor : null;
      const { uncertainty = null } = harmonic ?? {};
      return {
        ...{ order, predictedRms, measuredRms },
        differencePercent:
          predictedRms === null || !measuredRms ? null : 100 * (predictedRms / measuredRms - 1),
        measuredUncertainty: uncertainty === null ? null : uncertainty * factor,
      };
    }),
    ...{
      predictedThdF: result.output?.thdF ?? null,
      measuredThdF: distortion(harmonics, definition.thdMaxOrder),
    },
    frequencyTolerancePercent,
    cautions: cautionsOf(series.frequencyHz, fundamental?.frequencyHz ?? null),
  };
}

/** Of the single lines, over the orders that the prediction counts. */
function distortion(harmonics: ChannelAnalysis['harmonics'], maxOrder: number): number | null {
  const byOrder = new Float64Array(harmonics.reduce((most, { order }) => Math.max(most, order), 1));
  for (const { order, rms } of harmonics) byOrder[order - 1] = rms;
  return thdF(byOrder, maxOrder);
}

const hertz = (value: number) => `${Number(value.toPrecision(6))} Hz`;

function cautionsOf(predictedHz: number, measuredHz: number | null): string[] {
  if (measuredHz === null)
    return ['No fundamental was found in the channel, so there are no orders to compare with'];
  const apart = 100 * Math.abs(measuredHz / predictedHz - 1);
  if (apart <= frequencyTolerancePercent) return [];
  const differ = `${Number(apart.toPrecision(2))} %, more than ${frequencyTolerancePercent} %`;
  return [
    `The fundamental is ${hertz(measuredHz)} where ${hertz(predictedHz)} was assumed (${differ}): the stages answer ` +
      'each order at another frequency than predicted',
  ];
}
