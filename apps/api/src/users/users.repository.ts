import { Inject, Injectable } from '@nestjs/common';
import { schema, type Database, type Tx } from '@overtally/db';
import { and, asc, eq, ilike, isNull, or, sql, type SQL } from 'drizzle-orm';
import { likePattern } from '../common/paging.js';
import { DATABASE } from '../database/database.tokens.js';

const { users } = schema;
const columns = {
  id: users.id,
  email: users.email,
  name: users.name,
  isAdministrator: users.isAdministrator,
  disabledAt: users.disabledAt,
  createdAt: users.createdAt,
};

export type UserRow = Omit<typeof users.$inferSelect, 'passwordHash'>;
export type NewUser = Pick<typeof users.$inferInsert, 'email' | 'name' | 'passwordHash' | 'isAdministrator'>;
export type UserChange = Partial<Pick<NewUser, 'name' | 'passwordHash' | 'isAdministrator'>> & {
  disabledAt?: Date | null;
};

@Injectable()
export class UsersRepository {
  constructor(@Inject(DATABASE) private readonly database: Database) {}

  /** People by e-mail, which is unique, from after the given one. */
  list(words: string | undefined, afterEmail: string | undefined, limit: number): Promise<UserRow[]> {
    const pattern = words ? likePattern(words) : undefined;
    return this.database
      .select(columns)
      .from(users)
      .where(
        and(
          afterEmail === undefined ? undefined : sql`${users.email} > ${afterEmail}`,
          pattern === undefined ? undefined : or(ilike(users.name, pattern), ilike(users.email, pattern)),
        ),
      )
      .orderBy(asc(users.email))
      .limit(limit);
  }

  findEnabledByEmail(email: string): Promise<UserRow | undefined> {
    return this.findOne(eq(users.email, email));
  }

  findEnabled(id: string): Promise<UserRow | undefined> {
    return this.findOne(eq(users.id, id));
  }

  /** Undefined when the e-mail address has an account already. */
  async insert(tx: Tx, user: NewUser): Promise<UserRow | undefined> {
    const [row] = await tx
      .insert(users)
      .values(user)
      .onConflictDoNothing({ target: users.email })
      .returning(columns);
    return row;
  }

  async findForUpdate(tx: Tx, id: string): Promise<UserRow | undefined> {
    const [row] = await tx.select(columns).from(users).where(eq(users.id, id)).for('update');
    return row;
  }

  async update(tx: Tx, id: string, change: UserChange): Promise<UserRow> {
    const [row] = await tx.update(users).set(change).where(eq(users.id, id)).returning(columns);
    if (!row) throw new Error('A person who is being changed has gone');
    return row;
  }

  /** Makes changes of who is an administrator wait for one another. */
  async lockAdministrators(tx: Tx): Promise<void> {
    await tx.execute(sql`select pg_advisory_xact_lock(hashtext('overtally.administrators'))`);
  }

  countEnabledAdministrators(tx: Tx): Promise<number> {
    return tx.$count(users, and(eq(users.isAdministrator, true), isNull(users.disabledAt)));
  }

  private async findOne(which: SQL): Promise<UserRow | undefined> {
    const [row] = await this.database
      .select(columns)
      .from(users)
      .where(and(which, isNull(users.disabledAt)));
    return row;
  }
}
