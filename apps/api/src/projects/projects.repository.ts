import { Inject, Injectable } from '@nestjs/common';
import type { ProjectQuery } from '@overtally/contracts';
import { schema, type Database, type Tx } from '@overtally/db';
import { and, desc, eq, ilike, isNotNull, isNull, or, sql } from 'drizzle-orm';
import { likePattern } from '../common/paging.js';
import type { SignedInUser } from '../common/request.js';
import { DATABASE } from '../database/database.tokens.js';

const { projects, limitSets, members, recordings, reports } = schema;

export type NewProject = typeof projects.$inferInsert;
export type ProjectChange = Partial<
  Pick<
    NewProject,
    | 'name'
    | 'customer'
    | 'customerContact'
    | 'description'
    | 'defaultSettings'
    | 'comparisonLimitSetId'
    | 'preparerMayIssue'
    | 'archivedAt'
  >
>;
export type ProjectRow = Awaited<ReturnType<ProjectsRepository['list']>>[number];

/** Where a page of the list begins: after the project made then, with this id. */
export interface ListPlace {
  createdAt: Date;
  id: string;
}

@Injectable()
export class ProjectsRepository {
  constructor(@Inject(DATABASE) private readonly database: Database) {}

  /** Projects a person may see, the newest first. */
  list(
    user: SignedInUser,
    query: Pick<ProjectQuery, 'q' | 'archived'>,
    after: ListPlace | undefined,
    limit: number,
  ) {
    const pattern = query.q ? likePattern(query.q) : undefined;
    const archived = {
      true: isNotNull(projects.archivedAt),
      false: isNull(projects.archivedAt),
      all: undefined,
    };
    return this.selectFor(user.id)
      .where(
        and(
          user.isAdministrator ? undefined : isNotNull(members.role),
          archived[query.archived],
          pattern === undefined
            ? undefined
            : or(ilike(projects.name, pattern), ilike(projects.customer, pattern)),
          after &&
            sql`(${projects.createdAt}, ${projects.id}) < (${after.createdAt.toISOString()}, ${after.id})`,
        ),
      )
      .orderBy(desc(projects.createdAt), desc(projects.id))
      .limit(limit);
  }

  async find(id: string, userId: string): Promise<ProjectRow | undefined> {
    const [row] = await this.selectFor(userId).where(eq(projects.id, id));
    return row;
  }

  async insert(tx: Tx, project: NewProject): Promise<string> {
    const [row] = await tx.insert(projects).values(project).returning({ id: projects.id });
    if (!row) throw new Error('The database returned no project after an insert');
    return row.id;
  }

  async update(tx: Tx, id: string, change: ProjectChange): Promise<void> {
    if (Object.keys(change).length > 0) await tx.update(projects).set(change).where(eq(projects.id, id));
  }

  /** Makes changes of one project's members wait for one another. */
  async lock(tx: Tx, id: string): Promise<void> {
    await tx.select({ id: projects.id }).from(projects).where(eq(projects.id, id)).for('update');
  }

  /** Whether a custom limit set is one of the project. */
  async hasLimitSet(projectId: string, id: string): Promise<boolean> {
    const ownSet = and(eq(limitSets.projectId, projectId), eq(limitSets.id, id));
    return (await this.database.$count(limitSets, ownSet)) > 0;
  }

  private selectFor(userId: string) {
    return this.database
      .select({
        id: projects.id,
        name: projects.name,
        customer: projects.customer,
        customerContact: projects.customerContact,
        preparerMayIssue: projects.preparerMayIssue,
        description: projects.description,
        defaultSettings: projects.defaultSettings,
        comparisonLimitSetId: projects.comparisonLimitSetId,
        archivedAt: projects.archivedAt,
        createdAt: projects.createdAt,
        role: members.role,
        recordings: this.database.$count(recordings, eq(recordings.projectId, projects.id)),
        members: this.database.$count(sql`${members} counted`, sql`counted.project_id = ${projects.id}`),
        // Guests see what was issued alone, and are told no more by its number.
        reports: this.database.$count(
          reports,
          sql`${reports.projectId} = ${projects.id} and (${members.role} is distinct from 'guest' or ${reports.status} in ('issued', 'superseded'))`,
        ),
      })
      .from(projects)
      .leftJoin(members, and(eq(members.projectId, projects.id), eq(members.userId, userId)));
  }
}
