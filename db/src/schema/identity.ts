import { sql } from 'drizzle-orm';
import {
  boolean,
  check,
  index,
  json,
  pgTable,
  text,
  timestamp,
  uniqueIndex,
  uuid,
  varchar,
} from 'drizzle-orm/pg-core';
import { createdAt, moment } from './columns.js';

/** A person who may sign in. Never deleted, since reports and notes name them: disabled instead. */
export const users = pgTable(
  'users',
  {
    id: uuid().primaryKey().defaultRandom(),
    email: text().notNull(),
    name: text().notNull(),
    passwordHash: text().notNull(),
    isAdministrator: boolean().notNull().default(false),
    disabledAt: moment(),
    createdAt,
  },
  (table) => [
    uniqueIndex('users_email_key').on(table.email),
    check('users_email_lower_case', sql`${table.email} = lower(${table.email})`),
  ],
);

/** Sign-in sessions; columns as the session store expects them. */
export const sessions = pgTable(
  'sessions',
  {
    sid: varchar().primaryKey(),
    sess: json().notNull(),
    expire: timestamp({ precision: 6 }).notNull(),
  },
  (table) => [index('sessions_expire_index').on(table.expire)],
);
