import type { Settings } from '@overtally/contracts';
import { boolean, index, integer, jsonb, pgEnum, pgTable, primaryKey, text, uuid } from 'drizzle-orm/pg-core';
import { createdAt, moment } from './columns.js';
import { users } from './identity.js';

export const projectRole = pgEnum('project_role', ['technician', 'analyst', 'manager', 'guest']);

/** One job for one customer or product. The counters hand out recording and report numbers without gaps. */
export const projects = pgTable('projects', {
  id: uuid().primaryKey().defaultRandom(),
  name: text().notNull(),
  customer: text().notNull().default(''),
  /** Address and person of the customer, as the report states them. */
  customerContact: text().notNull().default(''),
  description: text().notNull().default(''),
  defaultSettings: jsonb().$type<Settings>().notNull(),
  comparisonLimitSetId: text(),
  /** Whether who prepared or submitted a report may issue it, where a laboratory has nobody else. */
  preparerMayIssue: boolean().notNull().default(false),
  lastRecordingNumber: integer().notNull().default(0),
  lastReportNumber: integer().notNull().default(0),
  lastStudyNumber: integer().notNull().default(0),
  archivedAt: moment(),
  createdById: uuid()
    .notNull()
    .references(() => users.id),
  createdAt,
});

export const members = pgTable(
  'members',
  {
    projectId: uuid()
      .notNull()
      .references(() => projects.id, { onDelete: 'cascade' }),
    userId: uuid()
      .notNull()
      .references(() => users.id),
    role: projectRole().notNull(),
    addedAt: createdAt,
  },
  (table) => [
    primaryKey({ columns: [table.projectId, table.userId] }),
    index('members_user_index').on(table.userId),
  ],
);
