import type { ImportOptions, Quantity, ReadProblem, ReadWarning, TestConditions } from '@overtally/contracts';
import { sql } from 'drizzle-orm';
import {
  bigint,
  check,
  doublePrecision,
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
import { equipment, operatingModes } from './equipment.js';
import { users } from './identity.js';
import { measuringChains } from './instruments.js';
import { projects } from './projects.js';

export const recordingStatus = pgEnum('recording_status', [
  'received',
  'reading',
  'analysing',
  'ready',
  'failed',
]);

/** Import options of a project for the files they fit. */
export const readingRules = pgTable(
  'reading_rules',
  {
    id: uuid().primaryKey().defaultRandom(),
    projectId: uuid()
      .notNull()
      .references(() => projects.id, { onDelete: 'cascade' }),
    name: text().notNull(),
    fileNamePattern: text().notNull(),
    columnNames: jsonb().$type<string[]>(),
    options: jsonb().$type<ImportOptions>().notNull(),
    createdById: uuid()
      .notNull()
      .references(() => users.id),
    createdAt,
    updatedAt,
  },
  (table) => [unique('reading_rules_project_name_key').on(table.projectId, table.name)],
);

/** One uploaded time record. The source file lies in storage under its SHA-256 and never changes. */
export const recordings = pgTable(
  'recordings',
  {
    id: uuid().primaryKey().defaultRandom(),
    projectId: uuid()
      .notNull()
      .references(() => projects.id, { onDelete: 'cascade' }),
    number: integer().notNull(),
    name: text().notNull(),
    eut: text().notNull().default(''),
    measuringChain: text().notNull().default(''),
    instrument: text().notNull().default(''),
    remark: text().notNull().default(''),
    capturedAt: moment(),
    equipmentId: uuid().references(() => equipment.id, { onDelete: 'restrict' }),
    operatingModeId: uuid().references(() => operatingModes.id, { onDelete: 'restrict' }),
    measuringChainId: uuid().references(() => measuringChains.id, { onDelete: 'restrict' }),
    conditions: jsonb().$type<TestConditions>().notNull().default({}),
    status: recordingStatus().notNull().default('received'),
    progress: doublePrecision().notNull().default(0),
    problem: jsonb().$type<ReadProblem>(),
    warnings: jsonb().$type<ReadWarning[]>().notNull().default([]),
    fileName: text().notNull(),
    fileSize: bigint({ mode: 'number' }).notNull(),
    fileSha256: text().notNull(),
    sourceKey: text().notNull(),
    importOptions: jsonb().$type<ImportOptions>().notNull().default({}),
    readingRuleId: uuid().references(() => readingRules.id, { onDelete: 'set null' }),
    /** Stays when the rule is deleted; null: the options came from a person or from the file alone. */
    readingRuleName: text(),
    /** The reading asked for last; one that was asked for before it is no longer wanted. */
    readId: uuid(),
    format: text(),
    metadata: jsonb().$type<Record<string, string>>().notNull().default({}),
    sampleRateHz: doublePrecision(),
    sampleCount: bigint({ mode: 'number' }),
    uploadedById: uuid()
      .notNull()
      .references(() => users.id),
    createdAt,
  },
  (table) => [
    unique('recordings_project_number_key').on(table.projectId, table.number),
    index('recordings_project_sha256_index').on(table.projectId, table.fileSha256),
    index('recordings_equipment_index').on(table.equipmentId),
    check('recordings_sha256_form', sql`${table.fileSha256} ~ '^[0-9a-f]{64}$'`),
  ],
);

/** One sampled quantity of a recording; its samples lie in storage as .npy, before gain and offset. */
export const channels = pgTable(
  'channels',
  {
    recordingId: uuid()
      .notNull()
      .references(() => recordings.id, { onDelete: 'cascade' }),
    index: integer().notNull(),
    name: text().notNull(),
    quantity: text().$type<Quantity>().notNull(),
    unit: text().notNull(),
    gain: doublePrecision().notNull().default(1),
    offset: doublePrecision().notNull().default(0),
    lowestCode: doublePrecision(),
    highestCode: doublePrecision(),
    missingValues: integer().notNull().default(0),
    /** Where it differs from the recording's. */
    measuringChainId: uuid().references(() => measuringChains.id, { onDelete: 'restrict' }),
    samplesKey: text().notNull(),
    pyramidKey: text().notNull(),
  },
  (table) => [primaryKey({ columns: [table.recordingId, table.index] })],
);
