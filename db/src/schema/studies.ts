import type { StudyDefinition, StudyResult, StudySeries } from '@overtally/contracts';
import { index, integer, jsonb, pgTable, primaryKey, text, unique, uuid } from 'drizzle-orm/pg-core';
import { createdAt, moment } from './columns.js';
import { users } from './identity.js';
import { projects } from './projects.js';
import { reports } from './reports.js';

/** A prediction of what stages H(s) do to a periodic signal; what it says lies in its versions. */
export const studies = pgTable(
  'studies',
  {
    id: uuid().primaryKey().defaultRandom(),
    projectId: uuid()
      .notNull()
      .references(() => projects.id, { onDelete: 'cascade' }),
    number: integer().notNull(),
    name: text().notNull(),
    retiredAt: moment(),
    createdAt,
  },
  (table) => [unique('studies_project_number_key').on(table.projectId, table.number)],
);

/** A study as it was saved; never changed, only followed by another version. */
export const studyVersions = pgTable(
  'study_versions',
  {
    id: uuid().primaryKey().defaultRandom(),
    studyId: uuid()
      .notNull()
      .references(() => studies.id, { onDelete: 'cascade' }),
    version: integer().notNull(),
    definition: jsonb().$type<StudyDefinition>().notNull(),
    /** The harmonics that it starts from, whatever becomes of the analysis they were taken from. */
    series: jsonb().$type<StudySeries>().notNull(),
    result: jsonb().$type<StudyResult>().notNull(),
    comment: text().notNull().default(''),
    authorId: uuid()
      .notNull()
      .references(() => users.id),
    createdAt,
  },
  (table) => [unique('study_versions_study_version_key').on(table.studyId, table.version)],
);

/** Studies that a report shows as predictions, in order. */
export const reportStudies = pgTable(
  'report_studies',
  {
    reportId: uuid()
      .notNull()
      .references(() => reports.id, { onDelete: 'cascade' }),
    studyVersionId: uuid()
      .notNull()
      .references(() => studyVersions.id, { onDelete: 'restrict' }),
    position: integer().notNull(),
  },
  (table) => [
    primaryKey({ columns: [table.reportId, table.studyVersionId] }),
    index('report_studies_version_index').on(table.studyVersionId),
  ],
);
