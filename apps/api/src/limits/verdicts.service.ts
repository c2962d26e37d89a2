import { Inject, Injectable } from '@nestjs/common';
import type { ChannelAnalysis, CreateVerdict, LimitSet, Verdict } from '@overtally/contracts';
import type { Database, Tx } from '@overtally/db';
import { evaluate, measurementOfChannel } from '@overtally/limits';
import { z } from 'zod';
import { AnalysesService } from '../analyses/analyses.service.js';
import { decodeCursor, pageOfRows } from '../common/paging.js';
import { problem } from '../common/problem.js';
import type { SignedInUser } from '../common/request.js';
import { DATABASE } from '../database/database.tokens.js';
import { recordingNumber } from '../recordings/recording-number.js';
import { LimitSetsService } from './limit-sets.service.js';
import { toVerdict, VerdictsRepository, type VerdictFilter } from './verdicts.repository.js';

const cure = 'judge its newest analysis';
const placeSchema = z.tuple([z.iso.datetime(), z.uuid()]);

interface Paging {
  cursor?: string;
  limit: number;
}

/** Applies limit sets to analyses. A verdict is never changed; another one is made instead. */
@Injectable()
export class VerdictsService {
  constructor(
    @Inject(DATABASE) private readonly database: Database,
    private readonly repository: VerdictsRepository,
    private readonly limitSets: LimitSetsService,
    private readonly analyses: AnalysesService,
  ) {}

  async create(user: SignedInUser, analysisId: string, input: CreateVerdict): Promise<Verdict> {
    const { channel, limitSet } = await this.subject(analysisId, input);
    const { parameters, decisionRule } = input;
    const evaluation = evaluate(limitSet, measurementOfChannel(channel), { parameters, decisionRule });
    const id = await this.database.transaction((tx) =>
      this.repository.insert(tx, {
        analysisId,
        channelIndex: channel.index,
        limitSetId: limitSet.id,
        limitSet,
        parameters,
        decisionRule,
        authorId: user.id,
        ...evaluation,
      }),
    );
    return this.get(id);
  }

  async get(id: string): Promise<Verdict> {
    const row = await this.repository.find(id);
    if (!row) throw problem(404, 'not-found', 'There is no such verdict');
    return toVerdict(row);
  }

  /** Verdicts of a project or an analysis, the newest first. */
  async list(filter: VerdictFilter, { cursor, limit }: Paging) {
    const place = decodeCursor(cursor, placeSchema);
    const after = place && { createdAt: place[0], id: place[1] };
    const rows = await this.repository.list(filter, after, limit + 1);
    return pageOfRows(rows, limit, (row) => [row.createdAt.toISOString(), row.id], toVerdict);
  }

  /** The verdicts of a project with these ids, in their order; undefined where the project has none. */
  async ofProject(projectId: string, ids: readonly string[]): Promise<(Verdict | undefined)[]> {
    const rows = await this.repository.findMany(projectId, ids);
    const byId = new Map(rows.map((row) => [row.id, toVerdict(row)]));
    return ids.map((id) => byId.get(id));
  }

  /**
   * Refuses verdicts on samples that were read or scaled anew since. One on an earlier analysis of the same
   * samples, under other settings, stands.
   * @throws 409 naming the place of each outdated verdict among the ids
   */
  async requireCurrent(tx: Tx, ids: readonly string[]): Promise<void> {
    const outdated = await this.repository.outdated(tx, ids);
    if (outdated.length === 0) return;
    const numbers = [...new Set(outdated.map((row) => recordingNumber(row.number)))].sort().join(', ');
    const detail = `${numbers} was read or scaled anew since the verdict; ${cure}, and put that in its place`;
    const errors = outdated.map(({ id }) => ({
      path: `verdictIds.${ids.indexOf(id)}`,
      message: `The recording was read or scaled anew since; ${cure}`,
    }));
    throw problem(409, 'verdict-outdated', detail, errors);
  }

  /** Those of the ids whose recording was read or scaled anew since, with the cure. */
  async outdated(ids: readonly string[]): Promise<{ id: string; message: string }[]> {
    if (ids.length === 0) return [];
    const rows = await this.repository.outdated(this.database, ids);
    return rows.map(({ id, number }) => ({
      id,
      message: `${recordingNumber(number)} was read or scaled anew since this verdict; ${cure}, and put that in its place`,
    }));
  }

  private async subject(
    analysisId: string,
    { channel: index, limitSetId }: CreateVerdict,
  ): Promise<{ channel: ChannelAnalysis; limitSet: LimitSet }> {
    const analysis = await this.analyses.get(analysisId);
    if (analysis.status !== 'done') {
      const detail = `The analysis is ${analysis.status}; a verdict needs one that is done`;
      throw problem(409, 'analysis-not-done', detail);
    }
    if (analysis.supersededById !== null) {
      const detail = `The recording was read or scaled anew since this analysis; ${cure}`;
      throw problem(409, 'analysis-superseded', detail);
    }
    const limitSet = await this.limitSets.resolve(analysis.projectId, limitSetId);
    const channel = analysis.channels.find((each) => each.index === index);
    if (limitSet && channel) return { channel, limitSet };
    throw problem(422, 'verdict-subject-unknown', 'The verdict cannot be made; see errors', [
      ...(channel ? [] : [{ path: 'channel', message: `The analysis has no channel ${index}` }]),
      ...(limitSet ? [] : [{ path: 'limitSetId', message: `The project has no limit set ${limitSetId}` }]),
    ]);
  }
}
