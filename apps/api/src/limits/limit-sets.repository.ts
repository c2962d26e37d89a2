import { Inject, Injectable } from '@nestjs/common';
import { schema, type Database, type Tx } from '@overtally/db';
import { and, asc, eq, inArray } from 'drizzle-orm';
import { DATABASE } from '../database/database.tokens.js';

const { limitSets, members, projects } = schema;

export type LimitSetRow = Pick<typeof limitSets.$inferSelect, 'id' | 'projectId' | 'definition'>;

const columns = { id: limitSets.id, projectId: limitSets.projectId, definition: limitSets.definition };

/** Custom limit sets of projects. */
@Injectable()
export class LimitSetsRepository {
  constructor(@Inject(DATABASE) private readonly database: Database) {}

  async find(id: string): Promise<LimitSetRow | undefined> {
    const [row] = await this.database.select(columns).from(limitSets).where(eq(limitSets.id, id));
    return row;
  }

  async ofProject(projectId: string): Promise<LimitSetRow[]> {
    return this.database
      .select(columns)
      .from(limitSets)
      .where(eq(limitSets.projectId, projectId))
      .orderBy(asc(limitSets.createdAt), asc(limitSets.id));
  }

  /** Those of every project that a person is a member of. */
  async ofMember(userId: string): Promise<LimitSetRow[]> {
    const own = this.database
      .select({ id: members.projectId })
      .from(members)
      .where(eq(members.userId, userId));
    return this.database
      .select(columns)
      .from(limitSets)
      .where(inArray(limitSets.projectId, own))
      .orderBy(asc(limitSets.createdAt), asc(limitSets.id));
  }

  /** The project and the person's role in it, null for a person who is no member; undefined for no project. */
  async roleIn(projectId: string, userId: string) {
    const [row] = await this.database
      .select({ role: members.role })
      .from(projects)
      .leftJoin(members, and(eq(members.projectId, projects.id), eq(members.userId, userId)))
      .where(eq(projects.id, projectId));
    return row;
  }

  async insert(tx: Tx, row: typeof limitSets.$inferInsert): Promise<LimitSetRow> {
    const [made] = await tx.insert(limitSets).values(row).returning(columns);
    return made!;
  }

  /** Deletes a set; a project that compared with it compares with none. Verdicts keep their copy. */
  async delete(tx: Tx, id: string): Promise<void> {
    await tx
      .update(projects)
      .set({ comparisonLimitSetId: null })
      .where(eq(projects.comparisonLimitSetId, id));
    await tx.delete(limitSets).where(eq(limitSets.id, id));
  }
}
