import { Inject, Injectable } from '@nestjs/common';
import type { MailKind, MailStatus } from '@overtally/contracts';
import { schema, type Database, type Tx } from '@overtally/db';
import { and, desc, eq, sql, type SQL } from 'drizzle-orm';
import { DATABASE } from '../database/database.tokens.js';
import type { SecretPurpose } from './secret-links.js';

const { invitations, laboratory, mails, passwordResets } = schema;

export type MailRow = typeof mails.$inferSelect;
export type NewMailRow = typeof mails.$inferInsert;

/** Where a page of the list begins: behind the message made then, with this id. */
export interface MailPlace {
  createdAt: string;
  id: string;
}

/** What the secret of a message opens, and whether it still does. */
export interface SecretRow {
  purpose: SecretPurpose;
  id: string;
  tokenSha256: string;
  expiresAt: Date;
  usedAt: Date | null;
  revokedAt: Date | null;
}

@Injectable()
export class MailsRepository {
  constructor(@Inject(DATABASE) private readonly database: Database) {}

  async insert(tx: Tx, row: NewMailRow): Promise<void> {
    await tx.insert(mails).values(row);
  }

  async find(id: string): Promise<MailRow | undefined> {
    const [row] = await this.database.select().from(mails).where(eq(mails.id, id));
    return row;
  }

  /** Messages, the newest first, from behind `after`. */
  list(where: MailFilter, after: MailPlace | undefined, limit: number): Promise<MailRow[]> {
    const behind =
      after && sql`(${mails.createdAt}, ${mails.id}) < (${after.createdAt}::timestamptz, ${after.id}::uuid)`;
    return this.database
      .select()
      .from(mails)
      .where(and(...conditions(where), behind))
      .orderBy(desc(mails.createdAt), desc(mails.id))
      .limit(limit);
  }

  /**
   * The message, held until the transaction ends.
   * @throws the database's error 55P03 while somebody else holds it
   */
  async hold(tx: Tx, id: string): Promise<MailRow | undefined> {
    const [row] = await tx.select().from(mails).where(eq(mails.id, id)).for('update', { noWait: true });
    return row;
  }

  async update(tx: Tx, id: string, change: Partial<NewMailRow>): Promise<void> {
    await tx.update(mails).set(change).where(eq(mails.id, id));
  }

  /** What the secret of the message opens; undefined for a message without one. */
  async secretOf({ invitationId, passwordResetId }: MailRow): Promise<SecretRow | undefined> {
    if (invitationId !== null) {
      const [row] = await this.database.select().from(invitations).where(eq(invitations.id, invitationId));
      return row && { ...row, purpose: 'invitation', usedAt: row.acceptedAt };
    }
    if (passwordResetId === null) return undefined;
    const [row] = await this.database
      .select()
      .from(passwordResets)
      .where(eq(passwordResets.id, passwordResetId));
    return row && { ...row, purpose: 'password-reset', revokedAt: null };
  }

  /** The name of the laboratory; empty while nobody gave one. */
  async laboratoryName(tx: Tx): Promise<string> {
    const [row] = await tx.select({ name: laboratory.name }).from(laboratory);
    return row?.name ?? '';
  }
}

/** Which messages are meant. */
export interface MailFilter {
  status?: MailStatus | undefined;
  kind?: MailKind;
  reportId?: string;
}

function conditions({ status, kind, reportId }: MailFilter): (SQL | undefined)[] {
  return [
    status && eq(mails.status, status),
    kind && eq(mails.kind, kind),
    reportId === undefined ? undefined : eq(mails.reportId, reportId),
  ];
}
