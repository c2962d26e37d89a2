import { Inject, Injectable } from '@nestjs/common';
import type { TestConditions, Verdict } from '@overtally/contracts';
import { schema, type Database, type Tx } from '@overtally/db';
import { and, desc, eq, getTableColumns, inArray, isNotNull, ne, sql, type SQL } from 'drizzle-orm';
import { DATABASE } from '../database/database.tokens.js';
import { recordingNumber } from '../recordings/recording-number.js';

const { analyses, analysisChannels, recordings, users, verdictRepeats, verdicts } = schema;

export type VerdictRow = Awaited<ReturnType<VerdictsRepository['find']>> & object;

export interface VerdictFilter {
  analysisId?: string;
  projectId?: string;
  recordingId?: string;
}

type RepeatRecord = Omit<Verdict['repeats'][number], 'recordingNumber'> & { number: number };

/** Verdicts with what their analysis, channel and author add to them. */
@Injectable()
export class VerdictsRepository {
  constructor(@Inject(DATABASE) private readonly database: Database) {}

  async find(id: string) {
    const [row] = await this.select(eq(verdicts.id, id)).limit(1);
    return row;
  }

  /** Those of the ids that belong to the project, in no order. */
  async findMany(projectId: string, ids: readonly string[]) {
    return this.select(and(inArray(verdicts.id, [...ids]), eq(recordings.projectId, projectId)));
  }

  /** Those of the ids of which a recording was read or scaled anew since, with its number. */
  async outdated(tx: Database | Tx, ids: readonly string[]) {
    const selected = { id: verdicts.id, number: recordings.number };
    const are = and(inArray(verdicts.id, [...ids]), isNotNull(analyses.supersededById));
    const own = await tx
      .select(selected)
      .from(verdicts)
      .innerJoin(analyses, eq(analyses.id, verdicts.analysisId))
      .innerJoin(recordings, eq(recordings.id, analyses.recordingId))
      .where(are);
    const repeated = await tx
      .selectDistinct(selected)
      .from(verdicts)
      .innerJoin(verdictRepeats, eq(verdictRepeats.verdictId, verdicts.id))
      .innerJoin(analyses, eq(analyses.id, verdictRepeats.analysisId))
      .innerJoin(recordings, eq(recordings.id, analyses.recordingId))
      .where(and(are, ne(analyses.id, verdicts.analysisId)));
    return [...own, ...repeated];
  }

  /** The newest first, from behind `after`. */
  async list(filter: VerdictFilter, after: { createdAt: string; id: string } | undefined, limit: number) {
    const conditions = [
      filter.analysisId && eq(verdicts.analysisId, filter.analysisId),
      filter.projectId && eq(recordings.projectId, filter.projectId),
      filter.recordingId && eq(recordings.id, filter.recordingId),
      after &&
        sql`(${verdicts.createdAt}, ${verdicts.id}) < (${after.createdAt}::timestamptz, ${after.id}::uuid)`,
    ].filter((condition) => condition !== undefined && condition !== '');
    return this.select(and(...conditions))
      .orderBy(desc(verdicts.createdAt), desc(verdicts.id))
      .limit(limit);
  }

  /** The conditions that the recording was made under, as far as they were stated. */
  async conditionsOf(recordingId: string): Promise<TestConditions> {
    const [row] = await this.database
      .select({ conditions: recordings.conditions })
      .from(recordings)
      .where(eq(recordings.id, recordingId));
    return row?.conditions ?? {};
  }

  /** Writes a verdict with its repeats in their order. */
  async insert(
    tx: Tx,
    row: typeof verdicts.$inferInsert,
    repeats: Omit<typeof verdictRepeats.$inferInsert, 'verdictId' | 'position'>[],
  ): Promise<string> {
    const [made] = await tx.insert(verdicts).values(row).returning({ id: verdicts.id });
    const verdictId = made!.id;
    if (repeats.length > 0) {
      const rows = repeats.map((repeat, position) => ({ ...repeat, verdictId, position }));
      await tx.insert(verdictRepeats).values(rows);
    }
    return verdictId;
  }

  private select(where: SQL | undefined) {
    const repeats = sql<RepeatRecord[]>`(
      select coalesce(json_agg(json_build_object(
        'analysisId', r.analysis_id, 'recordingId', of_repeat.id, 'number', of_repeat.number,
        'channel', r.channel_index, 'result', r.result, 'reason', r.reason) order by r.position), '[]')
      from verdict_repeats r
      join analyses a on a.id = r.analysis_id
      join recordings of_repeat on of_repeat.id = a.recording_id
      where r.verdict_id = ${verdicts.id})`;
    return this.database
      .select({
        ...getTableColumns(verdicts),
        recordingId: analyses.recordingId,
        channelName: analysisChannels.name,
        unit: analysisChannels.unit,
        authorName: users.name,
        repeats,
      })
      .from(verdicts)
      .innerJoin(analyses, eq(analyses.id, verdicts.analysisId))
      .innerJoin(recordings, eq(recordings.id, analyses.recordingId))
      .innerJoin(
        analysisChannels,
        and(
          eq(analysisChannels.analysisId, verdicts.analysisId),
          eq(analysisChannels.index, verdicts.channelIndex),
        ),
      )
      .innerJoin(users, eq(users.id, verdicts.authorId))
      .where(where)
      .$dynamic();
  }
}

/** The verdict as the contract words it. */
export function toVerdict(row: VerdictRow): Verdict {
  return {
    id: row.id,
    analysisId: row.analysisId,
    recordingId: row.recordingId,
    channel: row.channelIndex,
    channelName: row.channelName,
    unit: row.unit,
    limitSetId: row.limitSetId,
    limitSet: row.limitSet,
    parameters: row.parameters,
    decisionRule: row.decisionRule,
    decisionRuleText: row.decisionRuleText,
    result: row.result,
    reason: row.reason,
    orders: row.orders,
    totals: row.totals,
    supply: row.supply,
    repeats: row.repeats.map(({ number, ...repeat }) => ({
      ...repeat,
      recordingNumber: recordingNumber(number),
    })),
    repeatability: row.repeatability,
    author: { id: row.authorId, name: row.authorName },
    createdAt: row.createdAt.toISOString(),
  };
}
