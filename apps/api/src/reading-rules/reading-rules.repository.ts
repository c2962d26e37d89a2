import { Inject, Injectable } from '@nestjs/common';
import type { UpdateReadingRule } from '@overtally/contracts';
import { schema, type Database, type Tx } from '@overtally/db';
import { and, count, eq, getTableColumns } from 'drizzle-orm';
import { DATABASE } from '../database/database.tokens.js';

const { readingRules, recordings, users } = schema;

export type ReadingRuleRow = typeof readingRules.$inferSelect;
export type ReadingRuleRecord = ReadingRuleRow & { creatorName: string; recordingCount: number };

/** Rows of reading rules. */
@Injectable()
export class ReadingRulesRepository {
  constructor(@Inject(DATABASE) private readonly database: Database) {}

  /** The rules of a project, in no order. */
  ofProject(projectId: string): Promise<ReadingRuleRow[]> {
    return this.database.select().from(readingRules).where(eq(readingRules.projectId, projectId));
  }

  /** The rules of a project with their makers and how many recordings they read, in no order. */
  recordsOfProject(projectId: string): Promise<ReadingRuleRecord[]> {
    return this.records().where(eq(readingRules.projectId, projectId));
  }

  async record(id: string): Promise<ReadingRuleRecord | undefined> {
    const [row] = await this.records().where(eq(readingRules.id, id));
    return row;
  }

  async find(projectId: string, id: string): Promise<ReadingRuleRow | undefined> {
    const [row] = await this.database
      .select()
      .from(readingRules)
      .where(and(eq(readingRules.id, id), eq(readingRules.projectId, projectId)));
    return row;
  }

  /** Whether the rule is there, which it then is until the transaction ends. */
  async hold(tx: Tx, id: string): Promise<boolean> {
    const rows = await tx
      .select({ id: readingRules.id })
      .from(readingRules)
      .where(eq(readingRules.id, id))
      .for('key share');
    return rows.length > 0;
  }

  async countOf(tx: Tx, projectId: string): Promise<number> {
    return tx.$count(readingRules, eq(readingRules.projectId, projectId));
  }

  async insert(tx: Tx, row: typeof readingRules.$inferInsert): Promise<string> {
    const [made] = await tx.insert(readingRules).values(row).returning({ id: readingRules.id });
    return made!.id;
  }

  async update(tx: Tx, id: string, change: UpdateReadingRule): Promise<void> {
    await tx
      .update(readingRules)
      .set({ ...change, updatedAt: new Date() })
      .where(eq(readingRules.id, id));
  }

  async delete(tx: Tx, id: string): Promise<void> {
    await tx.delete(readingRules).where(eq(readingRules.id, id));
  }

  private records() {
    return this.database
      .select({
        ...getTableColumns(readingRules),
        creatorName: users.name,
        recordingCount: count(recordings.id),
      })
      .from(readingRules)
      .innerJoin(users, eq(users.id, readingRules.createdById))
      .leftJoin(recordings, eq(recordings.readingRuleId, readingRules.id))
      .groupBy(readingRules.id, users.id)
      .$dynamic();
  }
}
