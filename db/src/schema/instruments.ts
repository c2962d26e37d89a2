import type { InstrumentKind } from '@overtally/contracts';
import { sql } from 'drizzle-orm';
import {
  bigint,
  check,
  date,
  index,
  integer,
  pgTable,
  primaryKey,
  text,
  unique,
  uuid,
} from 'drizzle-orm/pg-core';
import { createdAt, moment, updatedAt } from './columns.js';
import { users } from './identity.js';

/** The laboratory that issues the reports; one row. */
export const laboratory = pgTable(
  'laboratory',
  {
    id: integer().primaryKey().default(1),
    name: text().notNull().default(''),
    address: text().notNull().default(''),
    contact: text().notNull().default(''),
    /** What the laboratory says of its accreditation; empty: none, and reports say so. */
    accreditation: text().notNull().default(''),
    updatedAt,
  },
  (table) => [check('laboratory_single_row', sql`${table.id} = 1`)],
);

/** A transducer, recorder or source of the laboratory, shared by all its projects. */
export const instruments = pgTable(
  'instruments',
  {
    id: uuid().primaryKey().defaultRandom(),
    kind: text().$type<InstrumentKind>().notNull(),
    name: text().notNull(),
    manufacturer: text().notNull().default(''),
    model: text().notNull().default(''),
    serialNumber: text().notNull(),
    remark: text().notNull().default(''),
    /** Who is told when calibration is due; null: the administrators. */
    responsibleId: uuid().references(() => users.id),
    retiredAt: moment(),
    createdById: uuid()
      .notNull()
      .references(() => users.id),
    createdAt,
    updatedAt,
  },
  (table) => [unique('instruments_model_serial_key').on(table.manufacturer, table.model, table.serialNumber)],
);

/** A calibration of an instrument; that of the latest date before a measurement counts for it. */
export const calibrations = pgTable(
  'calibrations',
  {
    id: uuid().primaryKey().defaultRandom(),
    instrumentId: uuid()
      .notNull()
      .references(() => instruments.id, { onDelete: 'cascade' }),
    calibratedOn: date({ mode: 'string' }).notNull(),
    dueOn: date({ mode: 'string' }).notNull(),
    certificateNumber: text().notNull().default(''),
    calibratedBy: text().notNull().default(''),
    /** As the certificate states it, with its coverage factor. */
    uncertainty: text().notNull().default(''),
    remark: text().notNull().default(''),
    certificateKey: text(),
    certificateName: text(),
    certificateSize: bigint({ mode: 'number' }),
    certificateSha256: text(),
    dueNoticeSentAt: moment(),
    createdById: uuid()
      .notNull()
      .references(() => users.id),
    createdAt,
  },
  (table) => [
    index('calibrations_instrument_index').on(table.instrumentId, table.calibratedOn),
    check('calibrations_due_after', sql`${table.dueOn} > ${table.calibratedOn}`),
    check(
      'calibrations_certificate_complete',
      sql`num_nulls(${table.certificateKey}, ${table.certificateName}, ${table.certificateSize}, ${table.certificateSha256}) in (0, 4)`,
    ),
  ],
);

/** The instruments between a quantity and its samples, in their order from the quantity on. */
export const measuringChains = pgTable(
  'measuring_chains',
  {
    id: uuid().primaryKey().defaultRandom(),
    name: text().notNull(),
    description: text().notNull().default(''),
    retiredAt: moment(),
    createdById: uuid()
      .notNull()
      .references(() => users.id),
    createdAt,
    updatedAt,
  },
  (table) => [unique('measuring_chains_name_key').on(table.name)],
);

export const measuringChainInstruments = pgTable(
  'measuring_chain_instruments',
  {
    chainId: uuid()
      .notNull()
      .references(() => measuringChains.id, { onDelete: 'cascade' }),
    position: integer().notNull(),
    instrumentId: uuid()
      .notNull()
      .references(() => instruments.id, { onDelete: 'restrict' }),
  },
  (table) => [
    primaryKey({ columns: [table.chainId, table.position] }),
    index('measuring_chain_instruments_instrument_index').on(table.instrumentId),
  ],
);
