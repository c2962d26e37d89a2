import { Inject, Injectable } from '@nestjs/common';
import type { ReadProblem } from '@overtally/contracts';
import { schema, type Database, type Tx } from '@overtally/db';
import { and, asc, desc, eq, getTableColumns, sql } from 'drizzle-orm';
import { DATABASE } from '../database/database.tokens.js';
import type { AnalyseTaskResult } from './computing/analyse-task.js';

const { analyses, analysisChannels, channels, harmonics, recordings, users } = schema;

export type AnalysisRow = typeof analyses.$inferSelect;
export type AnalysisRecord = AnalysisRow & { projectId: string; starterName: string };
export type AnalysisChannelRow = typeof analysisChannels.$inferSelect;
export type HarmonicRow = typeof harmonics.$inferSelect;
type Results = Extract<AnalyseTaskResult, { ok: true }>;

/** PostgreSQL takes at most 65535 parameters in one statement; a row of harmonics has 15. */
const harmonicsPerInsert = 2000;

/** Rows of analyses and their figures. */
@Injectable()
export class AnalysesRepository {
  constructor(@Inject(DATABASE) private readonly database: Database) {}

  async find(id: string): Promise<AnalysisRecord | undefined> {
    const [row] = await this.select().where(eq(analyses.id, id));
    return row;
  }

  /** Analyses of a recording, the newest first. */
  page(
    recordingId: string,
    limit: number,
    after?: { createdAt: string; id: string },
  ): Promise<AnalysisRecord[]> {
    const before =
      after &&
      sql`(${analyses.createdAt}, ${analyses.id}) < (${after.createdAt}::timestamptz, ${after.id}::uuid)`;
    return this.select()
      .where(and(eq(analyses.recordingId, recordingId), before))
      .orderBy(desc(analyses.createdAt), desc(analyses.id))
      .limit(limit);
  }

  channelsOf(analysisId: string): Promise<AnalysisChannelRow[]> {
    return this.database
      .select()
      .from(analysisChannels)
      .where(eq(analysisChannels.analysisId, analysisId))
      .orderBy(asc(analysisChannels.index));
  }

  harmonicsOf(analysisId: string): Promise<HarmonicRow[]> {
    return this.database
      .select()
      .from(harmonics)
      .where(eq(harmonics.analysisId, analysisId))
      .orderBy(asc(harmonics.channelIndex), asc(harmonics.order));
  }

  /** The analysis and its recording, both held until the transaction ends. */
  async lock(tx: Tx, id: string) {
    const [owner] = await tx
      .select({ recordingId: analyses.recordingId })
      .from(analyses)
      .where(eq(analyses.id, id));
    if (owner === undefined) return undefined;
    // Always the recording first, as everywhere else, so that no two transactions wait for each other.
    const [recording] = await tx
      .select()
      .from(recordings)
      .where(eq(recordings.id, owner.recordingId))
      .for('update');
    const [analysis] = await tx.select().from(analyses).where(eq(analyses.id, id)).for('update');
    return recording && analysis && { recording, analysis };
  }

  async lockRecording(tx: Tx, recordingId: string) {
    const [row] = await tx.select().from(recordings).where(eq(recordings.id, recordingId)).for('update');
    return row;
  }

  recordedChannels(tx: Tx, recordingId: string) {
    return tx
      .select()
      .from(channels)
      .where(eq(channels.recordingId, recordingId))
      .orderBy(asc(channels.index));
  }

  async begin(tx: Tx, id: string): Promise<void> {
    await tx.update(analyses).set({ status: 'running', progress: 0 }).where(eq(analyses.id, id));
  }

  async requestCancel(tx: Tx, id: string): Promise<void> {
    await tx.update(analyses).set({ cancelRequestedAt: new Date() }).where(eq(analyses.id, id));
  }

  async fail(tx: Tx, id: string, problem: ReadProblem): Promise<void> {
    await tx
      .update(analyses)
      .set({ status: 'failed', problem, finishedAt: new Date() })
      .where(eq(analyses.id, id));
  }

  /** Writes the figures of a finished analysis. */
  async finish(tx: Tx, id: string, { channels: figures, ...results }: Results): Promise<void> {
    const { engineVersion, settings, power, threePhase } = results;
    await tx
      .update(analyses)
      .set({
        ...{ status: 'done', progress: 1, finishedAt: new Date() },
        ...{ engineVersion, settings, power, threePhase },
      })
      .where(eq(analyses.id, id));
    await tx
      .insert(analysisChannels)
      .values(figures.map(({ harmonics: _harmonics, ...channel }) => ({ ...channel, analysisId: id })));
    const rows = figures.flatMap(({ index, harmonics: orders }) =>
      orders.map((order) => ({ ...order, analysisId: id, channelIndex: index })),
    );
    for (let start = 0; start < rows.length; start += harmonicsPerInsert) {
      await tx.insert(harmonics).values(rows.slice(start, start + harmonicsPerInsert));
    }
  }

  /** Writes progress here and on the recording; false when the analysis is gone or was asked to end. */
  async writeProgress(id: string, recordingId: string, progress: number): Promise<boolean> {
    const [row] = await this.database
      .update(analyses)
      .set({ progress })
      .where(and(eq(analyses.id, id), eq(analyses.status, 'running')))
      .returning({ cancelRequestedAt: analyses.cancelRequestedAt });
    if (row === undefined || row.cancelRequestedAt !== null) return false;
    await this.database
      .update(recordings)
      .set({ progress })
      .where(and(eq(recordings.id, recordingId), eq(recordings.status, 'analysing')));
    return true;
  }

  private select() {
    return this.database
      .select({ ...getTableColumns(analyses), projectId: recordings.projectId, starterName: users.name })
      .from(analyses)
      .innerJoin(recordings, eq(recordings.id, analyses.recordingId))
      .innerJoin(users, eq(users.id, analyses.startedById))
      .$dynamic();
  }
}
