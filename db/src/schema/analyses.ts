import type {
  ChannelAnalysis,
  Flag,
  PowerPair,
  Quantity,
  ReadProblem,
  Settings,
  Statistics,
  ThreePhase,
} from '@overtally/contracts';
import {
  doublePrecision,
  foreignKey,
  index,
  integer,
  jsonb,
  pgEnum,
  pgTable,
  primaryKey,
  text,
  uuid,
  type AnyPgColumn,
} from 'drizzle-orm/pg-core';
import { createdAt, moment, updatedAt } from './columns.js';
import { users } from './identity.js';
import { recordings } from './recordings.js';

export const analysisStatus = pgEnum('analysis_status', ['queued', 'running', 'done', 'failed']);

/** One computation over a recording with stated settings; never edited, only superseded. */
export const analyses = pgTable(
  'analyses',
  {
    id: uuid().primaryKey().defaultRandom(),
    recordingId: uuid()
      .notNull()
      .references(() => recordings.id, { onDelete: 'cascade' }),
    status: analysisStatus().notNull().default('queued'),
    progress: doublePrecision().notNull().default(0),
    problem: jsonb().$type<ReadProblem>(),
    engineVersion: text(),
    settings: jsonb().$type<Settings>().notNull(),
    power: jsonb().$type<PowerPair[]>().notNull().default([]),
    threePhase: jsonb().$type<ThreePhase[]>().notNull().default([]),
    supersededById: uuid().references((): AnyPgColumn => analyses.id, { onDelete: 'set null' }),
    cancelRequestedAt: moment(),
    startedById: uuid()
      .notNull()
      .references(() => users.id),
    createdAt,
    finishedAt: moment(),
  },
  (table) => [index('analyses_recording_index').on(table.recordingId, table.createdAt)],
);

/** What the stored series of a channel hold, one value a window; see `seriesLayout` of the API for their places. */
export interface StoredSeries {
  /** Windows. */
  count: number;
  intervalS: number;
  /** Orders 1.. followed. */
  orders: number;
  /** Gaps between orders 0 and 1, 1 and 2, … followed. */
  interharmonics: number;
  /** Centres of the 200 Hz bands followed. */
  bandCentresHz: number[];
}

/**
 * Figures of one channel of an analysis; spectrum and series lie in storage. Columns that may be null or empty also
 * stand for figures that were not yet computed when the analysis was made.
 */
export const analysisChannels = pgTable(
  'analysis_channels',
  {
    analysisId: uuid()
      .notNull()
      .references(() => analyses.id, { onDelete: 'cascade' }),
    index: integer().notNull(),
    name: text().notNull(),
    quantity: text().$type<Quantity>().notNull(),
    unit: text().notNull(),
    mean: doublePrecision(),
    rms: doublePrecision(),
    peak: doublePrecision(),
    crestFactor: doublePrecision(),
    formFactor: doublePrecision(),
    fundamental: jsonb().$type<NonNullable<ChannelAnalysis['fundamental']>>(),
    thdFPercent: doublePrecision(),
    thdRPercent: doublePrecision(),
    thdMaxOrder: integer().notNull(),
    thdPlusNPercent: doublePrecision(),
    sinadDb: doublePrecision(),
    snrDb: doublePrecision(),
    sfdrDb: doublePrecision(),
    enobBits: doublePrecision(),
    tone: jsonb().$type<NonNullable<ChannelAnalysis['tone']>>(),
    distortion: jsonb().$type<NonNullable<ChannelAnalysis['distortion']>>(),
    bands: jsonb().$type<ChannelAnalysis['bands']>().notNull().default([]),
    countedFrequency: jsonb().$type<ChannelAnalysis['countedFrequency']>().notNull().default([]),
    lines: jsonb().$type<ChannelAnalysis['lines']>().notNull().default([]),
    families: jsonb().$type<ChannelAnalysis['families']>().notNull().default([]),
    uncertainty: jsonb().$type<ChannelAnalysis['uncertainty']>().notNull().default({}),
    interharmonics: jsonb().$type<ChannelAnalysis['interharmonics']>().notNull().default([]),
    windows: jsonb().$type<NonNullable<ChannelAnalysis['windows']>>(),
    flags: jsonb().$type<Flag[]>().notNull().default([]),
    spectrumKey: text().notNull(),
    spectrumWindow: text().notNull(),
    spectrumStartHz: doublePrecision().notNull(),
    spectrumStepHz: doublePrecision().notNull(),
    spectrumNoiseBandwidthHz: doublePrecision(),
    spectrumSegments: integer(),
    seriesKey: text(),
    series: jsonb().$type<StoredSeries>(),
  },
  (table) => [primaryKey({ columns: [table.analysisId, table.index] })],
);

/** One order of one channel of an analysis. */
export const harmonics = pgTable(
  'harmonics',
  {
    analysisId: uuid().notNull(),
    channelIndex: integer().notNull(),
    order: integer().notNull(),
    frequencyHz: doublePrecision().notNull(),
    rms: doublePrecision().notNull(),
    percentOfFundamental: doublePrecision(),
    phaseDeg: doublePrecision(),
    phaseZeroCrossingDeg: doublePrecision(),
    groupRms: doublePrecision(),
    subgroupRms: doublePrecision(),
    smoothedMeanRms: doublePrecision(),
    smoothedMaxRms: doublePrecision(),
    uncertainty: doublePrecision(),
    groupStatistics: jsonb().$type<Statistics>(),
    subgroupStatistics: jsonb().$type<Statistics>(),
  },
  (table) => [
    primaryKey({ columns: [table.analysisId, table.channelIndex, table.order] }),
    foreignKey({
      columns: [table.analysisId, table.channelIndex],
      foreignColumns: [analysisChannels.analysisId, analysisChannels.index],
      name: 'harmonics_channel_fkey',
    }).onDelete('cascade'),
  ],
);

export const noteKind = pgEnum('note_kind', ['order', 'line', 'span']);

/** An annotation on an order, a line or a time span of an analysis. */
export const notes = pgTable(
  'notes',
  {
    id: uuid().primaryKey().defaultRandom(),
    analysisId: uuid()
      .notNull()
      .references(() => analyses.id, { onDelete: 'cascade' }),
    channelIndex: integer().notNull(),
    kind: noteKind().notNull(),
    order: integer(),
    frequencyHz: doublePrecision(),
    fromS: doublePrecision(),
    toS: doublePrecision(),
    text: text().notNull(),
    cause: text().notNull().default(''),
    authorId: uuid()
      .notNull()
      .references(() => users.id),
    createdAt,
    updatedAt,
  },
  (table) => [index('notes_analysis_index').on(table.analysisId)],
);
