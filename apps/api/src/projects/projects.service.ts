import { Inject, Injectable } from '@nestjs/common';
import {
  idSchema,
  type CreateProject,
  type Project,
  type ProjectQuery,
  type UpdateProject,
} from '@overtally/contracts';
import type { Database } from '@overtally/db';
import { findPublishedLimitSet } from '@overtally/limits';
import { z } from 'zod';
import { decodeCursor, pageOfRows } from '../common/paging.js';
import { problem } from '../common/problem.js';
import type { SignedInUser } from '../common/request.js';
import { DATABASE } from '../database/database.tokens.js';
import { MembersRepository } from './members.repository.js';
import { ProjectsRepository, type ProjectRow } from './projects.repository.js';

const placeSchema = z.tuple([z.iso.datetime(), z.uuid()]);

@Injectable()
export class ProjectsService {
  constructor(
    @Inject(DATABASE) private readonly database: Database,
    private readonly repository: ProjectsRepository,
    private readonly members: MembersRepository,
  ) {}

  /** The projects a person is a member of; an administrator sees all. The newest come first. */
  async list(user: SignedInUser, { cursor, limit, ...query }: ProjectQuery) {
    const place = decodeCursor(cursor, placeSchema);
    const after = place && { createdAt: new Date(place[0]), id: place[1] };
    const rows = await this.repository.list(user, query, after, limit + 1);
    return pageOfRows(rows, limit, (row) => [row.createdAt.toISOString(), row.id], toProject);
  }

  /**
   * Makes a project with the person as its manager.
   * @throws 422 for a limit set to compare with that is not a published one
   */
  async create(user: SignedInUser, input: CreateProject): Promise<Project> {
    const comparisonLimitSetId = await this.comparison(null, input.comparisonLimitSetId);
    const id = await this.database.transaction(async (tx) => {
      const made = await this.repository.insert(tx, { ...input, comparisonLimitSetId, createdById: user.id });
      await this.members.insert(tx, made, user.id, 'manager');
      return made;
    });
    return this.get(user, id);
  }

  async get(user: SignedInUser, id: string): Promise<Project> {
    const row = await this.repository.find(id, user.id);
    if (!row) throw problem(404, 'not-found', 'There is no such project');
    return toProject(row);
  }

  /** @throws 422 for a limit set to compare with that is neither a published one nor of the project */
  async update(user: SignedInUser, id: string, { archived, ...change }: UpdateProject): Promise<Project> {
    const { archivedAt } = await this.get(user, id);
    const setId = change.comparisonLimitSetId;
    const comparison = setId !== undefined && { comparisonLimitSetId: await this.comparison(id, setId) };
    const isChanged = archived !== undefined && archived !== (archivedAt !== null);
    await this.database.transaction((tx) =>
      this.repository.update(tx, id, {
        ...change,
        ...comparison,
        ...(isChanged && { archivedAt: archived ? new Date() : null }),
      }),
    );
    return this.get(user, id);
  }

  /** The id of a limit set in the form in which it is stored; the project is null until it is made. */
  private async comparison(projectId: string | null, id: string | null): Promise<string | null> {
    if (id === null || findPublishedLimitSet(id)) return id;
    const custom = idSchema.safeParse(id).data;
    const isOwn = projectId && custom && (await this.repository.hasLimitSet(projectId, custom));
    if (isOwn) return custom;
    const message = 'Choose a published limit set or one of this project';
    throw problem(422, 'limit-set-unknown', message, [{ path: 'comparisonLimitSetId', message }]);
  }
}

function toProject(row: ProjectRow): Project {
  return {
    id: row.id,
    name: row.name,
    customer: row.customer,
    customerContact: row.customerContact,
    preparerMayIssue: row.preparerMayIssue,
    description: row.description,
    defaultSettings: row.defaultSettings,
    comparisonLimitSetId: row.comparisonLimitSetId,
    archivedAt: row.archivedAt?.toISOString() ?? null,
    createdAt: row.createdAt.toISOString(),
    role: row.role,
    counts: { recordings: row.recordings, members: row.members, reports: row.reports },
  };
}
