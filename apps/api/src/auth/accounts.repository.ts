import { Inject, Injectable } from '@nestjs/common';
import { schema, type Database, type Tx } from '@overtally/db';
import { and, eq, isNull, type SQL } from 'drizzle-orm';
import { DATABASE } from '../database/database.tokens.js';

const { users } = schema;
const account = {
  id: users.id,
  email: users.email,
  name: users.name,
  isAdministrator: users.isAdministrator,
};

/** What signing in and looking after one's own account need to know of a person. */
@Injectable()
export class AccountsRepository {
  constructor(@Inject(DATABASE) private readonly database: Database) {}

  findEnabledByEmail(email: string) {
    return this.findEnabled(eq(users.email, email));
  }

  findEnabledById(id: string) {
    return this.findEnabled(eq(users.id, id));
  }

  async rename(tx: Tx, id: string, name: string): Promise<void> {
    await tx.update(users).set({ name }).where(eq(users.id, id));
  }

  async setPasswordHash(tx: Tx, id: string, passwordHash: string): Promise<void> {
    await tx.update(users).set({ passwordHash }).where(eq(users.id, id));
  }

  private async findEnabled(which: SQL) {
    const [row] = await this.database
      .select({ ...account, passwordHash: users.passwordHash })
      .from(users)
      .where(and(which, isNull(users.disabledAt)));
    return row;
  }
}
