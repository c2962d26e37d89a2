import { Inject, Injectable } from '@nestjs/common';
import { holds, type CreateLimitSet, type LimitBasis, type LimitSet } from '@overtally/contracts';
import type { Database } from '@overtally/db';
import { findPublishedLimitSet, neededParameters, publishedLimitSets } from '@overtally/limits';
import { randomUUID } from 'node:crypto';
import { z } from 'zod';
import { problem } from '../common/problem.js';
import type { SignedInUser } from '../common/request.js';
import { DATABASE } from '../database/database.tokens.js';
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

  /** Published sets and the custom ones a person may see, of one project or of all own ones. */
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
    if (!row || !(await this.mayRead(user, row.projectId))) {
      throw problem(404, 'not-found', 'There is no such limit set');
    }
    return toLimitSet(row);
  }

  /** The set that a verdict in a project may use; undefined for an unknown one and for another project's. */
  async resolve(projectId: string, id: string): Promise<LimitSet | undefined> {
    const published = findPublishedLimitSet(id);
    if (published) return published;
    const row = await this.findCustom(id);
    return row?.projectId === projectId ? toLimitSet(row) : undefined;
  }

  async create(user: SignedInUser, projectId: string, input: CreateLimitSet): Promise<LimitSet> {
    if (input.basis === 'absolute' && input.unit === '') {
      const message = 'Give the unit of the limits, such as A or V';
      throw problem(422, 'unit-missing', message, [{ path: 'unit', message }]);
    }
    const id = randomUUID();
    const row = await this.database.transaction((tx) =>
      this.repository.insert(tx, {
        id,
        familyId: id,
        projectId,
        definition: definitionFrom(input, user.name),
        createdById: user.id,
      }),
    );
    return toLimitSet(row);
  }

  async delete(id: string): Promise<void> {
    await this.database.transaction((tx) => this.repository.delete(tx, id));
  }

  private async findCustom(id: string): Promise<LimitSetRow | undefined> {
    return uuid.safeParse(id).success ? this.repository.find(id) : undefined;
  }

  private async mayRead(user: SignedInUser, projectId: string): Promise<boolean> {
    const membership = await this.repository.roleIn(projectId, user.id);
    return membership !== undefined && holds('limit-set.read', membership.role, user.isAdministrator);
  }
}

const toLimitSet = ({ id, projectId, definition }: LimitSetRow): LimitSet => ({
  id,
  projectId,
  ...definition,
});

const withPublished = (rows: LimitSetRow[]): LimitSetPage => ({
  items: [...publishedLimitSets, ...rows.map(toLimitSet)],
  nextCursor: null,
});

const unitOfBasis: Readonly<Record<LimitBasis, string | null>> = {
  absolute: null,
  'percent-of-fundamental': '%',
  'percent-of-reference': '%',
  'milliampere-per-watt': 'mA/W',
};

/** A custom set is compared plainly, order by order, unless it says otherwise; TDD needs the demand current. */
function definitionFrom(input: CreateLimitSet, author: string): LimitSetRow['definition'] {
  const { source, orders, unit, referenceParameter = null, procedure = 'plain', ...rest } = input;
  const definition: LimitSetRow['definition'] = {
    ...rest,
    unit: unitOfBasis[input.basis] ?? unit,
    version: 1,
    tableRef: '',
    referenceParameter,
    procedure,
    parameters: [],
    orders: [...orders].sort((one, other) => one.order - other.order),
    source: [source],
    confidence: 'medium',
    evidence: `Entered in the project by ${author}; to be checked against its source`,
    notes: [],
  };
  return { ...definition, parameters: neededParameters(definition) };
}
