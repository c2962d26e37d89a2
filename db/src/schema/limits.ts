import type {
  DecisionRule,
  LimitSet,
  OrderVerdict,
  TotalVerdict,
  VerdictParameters,
  VerdictResult,
} from '@overtally/contracts';
import { index, integer, jsonb, pgTable, text, uuid } from 'drizzle-orm/pg-core';
import { analyses } from './analyses.js';
import { createdAt } from './columns.js';
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
    definition: jsonb().$type<Omit<LimitSet, 'id' | 'projectId'>>().notNull(),
    createdById: uuid()
      .notNull()
      .references(() => users.id),
    createdAt,
  },
  (table) => [index('limit_sets_project_index').on(table.projectId)],
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
    authorId: uuid()
      .notNull()
      .references(() => users.id),
    createdAt,
  },
  (table) => [index('verdicts_analysis_index').on(table.analysisId)],
);
