import { Inject, Injectable } from '@nestjs/common';
import type { CreateVerdict, LimitSet, SupplyVerdict, Verdict } from '@overtally/contracts';
import type { Database, Tx } from '@overtally/db';
import {
  combineRepeats,
  evaluate,
  supplyVerdict,
  type Evaluation,
  type StatedSupply,
} from '@overtally/limits';
import { z } from 'zod';
import { decodeCursor, pageOfRows } from '../common/paging.js';
import { problem } from '../common/problem.js';
import type { SignedInUser } from '../common/request.js';
import { DATABASE } from '../database/database.tokens.js';
import { recordingNumber } from '../recordings/recording-number.js';
import { MeasurementsService } from './measurements.service.js';
import { VerdictSubjectsService, type Subject } from './verdict-subjects.service.js';
import { toVerdict, VerdictsRepository, type VerdictFilter } from './verdicts.repository.js';
import { voltageBeside } from './voltage-beside.js';

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
    private readonly subjects: VerdictSubjectsService,
    private readonly measurements: MeasurementsService,
  ) {}

  /**
   * Judges a channel, and its repeats where any are named: each by itself, then together.
   * @throws as `VerdictSubjectsService.find`
   */
  async create(user: SignedInUser, analysisId: string, input: CreateVerdict): Promise<Verdict> {
    const { parameters, decisionRule } = input;
    const { limitSet: found, subjects } = await this.subjects.find(analysisId, input);
    // What becomes of a set later does not belong into the copy of it.
    const { newestId: _newestId, retiredAt: _retiredAt, ...limitSet } = found;
    const judged: Judged[] = [];
    for (const subject of subjects) judged.push(await this.judge(subject, limitSet, input));
    const [first] = judged as [Judged, ...Judged[]];
    const { decisionRuleText } = first.evaluation;
    const isRepeated = judged.length > 1;
    const combined = isRepeated
      ? combineRepeats(judged.map(({ evaluation }) => evaluation))
      : { ...first.evaluation, repeatability: null };
    const id = await this.database.transaction((tx) =>
      this.repository.insert(
        tx,
        {
          ...{ analysisId, channelIndex: input.channel, limitSetId: limitSet.id, limitSet },
          ...{ parameters, decisionRule, decisionRuleText, authorId: user.id },
          ...combined,
          supply: worstSupply(judged),
        },
        isRepeated ? judged.map(toRepeat) : [],
      ),
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
   * Refuses verdicts on samples, of a repeat too, that were read or scaled anew since. One on an earlier analysis of the same
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

  private async judge(
    { analysis, channel }: Subject,
    limitSet: LimitSet,
    { parameters, decisionRule }: CreateVerdict,
  ): Promise<Judged> {
    const measurement = await this.measurements.of(analysis, channel, limitSet, parameters);
    const voltage = channel.quantity === 'current' ? voltageBeside(analysis, channel.index) : undefined;
    const stated = voltage && (await this.statedSupply(analysis, parameters));
    return {
      ...{ analysisId: analysis.id, channelIndex: channel.index },
      evaluation: evaluate(limitSet, measurement, { parameters, decisionRule }),
      supply: voltage && stated ? supplyVerdict(limitSet, voltage, stated) : null,
    };
  }

  /** Nominal values of the supply: of the verdict's parameters, of the test conditions, of the analysis' settings. */
  private async statedSupply(
    { recordingId, settings }: Subject['analysis'],
    { nominalV }: CreateVerdict['parameters'],
  ): Promise<StatedSupply> {
    const { supplyVoltageV, supplyFrequencyHz } = await this.repository.conditionsOf(recordingId);
    const { nominalFrequencyHz } = settings;
    const ofSettings = nominalFrequencyHz === 'auto' ? undefined : nominalFrequencyHz;
    return { nominalV: nominalV ?? supplyVoltageV, frequencyHz: supplyFrequencyHz ?? ofSettings };
  }
}

interface Judged {
  analysisId: string;
  channelIndex: number;
  evaluation: Evaluation;
  supply: SupplyVerdict | null;
}

const toRepeat = ({ analysisId, channelIndex, evaluation: { result, reason } }: Judged) => ({
  ...{ analysisId, channelIndex },
  ...{ result, reason },
});

const supplyResults = ['pass', 'not-decidable', 'fail'] as const;

/** The supply of the repeat that keeps worst to its demands, the first of equals, saying which that is. */
function worstSupply(judged: readonly Judged[]): SupplyVerdict | null {
  const rank = ({ result }: SupplyVerdict) => supplyResults.indexOf(result);
  const known = judged.flatMap(({ supply }, index) => (supply ? [{ supply, repeat: index + 1 }] : []));
  const [first, ...rest] = known;
  if (first === undefined) return null;
  const worst = rest.reduce((held, next) => (rank(next.supply) > rank(held.supply) ? next : held), first);
  const { supply, repeat } = worst;
  return judged.length === 1 ? supply : { ...supply, summary: `Repeat ${repeat}: ${supply.summary}` };
}
