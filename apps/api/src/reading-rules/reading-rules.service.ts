import { Inject, Injectable } from '@nestjs/common';
import type { CreateReadingRule, ReadingRule, UpdateReadingRule } from '@overtally/contracts';
import type { Database, Tx } from '@overtally/db';
import { problem } from '../common/problem.js';
import { DATABASE } from '../database/database.tokens.js';
import { isUniqueViolation } from '../database/unique-violation.js';
import { statesOptions, type ChosenReading, type StatedReading } from './choose-options.js';
import { inOrder } from './fitting-rule.js';
import {
  ReadingRulesRepository,
  type ReadingRuleRecord,
  type ReadingRuleRow,
} from './reading-rules.repository.js';

/** Each is tried against every new file, and the list holds them all. */
const maxRules = 200;

/** Import options that a project keeps for the files they fit. */
@Injectable()
export class ReadingRulesService {
  constructor(
    @Inject(DATABASE) private readonly database: Database,
    private readonly repository: ReadingRulesRepository,
  ) {}

  /** All rules of a project in the order they are tried. */
  async list(projectId: string): Promise<{ items: ReadingRule[]; nextCursor: null }> {
    const records = await this.repository.recordsOfProject(projectId);
    return { items: inOrder(records).map(toReadingRule), nextCursor: null };
  }

  /** @throws 409 when the project has a rule of that name, or as many rules as it may */
  async create(projectId: string, userId: string, rule: CreateReadingRule): Promise<ReadingRule> {
    const id = await unlessNameTaken(rule.name, () =>
      this.database.transaction(async (tx) => {
        if ((await this.repository.countOf(tx, projectId)) >= maxRules) {
          const detail = `The project has ${maxRules} reading rules, as many as it may; delete one first`;
          throw problem(409, 'too-many-rules', detail);
        }
        return this.repository.insert(tx, { ...rule, projectId, createdById: userId });
      }),
    );
    return this.get(id);
  }

  /**
   * Changes a rule for the files that come; recordings stay as they were read.
   * @throws 409 when the project has another rule of that name
   */
  async update(id: string, change: UpdateReadingRule): Promise<ReadingRule> {
    await unlessNameTaken(change.name, () =>
      this.database.transaction((tx) => this.repository.update(tx, id, change)),
    );
    return this.get(id);
  }

  /** Deletes a rule; recordings that were read by it keep its name. */
  async delete(id: string): Promise<void> {
    await this.database.transaction((tx) => this.repository.delete(tx, id));
  }

  /**
   * The rules that come into question for a file: none where its options are stated or no rule is wanted, the named one
   * where one is named, else all of the project.
   * @throws 400 when the named rule is none of the project
   */
  async candidates(projectId: string, stated: StatedReading): Promise<ReadingRuleRow[]> {
    const { readingRuleId } = stated;
    if (readingRuleId === null) return [];
    if (readingRuleId === undefined) {
      return statesOptions(stated) ? [] : this.repository.ofProject(projectId);
    }
    const rule = await this.repository.find(projectId, readingRuleId);
    if (rule !== undefined) return [rule];
    const message = 'The project has no such reading rule; name another one, or none';
    throw problem(400, 'invalid-request', message, [{ path: 'readingRuleId', message }]);
  }

  /** The rule as the row of a recording names it. A rule that was deleted meanwhile leaves its name. */
  async reference(tx: Tx, rule: ChosenReading['readingRule']) {
    if (rule === null) return { readingRuleId: null, readingRuleName: null };
    const isThere = await this.repository.hold(tx, rule.id);
    return { readingRuleId: isThere ? rule.id : null, readingRuleName: rule.name };
  }

  private async get(id: string): Promise<ReadingRule> {
    const record = await this.repository.record(id);
    if (record === undefined) throw problem(404, 'not-found', 'There is no such reading rule');
    return toReadingRule(record);
  }
}

function toReadingRule(record: ReadingRuleRecord): ReadingRule {
  const { createdById, creatorName, createdAt, updatedAt, ...rule } = record;
  return {
    ...rule,
    createdBy: { id: createdById, name: creatorName },
    createdAt: createdAt.toISOString(),
    updatedAt: updatedAt.toISOString(),
  };
}

async function unlessNameTaken<T>(name: string | undefined, work: () => Promise<T>): Promise<T> {
  try {
    return await work();
  } catch (error) {
    if (!isUniqueViolation(error, 'reading_rules_project_name_key')) throw error;
    const message = `The project has a reading rule named “${name}” already; choose another name`;
    throw problem(409, 'name-taken', message, [{ path: 'name', message }]);
  }
}
