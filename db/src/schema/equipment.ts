import type { EquipmentRatings } from '@overtally/contracts';
import { index, integer, jsonb, pgTable, text, unique, uuid } from 'drizzle-orm/pg-core';
import { createdAt, moment, updatedAt } from './columns.js';
import { users } from './identity.js';
import { projects } from './projects.js';

/** Equipment under test of a project, with what its rating plate says. */
export const equipment = pgTable(
  'equipment',
  {
    id: uuid().primaryKey().defaultRandom(),
    projectId: uuid()
      .notNull()
      .references(() => projects.id, { onDelete: 'cascade' }),
    name: text().notNull(),
    manufacturer: text().notNull().default(''),
    model: text().notNull().default(''),
    serialNumber: text().notNull().default(''),
    ratings: jsonb().$type<EquipmentRatings>().notNull().default({}),
    remark: text().notNull().default(''),
    /** ISO 7.8.2.1 h: the date of receipt, where it matters to the results; YYYY-MM-DD. */
    receivedOn: text(),
    retiredAt: moment(),
    createdById: uuid()
      .notNull()
      .references(() => users.id),
    createdAt,
    updatedAt,
  },
  (table) => [index('equipment_project_index').on(table.projectId)],
);

/** A way in which equipment is run while it is measured. */
export const operatingModes = pgTable(
  'operating_modes',
  {
    id: uuid().primaryKey().defaultRandom(),
    equipmentId: uuid()
      .notNull()
      .references(() => equipment.id, { onDelete: 'cascade' }),
    position: integer().notNull(),
    name: text().notNull(),
    description: text().notNull().default(''),
    retiredAt: moment(),
  },
  (table) => [unique('operating_modes_equipment_name_key').on(table.equipmentId, table.name)],
);
