import { Inject, Injectable } from '@nestjs/common';
import type { Verdict } from '@overtally/contracts';
import { schema, type Database, type Tx } from '@overtally/db';
import { and, desc, eq, getTableColumns, inArray, isNotNull, sql, type SQL } from 'drizzle-orm';
import { DATABASE } from '../database/database.tokens.js';

const { analyses, analysisChannels, recordings, users, verdicts } = schema;

export type VerdictRow = Awaited<ReturnType<VerdictsRepository['find']>> & object;

export interface VerdictFilter {
  analysisId?: string;
  projectId?: string;
  recordingId?: string;
}

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

  /** Those of the ids whose recording was read or scaled anew since, with its number. */
  async outdated(tx: Database | Tx, ids: readonly string[]) {
    return tx
      .select({ id: verdicts.id, number: recordings.number })
      .from(verdicts)
      .innerJoin(analyses, eq(analyses.id, verdicts.analysisId))
      .innerJoin(recordings, eq(recordings.id, analyses.recordingId))
      .where(and(inArray(verdicts.id, [...ids]), isNotNull(analyses.supersededById)));
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

  async insert(tx: Tx, row: typeof verdicts.$inferInsert): Promise<string> {
    const [made] = await tx.insert(verdicts).values(row).returning({ id: verdicts.id });
    return made!.id;
  }

  private select(where: SQL | undefined) {
    return this.database
      .select({
        ...getTableColumns(verdicts),
        recordingId: analyses.recordingId,
        channelName: analysisChannels.name,
        unit: analysisChannels.unit,
        authorName: users.name,
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
    repeats: [],
    repeatability: row.repeatability,
    author: { id: row.authorId, name: row.authorName },
    createdAt: row.createdAt.toISOString(),
  };
}
