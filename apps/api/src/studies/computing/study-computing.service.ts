import { Injectable } from '@nestjs/common';
import type { LimitSet, StudyDefinition, StudyInput, StudyResult, StudySeries } from '@overtally/contracts';
import { textbookSeries } from '@overtally/dsp';
import { seriesOfChannel } from '@overtally/limits';
import { AnalysesService } from '../../analyses/analyses.service.js';
import { problem, type FieldError } from '../../common/problem.js';
import { ComputePool } from '../../jobs/compute-pool.js';
import { isComputeStopped } from '../../jobs/compute-task.js';
import { LimitSetsService } from '../../limits/limit-sets.service.js';
import type { StudyTaskInput, StudyTaskResult } from './study-task.js';

/** Somebody waits for the answer. */
const longestMs = 20_000;

/** Finds what a study rests on and has it worked out, in a thread of its own. */
@Injectable()
export class StudyComputing {
  constructor(
    private readonly analyses: AnalysesService,
    private readonly limitSets: LimitSetsService,
    private readonly pool: ComputePool,
  ) {}

  /**
   * The harmonics that a study starts from.
   * @throws 422 for a channel that the project does not have, that holds no harmonics, or that is not of the quantity and
   * unit stated
   */
  async seriesOf(projectId: string, definition: StudyDefinition): Promise<StudySeries> {
    const { input } = definition;
    switch (input.kind) {
      case 'harmonics':
        return input.series;
      case 'wave': {
        const series = textbookSeries(input);
        return { ...series, components: [...series.components] };
      }
      case 'channel':
        return this.ofChannel(projectId, input, definition);
    }
  }

  /**
   * What a study predicts, worked out anew.
   * @throws 422 naming stage and value at fault, the limit set that the project does not have, or draws that take too long
   */
  async resultOf(projectId: string, definition: StudyDefinition, series: StudySeries): Promise<StudyResult> {
    const input: StudyTaskInput = {
      definition,
      series,
      limitSet: await this.limitSet(projectId, definition),
    };
    const outcome = await this.run(input);
    if ('result' in outcome) return outcome.result;
    throw refused(outcome.errors);
  }

  private async run(input: StudyTaskInput): Promise<StudyTaskResult> {
    const stop = AbortSignal.timeout(longestMs);
    try {
      return await this.pool.run('study', input, { stop, onProgress: () => undefined });
    } catch (error) {
      if (!isComputeStopped(error)) throw error;
      const message = `It took more than ${longestMs / 1000} s; take fewer draws, orders or stages`;
      throw refused([{ path: 'definition.spread', message }]);
    }
  }

  private async ofChannel(
    projectId: string,
    { analysisId, channel: index }: Extract<StudyInput, { kind: 'channel' }>,
    { inputQuantity, inputUnit }: StudyDefinition,
  ): Promise<StudySeries> {
    const refuse = (place: string, message: string) => refused([{ path: `definition.${place}`, message }]);
    const analysis = await this.analyses.find(analysisId);
    if (analysis?.projectId !== projectId) {
      throw refuse('input.analysisId', 'The project has no such analysis');
    }
    if (analysis.status !== 'done') {
      throw refuse('input.analysisId', `The analysis is ${analysis.status}; a study needs one that is done`);
    }
    const channel = analysis.channels.find((each) => each.index === index);
    if (!channel) throw refuse('input.channel', `The analysis has no channel ${index}`);
    if (channel.quantity !== inputQuantity) {
      throw refuse('inputQuantity', `${channel.name} is ${channel.quantity}, not ${inputQuantity}`);
    }
    if (channel.unit !== inputUnit) {
      const unit = channel.unit || 'no unit';
      throw refuse('inputUnit', `${channel.name} is in ${unit}; state that as the unit of the input`);
    }
    const series = seriesOfChannel(channel);
    if (series === null) {
      throw refuse('input.channel', `No harmonics were found in ${channel.name}; choose another channel`);
    }
    return series;
  }

  private async limitSet(projectId: string, { judgement }: StudyDefinition): Promise<LimitSet | null> {
    if (judgement === null) return null;
    const set = await this.limitSets.resolve(projectId, judgement.limitSetId);
    if (set) return set;
    const message = `The project has no limit set ${judgement.limitSetId}`;
    throw refused([{ path: 'definition.judgement.limitSetId', message }]);
  }
}

const refused = (errors: FieldError[]) =>
  problem(422, 'study-unfit', 'The study cannot be worked out; see errors', errors);
