import { sql } from 'drizzle-orm';
import {
  bigint,
  boolean,
  check,
  index,
  integer,
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
  (table) => [
    index('sessions_expire_index').on(table.expire),
    index('sessions_user_index').on(sql`(${table.sess} ->> 'userId')`),
  ],
);

/** Keys with which a person's scripts act as that person. The secret itself is not kept, only its hash. */
export const accessKeys = pgTable(
  'access_keys',
  {
    id: uuid().primaryKey().defaultRandom(),
    userId: uuid()
      .notNull()
      .references(() => users.id),
    name: text().notNull(),
    prefix: text().notNull(),
    secretSha256: text().notNull(),
    createdAt,
    lastUsedAt: moment(),
    expiresAt: moment(),
  },
  (table) => [
    uniqueIndex('access_keys_secret_key').on(table.secretSha256),
    index('access_keys_user_index').on(table.userId, table.createdAt),
    check('access_keys_sha256_form', sql`${table.secretSha256} ~ '^[0-9a-f]{64}$'`),
  ],
);

/**
 * Failed sign-ins within a time window, by hashed e-mail and address and by address alone.
 * The limiter inserts by position, so the order of the columns matters; `expire` is in ms since 1970.
 */
export const signInLimits = pgTable('sign_in_limits', {
  key: varchar({ length: 255 }).primaryKey(),
  points: integer().notNull().default(0),
  expire: bigint({ mode: 'number' }),
});
