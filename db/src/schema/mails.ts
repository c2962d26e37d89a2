import type { MailAttachment, MailKind, MailStatus } from '@overtally/contracts';
import { index, integer, jsonb, pgTable, text, uniqueIndex, uuid } from 'drizzle-orm/pg-core';
import { createdAt, moment } from './columns.js';
import { users } from './identity.js';
import { projectRole, projects } from './projects.js';
import { reports } from './reports.js';

/**
 * E-mail that the product sends, one row a recipient. A link with a secret is not kept: `text` and `html` hold the place
 * where it goes, and it is derived anew when the message goes out.
 */
export const mails = pgTable(
  'mails',
  {
    id: uuid().primaryKey().defaultRandom(),
    kind: text().$type<MailKind>().notNull(),
    projectId: uuid().references(() => projects.id, { onDelete: 'cascade' }),
    reportId: uuid().references(() => reports.id, { onDelete: 'set null' }),
    toAddress: text().notNull(),
    toName: text().notNull().default(''),
    subject: text().notNull(),
    text: text().notNull(),
    html: text().notNull(),
    attachments: jsonb().$type<MailAttachment[]>().notNull().default([]),
    /** What a secret link in the message is for: the row whose token it carries; null without one. */
    invitationId: uuid().references(() => invitations.id, { onDelete: 'cascade' }),
    passwordResetId: uuid().references(() => passwordResets.id, { onDelete: 'cascade' }),
    status: text().$type<MailStatus>().notNull().default('queued'),
    attempts: integer().notNull().default(0),
    lastError: text(),
    createdAt,
    lastAttemptAt: moment(),
    sentAt: moment(),
  },
  (table) => [
    index('mails_created_index').on(table.createdAt),
    index('mails_report_index').on(table.reportId),
  ],
);

/** An invitation to a project; the link works once and until it expires. */
export const invitations = pgTable(
  'invitations',
  {
    id: uuid().primaryKey().defaultRandom(),
    projectId: uuid()
      .notNull()
      .references(() => projects.id, { onDelete: 'cascade' }),
    email: text().notNull(),
    role: projectRole().notNull(),
    tokenSha256: text().notNull(),
    invitedById: uuid()
      .notNull()
      .references(() => users.id),
    createdAt,
    expiresAt: moment().notNull(),
    acceptedAt: moment(),
    acceptedById: uuid().references(() => users.id),
    revokedAt: moment(),
  },
  (table) => [
    uniqueIndex('invitations_token_key').on(table.tokenSha256),
    index('invitations_project_index').on(table.projectId),
  ],
);

/** A password that may be set anew by whoever reads the person's mail; once and until it expires. */
export const passwordResets = pgTable(
  'password_resets',
  {
    id: uuid().primaryKey().defaultRandom(),
    userId: uuid()
      .notNull()
      .references(() => users.id),
    tokenSha256: text().notNull(),
    createdAt,
    expiresAt: moment().notNull(),
    usedAt: moment(),
  },
  (table) => [
    uniqueIndex('password_resets_token_key').on(table.tokenSha256),
    index('password_resets_user_index').on(table.userId),
  ],
);
