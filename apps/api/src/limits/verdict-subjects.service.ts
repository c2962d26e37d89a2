import { Injectable } from '@nestjs/common';
import type { Analysis, ChannelAnalysis, CreateVerdict, LimitSet, Repeat } from '@overtally/contracts';
import { AnalysesService } from '../analyses/analyses.service.js';
import { problem, type FieldError } from '../common/problem.js';
import { LimitSetsService } from './limit-sets.service.js';

/** One channel of an analysis that is judged. */
export interface Subject {
  analysis: Analysis;
  channel: ChannelAnalysis;
}

/** What a verdict is made of: the set, the channel it is on, then its further repeats. */
export interface VerdictSubjects {
  limitSet: LimitSet;
  subjects: [Subject, ...Subject[]];
}

const cure = 'judge its newest analysis';

/** Finds what a verdict is asked of, and refuses what cannot be judged. */
@Injectable()
export class VerdictSubjectsService {
  constructor(
    private readonly limitSets: LimitSetsService,
    private readonly analyses: AnalysesService,
  ) {}

  /**
   * @throws 409 for an analysis that is not done or superseded and for a retired set, 422 for a channel or set that is
   * not there and for repeats that do not go with the channel, naming each
   */
  async find(analysisId: string, input: CreateVerdict): Promise<VerdictSubjects> {
    const analysis = await this.analyses.get(analysisId);
    const refusal = unfit(analysis);
    if (refusal) throw problem(409, refusal.code, refusal.message);
    const limitSet = await this.limitSets.resolve(analysis.projectId, input.limitSetId);
    const channel = channelOf(analysis, input.channel);
    if (!limitSet || !channel) {
      throw problem(422, 'verdict-subject-unknown', 'The verdict cannot be made; see errors', [
        ...(channel ? [] : [{ path: 'channel', message: `The analysis has no channel ${input.channel}` }]),
        ...(limitSet
          ? []
          : [{ path: 'limitSetId', message: `The project has no limit set ${input.limitSetId}` }]),
      ]);
    }
    if (limitSet.retiredAt !== undefined) {
      const detail = `${limitSet.title} was retired; choose another set, or bring it back under Limits`;
      throw problem(409, 'limit-set-retired', detail);
    }
    const first = { analysis, channel };
    return { limitSet, subjects: [first, ...(await this.repeats(first, input.repeats ?? []))] };
  }

  private async repeats(first: Subject, repeats: readonly Repeat[]): Promise<Subject[]> {
    const found: Subject[] = [];
    const errors: FieldError[] = [];
    for (const [index, repeat] of repeats.entries()) {
      const subject = await this.repeat(first, repeat);
      const isTwice = [first, ...found].some(({ analysis }) => analysis.id === repeat.analysisId);
      if (typeof subject === 'string') errors.push({ path: `repeats.${index}`, message: subject });
      else if (isTwice)
        errors.push({ path: `repeats.${index}`, message: 'It is one of the repeats already' });
      else found.push(subject);
    }
    if (errors.length === 0) return found;
    throw problem(422, 'repeats-unfit', 'The repeats do not go together; see errors', errors);
  }

  /** The repeat, or why it cannot be one. */
  private async repeat(
    { analysis: first, channel: judged }: Subject,
    repeat: Repeat,
  ): Promise<Subject | string> {
    const analysis = await this.analyses.find(repeat.analysisId);
    if (analysis?.projectId !== first.projectId) return 'The project has no such analysis';
    const refusal = unfit(analysis);
    if (refusal) return refusal.message;
    const channel = channelOf(analysis, repeat.channel);
    if (!channel) return `The analysis has no channel ${repeat.channel}`;
    if (channel.quantity !== judged.quantity || channel.unit !== judged.unit) {
      const has = `${channel.name} is ${channel.quantity} in ${channel.unit || 'no unit'}`;
      return `${has}; a repeat is ${judged.quantity} in ${judged.unit || 'no unit'}, as the channel judged`;
    }
    return { analysis, channel };
  }
}

const channelOf = ({ channels }: Analysis, index: number) => channels.find((each) => each.index === index);

/** Why an analysis cannot be judged; null when it can. */
function unfit({ status, supersededById }: Analysis): { code: string; message: string } | null {
  if (status !== 'done') {
    return {
      code: 'analysis-not-done',
      message: `The analysis is ${status}; a verdict needs one that is done`,
    };
  }
  if (supersededById === null) return null;
  const message = `The recording was read or scaled anew since this analysis; ${cure}`;
  return { code: 'analysis-superseded', message };
}
