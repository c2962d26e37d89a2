import type { ReportContent, ReportEvent, ReportRecipient } from '@overtally/contracts';
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
  uniqueIndex,
  uuid,
  type AnyPgColumn,
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
    /** Additions to, deviations or exclusions from the method (ISO/IEC 17025:2017, 7.8.2.1 n). */
    deviations: text().notNull().default(''),
    recipients: jsonb().$type<ReportRecipient[]>().notNull().default([]),
    /** The issued revision that this one replaces once it is issued; it carries the same number. */
    replacesId: uuid().references((): AnyPgColumn => reports.id),
    /** Why a revision replaces its predecessor; null for the first. */
    revisionReason: text(),
    /** Why it was issued in spite of calibrations that were overdue; null where none was. */
    overdueReason: text(),
    status: reportStatus().notNull().default('draft'),
    content: jsonb().$type<ReportContent>(),
    pdfKey: text(),
    pdfSha256: text(),
    /** The machine-readable twin; null for reports that were issued before there was one. */
    jsonKey: text(),
    jsonSha256: text(),
    csvKey: text(),
    csvSha256: text(),
    /** Printed on the report; with the number it opens the public check page. */
    checkCode: text(),
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
    uniqueIndex('reports_check_code_key').on(table.checkCode),
    uniqueIndex('reports_replaces_key').on(table.replacesId),
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

/** A thing that an issued report speaks of. Such a thing cannot be deleted (triggers `keep_referred`). */
export const reportReferences = pgTable(
  'report_references',
  {
    reportId: uuid()
      .notNull()
      .references(() => reports.id, { onDelete: 'cascade' }),
    targetId: uuid().notNull(),
    kind: text().$type<ReportReferenceKind>().notNull(),
  },
  (table) => [
    primaryKey({ columns: [table.reportId, table.targetId] }),
    index('report_references_target_index').on(table.targetId),
  ],
);

export type ReportReferenceKind =
  | 'recording'
  | 'analysis'
  | 'note'
  | 'limit-set'
  | 'equipment'
  | 'operating-mode'
  | 'instrument'
  | 'calibration'
  | 'measuring-chain'
  | 'study'
  | 'study-version';
