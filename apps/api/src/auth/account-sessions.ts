import { Injectable } from '@nestjs/common';
import { schema, type Tx } from '@overtally/db';
import { sql } from 'drizzle-orm';

const { sessions } = schema;

/** The stored sessions of a person. */
@Injectable()
export class AccountSessions {
  /** Signs a person out everywhere. */
  async endAll(tx: Tx, userId: string): Promise<void> {
    await tx.delete(sessions).where(sql`${sessions.sess} ->> 'userId' = ${userId}`);
  }
}
