import type { ReportContent, ReportEvent } from '@overtally/contracts';
import { sql } from 'drizzle-orm';
import {
  check,
  index,
  integer,
  jsonb,
  pgEnum,
  pgTable,
  primaryKey,
  text,
  unique,
  uuid,
} from 'drizzle-orm/pg-core';
import { createdAt, moment, updatedAt } from './columns.js';
import { users } from './identity.js';
import { verdicts } from './limits.js';
import { projects } from './projects.js';

export const reportStatus = pgEnum('report_status', ['draft', 'in-review', 'issued', 'superseded']);

/** A report; its content is kept from submission on, and once issued it is frozen with number and PDF. */
export const reports = pgTable(
  'reports',
  {
    id: uuid().primaryKey().defaultRandom(),
    projectId: uuid()
      .notNull()
      .references(() => projects.id),
    number: integer(),
    revision: integer().notNull().default(0),
    title: text().notNull(),
    summary: text().notNull().default(''),
    status: reportStatus().notNull().default('draft'),
    content: jsonb().$type<ReportContent>(),
    pdfKey: text(),
    pdfSha256: text(),
    preparedById: uuid()
      .notNull()
      .references(() => users.id),
    issuedById: uuid().references(() => users.id),
    issuedAt: moment(),
    createdAt,
    updatedAt,
  },
  (table) => [
    unique('reports_project_number_key').on(table.projectId, table.number, table.revision),
    check(
      'reports_issued_complete',
      sql`${table.status} not in ('issued', 'superseded') or (${table.number} is not null and ${table.content} is not null and ${table.pdfKey} is not null and ${table.pdfSha256} is not null and ${table.issuedById} is not null and ${table.issuedAt} is not null)`,
    ),
  ],
);

/** Verdicts a report speaks of, in order. A verdict in a report cannot be deleted. */
export const reportVerdicts = pgTable(
  'report_verdicts',
  {
    reportId: uuid()
      .notNull()
      .references(() => reports.id, { onDelete: 'cascade' }),
    verdictId: uuid()
      .notNull()
      .references(() => verdicts.id, { onDelete: 'restrict' }),
    position: integer().notNull(),
  },
  (table) => [
    primaryKey({ columns: [table.reportId, table.verdictId] }),
    index('report_verdicts_verdict_index').on(table.verdictId),
  ],
);

/** Who did what with a report, and when. */
export const reportEvents = pgTable(
  'report_events',
  {
    id: uuid().primaryKey().defaultRandom(),
    reportId: uuid()
      .notNull()
      .references(() => reports.id, { onDelete: 'cascade' }),
    kind: text().$type<ReportEvent['kind']>().notNull(),
    byId: uuid()
      .notNull()
      .references(() => users.id),
    comment: text().notNull().default(''),
    at: createdAt,
  },
  (table) => [index('report_events_report_index').on(table.reportId)],
);
