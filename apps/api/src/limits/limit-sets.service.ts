import { Inject, Injectable } from '@nestjs/common';
import {
  holds,
  type CloneLimitSet,
  type CreateLimitSet,
  type LimitSet,
  type UpdateLimitSet,
} from '@overtally/contracts';
import type { Database } from '@overtally/db';
import {
  cloneLimitSet,
  findPublishedLimitSet,
  limitRows,
  limitTableText,
  publishedLimitSets,
} from '@overtally/limits';
import { randomUUID } from 'node:crypto';
import { z } from 'zod';
import { problem } from '../common/problem.js';
import type { SignedInUser } from '../common/request.js';
import { DATABASE } from '../database/database.tokens.js';
import { isKeptByReport } from '../database/referred-violation.js';
import { definitionFrom, toLimitSet } from './limit-set-view.js';
import { LimitSetsRepository, type LimitSetRow } from './limit-sets.repository.js';

const uuid = z.uuid();

export interface LimitSetPage {
  items: LimitSet[];
  nextCursor: string | null;
}

/** Published limit sets, which are data of the product, and the custom ones of projects. */
@Injectable()
export class LimitSetsService {
  constructor(
    @Inject(DATABASE) private readonly database: Database,
    private readonly repository: LimitSetsRepository,
  ) {}

  /** Published sets and the newest versions of the custom ones a person may see, of one project or of all own ones. */
  async list(user: SignedInUser, projectId: string | undefined): Promise<LimitSetPage> {
    if (projectId === undefined) return withPublished(await this.repository.ofMember(user.id));
    if (!(await this.mayRead(user, projectId))) throw problem(404, 'not-found', 'There is no such project');
    return this.listOfProject(projectId);
  }

  async listOfProject(projectId: string): Promise<LimitSetPage> {
    return withPublished(await this.repository.ofProject(projectId));
  }

  /** A published set by its name for anyone signed in; a custom one for those who may read its project. */
  async get(user: SignedInUser, id: string): Promise<LimitSet> {
    const published = findPublishedLimitSet(id);
    if (published) return published;
    const row = await this.findCustom(id);
    if (!row || !(await this.mayRead(user, row.projectId))) throw noSuchSet();
    return toLimitSet(row);
  }

  /** All versions of a custom set, the newest first. */
  async versions(id: string): Promise<LimitSetPage> {
    const { familyId } = await this.custom(id);
    const rows = await this.repository.versions(familyId);
    return { items: rows.map(toLimitSet), nextCursor: null };
  }

  /**
   * The limits of a set as CSV.
   * @param row which of the rows of a set that has them, from 0
   * @throws 404 for a row that the set does not have
   */
  async table(user: SignedInUser, id: string, row: number): Promise<string> {
    const set = await this.get(user, id);
    const rows = limitRows(set);
    if (rows.length === 0 && row === 0) return limitTableText(set);
    const chosen = rows[row];
    if (chosen) return limitTableText({ ...chosen.set, title: `${set.title}, ${chosen.label ?? ''}` });
    throw problem(
      404,
      'no-such-row',
      `The set has ${Math.max(1, rows.length)} tables, from 0; there is no ${row}`,
    );
  }

  /** The set that a verdict in a project may use; undefined for an unknown one and for another project's. */
  async resolve(projectId: string, id: string): Promise<LimitSet | undefined> {
    const published = findPublishedLimitSet(id);
    if (published) return published;
    const row = await this.findCustom(id);
    return row?.projectId === projectId ? toLimitSet(row) : undefined;
  }

  /** @throws as `definitionFrom` */
  async create(user: SignedInUser, projectId: string, input: CreateLimitSet): Promise<LimitSet> {
    return this.insert({ projectId, definition: definitionFrom(input, user.name), createdById: user.id });
  }

  /**
   * A set of the project's own with the limits of another one, published or of the same project.
   * @throws 422 where there is no set to copy
   */
  async clone(
    user: SignedInUser,
    projectId: string,
    { limitSetId, title }: CloneLimitSet,
  ): Promise<LimitSet> {
    const original = await this.resolve(projectId, limitSetId);
    if (!original) {
      const message = `The project has no limit set ${limitSetId} to copy`;
      throw problem(422, 'limit-set-unknown', message, [{ path: 'limitSetId', message }]);
    }
    return this.insert({
      projectId,
      clonedFrom: original.id,
      definition: definitionFrom(cloneLimitSet(original, title), user.name, original),
      createdById: user.id,
    });
  }

  /**
   * A new version of a custom set; the earlier ones stay as they are.
   * @throws 409 for a version that is not the newest, and as `definitionFrom`
   */
  async addVersion(user: SignedInUser, id: string, input: CreateLimitSet): Promise<LimitSet> {
    const newId = await this.database.transaction(async (tx) => {
      const earlier = await this.repository.lockNewest(tx, id);
      if (earlier === undefined) throw noSuchSet();
      if (earlier.id !== id) {
        const detail = `Version ${earlier.version} is the newest by now; make the new version from that`;
        throw problem(409, 'limit-set-replaced', detail);
      }
      const made = await this.repository.insert(tx, {
        ...{ projectId: earlier.projectId, familyId: earlier.familyId, version: earlier.version + 1 },
        ...{ clonedFrom: earlier.clonedFrom, createdById: user.id },
        definition: definitionFrom(input, user.name, earlier.definition),
      });
      await this.repository.compareWith(tx, id, made);
      return made;
    });
    return toLimitSet(await this.custom(newId));
  }

  /** Retires a set with all its versions, or brings it back. */
  async update(id: string, { retired }: UpdateLimitSet): Promise<LimitSet> {
    const { familyId } = await this.custom(id);
    await this.database.transaction((tx) => this.repository.retire(tx, familyId, retired));
    return toLimitSet(await this.custom(id));
  }

  /**
   * Deletes one version of a set.
   * @throws 409 for one that an issued report refers to
   */
  async delete(id: string): Promise<void> {
    try {
      await this.database.transaction((tx) => this.repository.delete(tx, id));
    } catch (error) {
      if (!isKeptByReport(error)) throw error;
      const detail = 'An issued report refers to this limit set, which therefore stays; retire it instead';
      throw problem(409, 'in-issued-report', detail);
    }
  }

  private async insert(
    row: Omit<Parameters<LimitSetsRepository['insert']>[1], 'familyId'>,
  ): Promise<LimitSet> {
    const id = randomUUID();
    await this.database.transaction((tx) => this.repository.insert(tx, { ...row, id, familyId: id }));
    return toLimitSet(await this.custom(id));
  }

  private async custom(id: string): Promise<LimitSetRow> {
    const row = await this.findCustom(id);
    if (!row) throw noSuchSet();
    return row;
  }

  private async findCustom(id: string): Promise<LimitSetRow | undefined> {
    return uuid.safeParse(id).success ? this.repository.find(id) : undefined;
  }

  private async mayRead(user: SignedInUser, projectId: string): Promise<boolean> {
    const membership = await this.repository.roleIn(projectId, user.id);
    return membership !== undefined && holds('limit-set.read', membership.role, user.isAdministrator);
  }
}

const noSuchSet = () => problem(404, 'not-found', 'There is no such limit set');

const withPublished = (rows: LimitSetRow[]): LimitSetPage => ({
  items: [...publishedLimitSets, ...rows.map(toLimitSet)],
  nextCursor: null,
});
