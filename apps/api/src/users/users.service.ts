import { Inject, Injectable } from '@nestjs/common';
import type { CreateUser, UpdateUser, User, UserQuery } from '@overtally/contracts';
import type { Database, Tx } from '@overtally/db';
import { z } from 'zod';
import { AccountSessions } from '../auth/account-sessions.js';
import { PasswordHasher } from '../auth/password-hasher.js';
import { decodeCursor, pageOfRows } from '../common/paging.js';
import { problem } from '../common/problem.js';
import { DATABASE } from '../database/database.tokens.js';
import { UsersRepository, type UserChange, type UserRow } from './users.repository.js';

@Injectable()
export class UsersService {
  constructor(
    @Inject(DATABASE) private readonly database: Database,
    private readonly repository: UsersRepository,
    private readonly hasher: PasswordHasher,
    private readonly sessions: AccountSessions,
  ) {}

  async list({ q, cursor, limit }: UserQuery): Promise<{ items: User[]; nextCursor: string | null }> {
    const place = decodeCursor(cursor, z.tuple([z.string()]));
    const rows = await this.repository.list(q, place?.[0], limit + 1);
    return pageOfRows(rows, limit, (row) => [row.email], toUser);
  }

  /** The account of an e-mail address, unless disabled. */
  findEnabledByEmail(email: string): Promise<UserRow | undefined> {
    return this.repository.findEnabledByEmail(email);
  }

  /** The person of an id, unless disabled. */
  findEnabled(id: string): Promise<UserRow | undefined> {
    return this.repository.findEnabled(id);
  }

  /** Makes an account inside the caller's transaction; undefined when the address has one already. */
  insert(
    tx: Tx,
    person: { email: string; name: string; passwordHash: string },
  ): Promise<UserRow | undefined> {
    return this.repository.insert(tx, person);
  }

  /** @throws 409 when the e-mail address has an account already */
  async create({ password, ...person }: CreateUser): Promise<User> {
    const passwordHash = await this.hasher.hash(password);
    const row = await this.database.transaction((tx) =>
      this.repository.insert(tx, { ...person, passwordHash }),
    );
    if (row) return toUser(row);
    const message = 'This e-mail address has an account already';
    throw problem(409, 'email-taken', message, [{ path: 'email', message }]);
  }

  /**
   * Changes a person. A new password and disabling end the person's sessions.
   * @throws 404 for an unknown id, 409 when no enabled administrator would be left
   */
  async update(id: string, input: UpdateUser): Promise<User> {
    const passwordHash = input.password === undefined ? undefined : await this.hasher.hash(input.password);
    return this.database.transaction(async (tx) => {
      await this.repository.lockAdministrators(tx);
      const before = await this.repository.findForUpdate(tx, id);
      if (!before) throw problem(404, 'not-found', 'There is no such person');
      const row = await this.repository.update(tx, id, changeOf(before, input, passwordHash));
      if ((await this.repository.countEnabledAdministrators(tx)) === 0) {
        throw problem(409, 'last-administrator', 'Name another administrator first: one must remain');
      }
      if (input.disabled || passwordHash !== undefined) await this.sessions.endAll(tx, id);
      return toUser(row);
    });
  }
}

function changeOf(before: UserRow, input: UpdateUser, passwordHash: string | undefined): UserChange {
  const { name = before.name, isAdministrator = before.isAdministrator, disabled } = input;
  const disabledAt =
    disabled === false ? null : disabled ? (before.disabledAt ?? new Date()) : before.disabledAt;
  return { name, isAdministrator, disabledAt, ...(passwordHash !== undefined && { passwordHash }) };
}

function toUser({ id, email, name, isAdministrator, disabledAt, createdAt }: UserRow): User {
  return {
    id,
    email,
    name,
    isAdministrator,
    disabledAt: disabledAt?.toISOString() ?? null,
    createdAt: createdAt.toISOString(),
  };
}
