import { Inject, Injectable } from '@nestjs/common';
import type { CreateNote, Note, UpdateNote } from '@overtally/contracts';
import { schema, type Database, type Tx } from '@overtally/db';
import { and, asc, eq, getTableColumns, sql } from 'drizzle-orm';
import { DATABASE } from '../database/database.tokens.js';

const { analysisChannels, notes, users } = schema;

export type NoteRow = typeof notes.$inferSelect & { authorName: string };

/** Rows of notes. */
@Injectable()
export class NotesRepository {
  constructor(@Inject(DATABASE) private readonly database: Database) {}

  async find(id: string): Promise<NoteRow | undefined> {
    const [row] = await this.select().where(eq(notes.id, id));
    return row;
  }

  /** Notes of an analysis, the oldest first. */
  page(analysisId: string, limit: number, after?: { createdAt: string; id: string }): Promise<NoteRow[]> {
    const behind =
      after && sql`(${notes.createdAt}, ${notes.id}) > (${after.createdAt}::timestamptz, ${after.id}::uuid)`;
    return this.select()
      .where(and(eq(notes.analysisId, analysisId), behind))
      .orderBy(asc(notes.createdAt), asc(notes.id))
      .limit(limit);
  }

  ofAnalysis(analysisId: string): Promise<NoteRow[]> {
    return this.select().where(eq(notes.analysisId, analysisId)).orderBy(asc(notes.createdAt), asc(notes.id));
  }

  async hasChannel(analysisId: string, index: number): Promise<boolean> {
    const rows = await this.database
      .select({ index: analysisChannels.index })
      .from(analysisChannels)
      .where(and(eq(analysisChannels.analysisId, analysisId), eq(analysisChannels.index, index)));
    return rows.length > 0;
  }

  async insert(tx: Tx, analysisId: string, authorId: string, note: CreateNote): Promise<string> {
    const { channel, target, text, cause } = note;
    const [created] = await tx
      .insert(notes)
      .values({ analysisId, authorId, channelIndex: channel, ...target, text, cause })
      .returning({ id: notes.id });
    return created!.id;
  }

  async update(tx: Tx, id: string, change: UpdateNote): Promise<void> {
    await tx
      .update(notes)
      .set({ ...change, updatedAt: new Date() })
      .where(eq(notes.id, id));
  }

  async delete(tx: Tx, id: string): Promise<void> {
    await tx.delete(notes).where(eq(notes.id, id));
  }

  private select() {
    return this.database
      .select({ ...getTableColumns(notes), authorName: users.name })
      .from(notes)
      .innerJoin(users, eq(users.id, notes.authorId))
      .$dynamic();
  }
}

/** The note as the contract words it. */
export function toNote(row: NoteRow): Note {
  return {
    id: row.id,
    analysisId: row.analysisId,
    channel: row.channelIndex,
    target: targetOf(row),
    text: row.text,
    cause: row.cause,
    author: { id: row.authorId, name: row.authorName },
    createdAt: row.createdAt.toISOString(),
    updatedAt: row.updatedAt.toISOString(),
  };
}

function targetOf({ kind, order, frequencyHz, fromS, toS }: NoteRow): Note['target'] {
  switch (kind) {
    case 'order':
      return { kind, order: order! };
    case 'line':
      return { kind, frequencyHz: frequencyHz! };
    case 'span':
      return { kind, fromS: fromS!, toS: toS! };
  }
}
