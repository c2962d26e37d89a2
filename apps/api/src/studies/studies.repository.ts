import { Inject, Injectable } from '@nestjs/common';
import type { StudyResult } from '@overtally/contracts';
import { schema, type Database, type Tx } from '@overtally/db';
import { and, desc, eq, ilike, inArray, or, sql } from 'drizzle-orm';
import { likePattern } from '../common/paging.js';
import { DATABASE } from '../database/database.tokens.js';

const { projects, studies, studyVersions, users } = schema;

type NewVersion = typeof studyVersions.$inferInsert;
export type StudyRow = typeof studies.$inferSelect;
export type StudyVersionRow = NonNullable<Awaited<ReturnType<StudiesRepository['version']>>>;
export type StudyVersionHead = Awaited<ReturnType<StudiesRepository['versionsOf']>>[number];
export type StudyListRow = Awaited<ReturnType<StudiesRepository['page']>>[number];

/** Studies and their versions. */
@Injectable()
export class StudiesRepository {
  constructor(@Inject(DATABASE) private readonly database: Database) {}

  async find(id: string): Promise<StudyRow | undefined> {
    const [row] = await this.database.select().from(studies).where(eq(studies.id, id));
    return row;
  }

  /** A version with all that it says; the newest when none is named. */
  async version(studyId: string, version?: number) {
    const [row] = await this.versions()
      .where(
        and(
          eq(studyVersions.studyId, studyId),
          version === undefined ? undefined : eq(studyVersions.version, version),
        ),
      )
      .orderBy(desc(studyVersions.version))
      .limit(1);
    return row;
  }

  /** Versions of studies of a project, by their ids, in no particular order. */
  async versionsOfProject(projectId: string, ids: readonly string[]) {
    if (ids.length === 0) return [];
    const found = await this.versions().where(
      and(inArray(studyVersions.id, [...ids]), eq(studies.projectId, projectId)),
    );
    return found;
  }

  /** Heads of all versions, the newest first. */
  async versionsOf(studyId: string) {
    const { id, version, comment, authorId, createdAt } = studyVersions;
    return this.database
      .select({ id, version, comment, authorId, authorName: users.name, createdAt })
      .from(studyVersions)
      .innerJoin(users, eq(users.id, studyVersions.authorId))
      .where(eq(studyVersions.studyId, studyId))
      .orderBy(desc(studyVersions.version));
  }

  /** Studies of a project with the outcome of their newest versions, the newest first. */
  async page(
    projectId: string,
    words: string | undefined,
    after: { createdAt: string; id: string } | undefined,
    limit: number,
  ) {
    const newest = this.database
      .selectDistinctOn([studyVersions.studyId], {
        studyId: studyVersions.studyId,
        versionId: sql<string>`${studyVersions.id}`.as('version_id'),
        version: studyVersions.version,
        savedAt: sql<Date>`${studyVersions.createdAt}`.mapWith(studyVersions.createdAt).as('saved_at'),
        authorId: studyVersions.authorId,
        stability: sql<
          StudyResult['stability']['verdict']
        >`${studyVersions.result}->'stability'->>'verdict'`.as('stability'),
        before: sql<VerdictOf>`${studyVersions.result}->'verdictBefore'->>'result'`.as('result_before'),
        after: sql<VerdictOf>`${studyVersions.result}->'verdictAfter'->>'result'`.as('result_after'),
      })
      .from(studyVersions)
      .orderBy(studyVersions.studyId, desc(studyVersions.version))
      .as('newest');
    const pattern = words ? likePattern(words) : undefined;
    return this.database
      .select({
        ...{ id: studies.id, projectId: studies.projectId, number: studies.number, name: studies.name },
        ...{ retiredAt: studies.retiredAt, createdAt: studies.createdAt },
        ...{
          version: newest.version,
          versionId: newest.versionId,
          savedAt: newest.savedAt,
          stability: newest.stability,
        },
        ...{ resultBefore: newest.before, resultAfter: newest.after },
        ...{ authorId: newest.authorId, authorName: users.name },
      })
      .from(studies)
      .innerJoin(newest, eq(newest.studyId, studies.id))
      .innerJoin(users, eq(users.id, newest.authorId))
      .where(
        and(
          eq(studies.projectId, projectId),
          pattern === undefined
            ? undefined
            : or(
                ilike(studies.name, pattern),
                sql`'S-' || lpad(${studies.number}::text, greatest(4, length(${studies.number}::text)), '0') ilike ${pattern}`,
              ),
          after &&
            sql`(${studies.createdAt}, ${studies.id}) < (${after.createdAt}::timestamptz, ${after.id}::uuid)`,
        ),
      )
      .orderBy(desc(studies.createdAt), desc(studies.id))
      .limit(limit);
  }

  /** The newest version number of a study, which is held until the transaction ends. */
  async lockNewest(tx: Tx, id: string): Promise<number | undefined> {
    await tx.select({ id: studies.id }).from(studies).where(eq(studies.id, id)).for('update');
    const [row] = await tx
      .select({ version: studyVersions.version })
      .from(studyVersions)
      .where(eq(studyVersions.studyId, id))
      .orderBy(desc(studyVersions.version))
      .limit(1);
    return row?.version;
  }

  /** A study with the next number of its project. */
  async insert(tx: Tx, projectId: string, name: string): Promise<string> {
    const [counter] = await tx
      .update(projects)
      .set({ lastStudyNumber: sql`${projects.lastStudyNumber} + 1` })
      .where(eq(projects.id, projectId))
      .returning({ number: projects.lastStudyNumber });
    const [made] = await tx
      .insert(studies)
      .values({ projectId, name, number: counter!.number })
      .returning({ id: studies.id });
    return made!.id;
  }

  async insertVersion(tx: Tx, row: NewVersion): Promise<void> {
    await tx.insert(studyVersions).values(row);
  }

  async update(tx: Tx, id: string, change: Partial<Pick<StudyRow, 'name' | 'retiredAt'>>): Promise<void> {
    if (Object.keys(change).length > 0) await tx.update(studies).set(change).where(eq(studies.id, id));
  }

  /** With all its versions. */
  async delete(tx: Tx, id: string): Promise<void> {
    await tx.delete(studies).where(eq(studies.id, id));
  }

  private versions() {
    const { id, studyId, version, definition, series, result, comment, authorId, createdAt } = studyVersions;
    return this.database
      .select({
        ...{ id, studyId, version, definition, series, result, comment, authorId, createdAt },
        ...{ authorName: users.name, name: studies.name, number: studies.number },
      })
      .from(studyVersions)
      .innerJoin(studies, eq(studies.id, studyVersions.studyId))
      .innerJoin(users, eq(users.id, studyVersions.authorId))
      .$dynamic();
  }
}

type VerdictOf = NonNullable<StudyResult['verdictBefore']>['result'] | null;
