import { Inject, Injectable } from '@nestjs/common';
import { schema, type Database, type Tx } from '@overtally/db';
import { and, asc, eq, inArray, isNull, ne, or, sql } from 'drizzle-orm';
import { alias } from 'drizzle-orm/pg-core';
import { DATABASE } from '../database/database.tokens.js';

const { analyses, channels, projects, recordings, reportVerdicts, reports, verdictRepeats, verdicts } =
  schema;

export type RecordingRow = typeof recordings.$inferSelect;
export type ChannelRow = typeof channels.$inferSelect;
export type NewRecording = Omit<typeof recordings.$inferInsert, 'number'>;

/** Rows of recordings and their channels. */
@Injectable()
export class RecordingsRepository {
  constructor(@Inject(DATABASE) private readonly database: Database) {}

  async find(id: string): Promise<RecordingRow | undefined> {
    const [row] = await this.database.select().from(recordings).where(eq(recordings.id, id));
    return row;
  }

  async channel(recordingId: string, index: number): Promise<ChannelRow | undefined> {
    const [row] = await this.database
      .select()
      .from(channels)
      .where(and(eq(channels.recordingId, recordingId), eq(channels.index, index)));
    return row;
  }

  /** The recording, held until the transaction ends; all changes of its status go through this lock. */
  async lock(tx: Tx, id: string): Promise<RecordingRow | undefined> {
    const [row] = await tx.select().from(recordings).where(eq(recordings.id, id)).for('update');
    return row;
  }

  /** Inserts a recording under the next number of its project. */
  async insert(tx: Tx, row: NewRecording): Promise<string> {
    const [counter] = await tx
      .update(projects)
      .set({ lastRecordingNumber: sql`${projects.lastRecordingNumber} + 1` })
      .where(eq(projects.id, row.projectId))
      .returning({ number: projects.lastRecordingNumber });
    if (counter === undefined) throw new Error(`Project ${row.projectId} is gone`);
    const [created] = await tx
      .insert(recordings)
      .values({ ...row, number: counter.number })
      .returning({ id: recordings.id });
    return created!.id;
  }

  async update(tx: Tx, id: string, change: Partial<RecordingRow>): Promise<void> {
    if (Object.keys(change).length === 0) return;
    await tx.update(recordings).set(change).where(eq(recordings.id, id));
  }

  async updateChannel(
    tx: Tx,
    recordingId: string,
    index: number,
    change: Partial<ChannelRow>,
  ): Promise<void> {
    await tx
      .update(channels)
      .set(change)
      .where(and(eq(channels.recordingId, recordingId), eq(channels.index, index)));
  }

  async channelsOf(tx: Tx, recordingId: string): Promise<ChannelRow[]> {
    return tx.select().from(channels).where(eq(channels.recordingId, recordingId)).orderBy(channels.index);
  }

  /** Puts the channels of a new reading in the place of the earlier ones. */
  async replaceChannels(tx: Tx, recordingId: string, rows: (typeof channels.$inferInsert)[]): Promise<void> {
    await tx.delete(channels).where(eq(channels.recordingId, recordingId));
    await tx.insert(channels).values(rows);
  }

  /** Deletes a recording with all that hangs on it. Its verdicts go first, since their repeats hold on to analyses. */
  async delete(tx: Tx, id: string): Promise<void> {
    const own = tx.select({ id: analyses.id }).from(analyses).where(eq(analyses.recordingId, id));
    await tx.delete(verdicts).where(inArray(verdicts.analysisId, own));
    await tx.delete(recordings).where(eq(recordings.id, id));
  }

  /** Titles of the reports that refer to a verdict on this recording. */
  async reportsWith(tx: Tx, recordingId: string): Promise<string[]> {
    const rows = await tx
      .selectDistinct({ title: reports.title })
      .from(reportVerdicts)
      .innerJoin(reports, eq(reports.id, reportVerdicts.reportId))
      .innerJoin(verdicts, eq(verdicts.id, reportVerdicts.verdictId))
      .innerJoin(analyses, eq(analyses.id, verdicts.analysisId))
      .where(and(eq(analyses.recordingId, recordingId), inArray(reports.status, ['draft', 'in-review'])));
    return rows.map(({ title }) => title);
  }

  /** Numbers of other recordings with a verdict that this recording is a repeat of. */
  async repeatedBy(tx: Tx, recordingId: string): Promise<number[]> {
    const ofRepeat = alias(analyses, 'of_repeat');
    const rows = await tx
      .selectDistinct({ number: recordings.number })
      .from(verdictRepeats)
      .innerJoin(ofRepeat, eq(ofRepeat.id, verdictRepeats.analysisId))
      .innerJoin(verdicts, eq(verdicts.id, verdictRepeats.verdictId))
      .innerJoin(analyses, eq(analyses.id, verdicts.analysisId))
      .innerJoin(recordings, eq(recordings.id, analyses.recordingId))
      .where(and(eq(ofRepeat.recordingId, recordingId), ne(recordings.id, recordingId)))
      .orderBy(asc(recordings.number));
    return rows.map(({ number }) => number);
  }

  /** Keeps uploads and deletions of the same source apart until the transaction ends. */
  async lockSource(tx: Tx, key: string): Promise<void> {
    await tx.execute(sql`select pg_advisory_xact_lock(hashtextextended(${key}, 0))`);
  }

  async isSourceUsed(tx: Tx, key: string): Promise<boolean> {
    const rows = await tx
      .select({ id: recordings.id })
      .from(recordings)
      .where(eq(recordings.sourceKey, key))
      .limit(1);
    return rows.length > 0;
  }

  /** Writes the progress of a reading; false when the recording is gone or this reading no longer wanted. */
  async writeReadProgress(id: string, readId: string, progress: number): Promise<boolean> {
    const rows = await this.database
      .update(recordings)
      .set({ progress })
      .where(
        and(
          eq(recordings.id, id),
          eq(recordings.status, 'reading'),
          or(eq(recordings.readId, readId), isNull(recordings.readId)),
        ),
      )
      .returning({ id: recordings.id });
    return rows.length > 0;
  }

  /** Settings of the newest analysis that ended well, or else those of the project. */
  async settingsFor(tx: Tx, recording: RecordingRow) {
    const [latest] = await tx
      .select({ settings: analyses.settings })
      .from(analyses)
      .where(
        and(eq(analyses.recordingId, recording.id), inArray(analyses.status, ['done', 'running', 'queued'])),
      )
      .orderBy(sql`${analyses.createdAt} desc`)
      .limit(1);
    return latest?.settings ?? this.projectSettings(tx, recording.projectId);
  }

  async projectSettings(tx: Tx, projectId: string) {
    const [project] = await tx
      .select({ settings: projects.defaultSettings })
      .from(projects)
      .where(eq(projects.id, projectId));
    if (project === undefined) throw new Error(`Project ${projectId} is gone`);
    return project.settings;
  }
}
