import { Inject, Injectable } from '@nestjs/common';
import { schema, type Database, type Tx } from '@overtally/db';
import { and, desc, eq, sql } from 'drizzle-orm';
import { DATABASE } from '../database/database.tokens.js';

const { accessKeys } = schema;
const columns = {
  id: accessKeys.id,
  name: accessKeys.name,
  prefix: accessKeys.prefix,
  createdAt: accessKeys.createdAt,
  lastUsedAt: accessKeys.lastUsedAt,
  expiresAt: accessKeys.expiresAt,
};

export type AccessKeyRow = Omit<typeof accessKeys.$inferSelect, 'userId' | 'secretSha256'>;

/** Access keys, without what their secrets are checked against. */
@Injectable()
export class AccessKeysRepository {
  constructor(@Inject(DATABASE) private readonly database: Database) {}

  /** Keys of a person, the newest first, from behind `after`. */
  list(
    userId: string,
    after: { createdAt: string; id: string } | undefined,
    limit: number,
  ): Promise<AccessKeyRow[]> {
    const behind =
      after &&
      sql`(${accessKeys.createdAt}, ${accessKeys.id}) < (${after.createdAt}::timestamptz, ${after.id}::uuid)`;
    return this.database
      .select(columns)
      .from(accessKeys)
      .where(and(eq(accessKeys.userId, userId), behind))
      .orderBy(desc(accessKeys.createdAt), desc(accessKeys.id))
      .limit(limit);
  }

  async insert(tx: Tx, key: typeof accessKeys.$inferInsert): Promise<AccessKeyRow> {
    const [row] = await tx.insert(accessKeys).values(key).returning(columns);
    return row!;
  }

  /** False when the person has no such key. */
  async delete(tx: Tx, userId: string, id: string): Promise<boolean> {
    const rows = await tx
      .delete(accessKeys)
      .where(and(eq(accessKeys.id, id), eq(accessKeys.userId, userId)))
      .returning({ id: accessKeys.id });
    return rows.length > 0;
  }
}
