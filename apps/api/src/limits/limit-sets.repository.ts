import { Inject, Injectable } from '@nestjs/common';
import { schema, type Database, type Tx } from '@overtally/db';
import { and, asc, desc, eq, getTableColumns, inArray, sql, type SQL } from 'drizzle-orm';
import { DATABASE } from '../database/database.tokens.js';

const { limitSets, members, projects } = schema;

/** A version of a custom set, with the id of the newest one. */
export type LimitSetRow = typeof limitSets.$inferSelect & { newestId: string };

const newestId = sql<string>`first_value(${limitSets.id}) over (
  partition by ${limitSets.familyId} order by ${limitSets.version} desc)`;

const firstMadeAt = sql`min(${limitSets.createdAt}) over (partition by ${limitSets.familyId})`;

/** Custom limit sets of projects. */
@Injectable()
export class LimitSetsRepository {
  constructor(@Inject(DATABASE) private readonly database: Database) {}

  async find(id: string): Promise<LimitSetRow | undefined> {
    const family = this.database
      .select({ familyId: limitSets.familyId })
      .from(limitSets)
      .where(eq(limitSets.id, id));
    const versions = this.withNewest(inArray(limitSets.familyId, family));
    const [row] = await this.database.select().from(versions).where(eq(versions.id, id));
    return row;
  }

  /** The newest versions, in the order in which their sets were made. */
  async ofProject(projectId: string): Promise<LimitSetRow[]> {
    return this.newest(eq(limitSets.projectId, projectId));
  }

  /** The newest versions in every project that a person is a member of. */
  async ofMember(userId: string): Promise<LimitSetRow[]> {
    const own = this.database
      .select({ id: members.projectId })
      .from(members)
      .where(eq(members.userId, userId));
    return this.newest(inArray(limitSets.projectId, own));
  }

  /** All versions, the newest first. */
  async versions(familyId: string): Promise<LimitSetRow[]> {
    const versions = this.withNewest(eq(limitSets.familyId, familyId));
    return this.database.select().from(versions).orderBy(desc(versions.version));
  }

  /** The newest version of the set that a version belongs to; all are held until the transaction ends. */
  async lockNewest(tx: Tx, id: string) {
    const family = tx.select({ id: limitSets.familyId }).from(limitSets).where(eq(limitSets.id, id));
    const [newest] = await tx
      .select()
      .from(limitSets)
      .where(inArray(limitSets.familyId, family))
      .orderBy(desc(limitSets.version))
      .for('update');
    return newest;
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

  async insert(tx: Tx, row: typeof limitSets.$inferInsert): Promise<string> {
    const [made] = await tx.insert(limitSets).values(row).returning({ id: limitSets.id });
    return made!.id;
  }

  /** Retires all versions of a set, or brings them back. */
  async retire(tx: Tx, familyId: string, retired: boolean): Promise<void> {
    const retiredAt = retired ? sql`coalesce(${limitSets.retiredAt}, now())` : null;
    await tx.update(limitSets).set({ retiredAt }).where(eq(limitSets.familyId, familyId));
  }

  /** Lets projects that compare with a set compare with another one, or with none. */
  async compareWith(tx: Tx, id: string, other: string | null): Promise<void> {
    await tx
      .update(projects)
      .set({ comparisonLimitSetId: other })
      .where(eq(projects.comparisonLimitSetId, id));
  }

  /** Deletes a version; a project that compared with it compares with none. Verdicts keep their copy. */
  async delete(tx: Tx, id: string): Promise<void> {
    await this.compareWith(tx, id, null);
    await tx.delete(limitSets).where(eq(limitSets.id, id));
  }

  private async newest(where: SQL): Promise<LimitSetRow[]> {
    const versions = this.withNewest(where);
    return this.database
      .select()
      .from(versions)
      .where(eq(versions.id, versions.newestId))
      .orderBy(asc(versions.firstMadeAt), asc(versions.familyId));
  }

  private withNewest(where: SQL) {
    return this.database
      .select({
        ...getTableColumns(limitSets),
        newestId: newestId.as('newest_id'),
        firstMadeAt: firstMadeAt.as('first_made_at'),
      })
      .from(limitSets)
      .where(where)
      .as('versions');
  }
}
