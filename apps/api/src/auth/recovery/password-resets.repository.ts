import { Inject, Injectable } from '@nestjs/common';
import { schema, type Database, type Tx } from '@overtally/db';
import { and, eq, gt, isNull } from 'drizzle-orm';
import { DATABASE } from '../../database/database.tokens.js';

const { accessKeys, passwordResets, users } = schema;

/** Links with which a password may be set anew. */
@Injectable()
export class PasswordResetsRepository {
  constructor(@Inject(DATABASE) private readonly database: Database) {}

  /** The account of an address, held until the transaction ends; undefined once disabled. */
  async holdAccount(tx: Tx, email: string) {
    const [row] = await tx
      .select({ id: users.id, name: users.name, email: users.email })
      .from(users)
      .where(and(eq(users.email, email), isNull(users.disabledAt)))
      .for('update');
    return row;
  }

  /** How many links a person was sent since a moment. */
  countSince(tx: Tx, userId: string, since: Date): Promise<number> {
    return tx.$count(
      passwordResets,
      and(eq(passwordResets.userId, userId), gt(passwordResets.createdAt, since)),
    );
  }

  async insert(tx: Tx, row: typeof passwordResets.$inferInsert): Promise<void> {
    await tx.insert(passwordResets).values(row);
  }

  /** Whether a secret opens an account now. */
  async isOpen(tokenSha256: string, now: Date): Promise<boolean> {
    const rows = await this.open(this.database, tokenSha256, now);
    return rows.length > 0;
  }

  /** The person of a secret that opens an account, both held until the transaction ends. */
  async holdOpen(tx: Tx, tokenSha256: string, now: Date) {
    const [row] = await this.open(tx, tokenSha256, now).for('update');
    return row;
  }

  /** Ends every link that a person was sent. */
  async useAll(tx: Tx, userId: string, now: Date): Promise<void> {
    await tx
      .update(passwordResets)
      .set({ usedAt: now })
      .where(and(eq(passwordResets.userId, userId), isNull(passwordResets.usedAt)));
  }

  async deleteAccessKeys(tx: Tx, userId: string): Promise<void> {
    await tx.delete(accessKeys).where(eq(accessKeys.userId, userId));
  }

  private open(from: Database | Tx, tokenSha256: string, now: Date) {
    return from
      .select({ id: users.id, name: users.name, email: users.email })
      .from(passwordResets)
      .innerJoin(users, eq(users.id, passwordResets.userId))
      .where(
        and(
          eq(passwordResets.tokenSha256, tokenSha256),
          isNull(passwordResets.usedAt),
          gt(passwordResets.expiresAt, now),
          isNull(users.disabledAt),
        ),
      );
  }
}
