import type {
  DecisionRule,
  LimitSet,
  RepeatOrder,
  SupplyVerdict,
  OrderVerdict,
  TotalVerdict,
  VerdictParameters,
  VerdictResult,
} from '@overtally/contracts';
import { index, integer, jsonb, pgTable, primaryKey, text, unique, uuid } from 'drizzle-orm/pg-core';
import { analyses } from './analyses.js';
import { createdAt, moment } from './columns.js';
import { users } from './identity.js';
import { projects } from './projects.js';

/** Custom limit sets of a project; published sets are data in the limits package. */
export const limitSets = pgTable(
  'limit_sets',
  {
    id: uuid().primaryKey().defaultRandom(),
    projectId: uuid()
      .notNull()
      .references(() => projects.id, { onDelete: 'cascade' }),
    /** The same for all versions of a set: the id of its first version. */
    familyId: uuid().notNull(),
    version: integer().notNull().default(1),
    /** The set it was made from, published or of the same project. */
    clonedFrom: text(),
    definition: jsonb().$type<Omit<LimitSet, 'id' | 'projectId'>>().notNull(),
    /** No longer offered for new verdicts. */
    retiredAt: moment(),
    createdById: uuid()
      .notNull()
      .references(() => users.id),
    createdAt,
  },
  (table) => [
    index('limit_sets_project_index').on(table.projectId),
    unique('limit_sets_family_version_key').on(table.familyId, table.version),
  ],
);

/** A limit set applied to one channel of an analysis by a decision rule. Never changed. */
export const verdicts = pgTable(
  'verdicts',
  {
    id: uuid().primaryKey().defaultRandom(),
    analysisId: uuid()
      .notNull()
      .references(() => analyses.id, { onDelete: 'cascade' }),
    channelIndex: integer().notNull(),
    limitSetId: text().notNull(),
    limitSet: jsonb().$type<LimitSet>().notNull(),
    parameters: jsonb().$type<VerdictParameters>().notNull(),
    decisionRule: text().$type<DecisionRule>().notNull(),
    decisionRuleText: text().notNull(),
    result: text().$type<VerdictResult>().notNull(),
    reason: text().notNull(),
    orders: jsonb().$type<OrderVerdict[]>().notNull(),
    totals: jsonb().$type<TotalVerdict[]>().notNull(),
    /** The test voltage against what the standard asks of it; null where nothing is asked or nothing was recorded. */
    supply: jsonb().$type<SupplyVerdict>(),
    /** Spread of each order over the repeats; null for a verdict over one analysis. */
    repeatability: jsonb().$type<{ isRepeatable: boolean | null; orders: RepeatOrder[] }>(),
    authorId: uuid()
      .notNull()
      .references(() => users.id),
    createdAt,
  },
  (table) => [index('verdicts_analysis_index').on(table.analysisId)],
);

/** The analyses that a verdict over several repeats of one test is made of, the verdict's own among them. */
export const verdictRepeats = pgTable(
  'verdict_repeats',
  {
    verdictId: uuid()
      .notNull()
      .references(() => verdicts.id, { onDelete: 'cascade' }),
    position: integer().notNull(),
    analysisId: uuid()
      .notNull()
      .references(() => analyses.id, { onDelete: 'restrict' }),
    channelIndex: integer().notNull(),
    result: text().$type<VerdictResult>().notNull(),
    reason: text().notNull(),
  },
  (table) => [
    primaryKey({ columns: [table.verdictId, table.position] }),
    index('verdict_repeats_analysis_index').on(table.analysisId),
  ],
);
