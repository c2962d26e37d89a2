import { Inject, Injectable } from '@nestjs/common';
import {
  holds,
  type Account,
  type ChangePassword,
  type OwnAccount,
  type SignIn,
  type UpdateAccount,
} from '@overtally/contracts';
import type { Database } from '@overtally/db';
import { AccessRepository } from '../access/access.repository.js';
import { problem } from '../common/problem.js';
import type { SignedInUser } from '../common/request.js';
import { DATABASE } from '../database/database.tokens.js';
import { AccountSessions } from './account-sessions.js';
import { AccountsRepository } from './accounts.repository.js';
import { PasswordHasher } from './password-hasher.js';
import { SignInLimits } from './sign-in-limits.js';

@Injectable()
export class AuthService {
  constructor(
    @Inject(DATABASE) private readonly database: Database,
    private readonly accounts: AccountsRepository,
    private readonly access: AccessRepository,
    private readonly sessions: AccountSessions,
    private readonly hasher: PasswordHasher,
    private readonly limits: SignInLimits,
  ) {}

  /**
   * Finds the account that e-mail and password belong to.
   * @throws 401 for a wrong pair, 429 after too many of them from the same address
   */
  async checkCredentials({ email, password }: SignIn, address: string): Promise<Account> {
    const account = await this.limits.count(email, address, async () => {
      const found = await this.accounts.findEnabledByEmail(email);
      return (await this.hasher.verify(found?.passwordHash, password)) ? found : undefined;
    });
    if (!account) throw problem(401, 'wrong-credentials', 'E-mail or password is wrong');
    if (this.hasher.isOutdated(account.passwordHash)) {
      const passwordHash = await this.hasher.hash(password);
      await this.database.transaction((tx) => this.accounts.setPasswordHash(tx, account.id, passwordHash));
    }
    return toAccount(account);
  }

  async rename(user: SignedInUser, { name }: UpdateAccount): Promise<OwnAccount> {
    await this.database.transaction((tx) => this.accounts.rename(tx, user.id, name));
    return this.own({ ...user, name });
  }

  /** The account of who asks, with what it opens outside the projects. */
  async own(user: SignedInUser): Promise<OwnAccount> {
    const role = await this.access.findLaboratoryRole(user.id);
    return { ...toAccount(user), worksInLaboratory: holds('instrument.read', role, user.isAdministrator) };
  }

  /**
   * Sets a new password and ends all sessions of the person.
   * @throws 422 when the current password is wrong, 429 after too many tries
   */
  async changePassword(user: SignedInUser, input: ChangePassword, address: string): Promise<void> {
    const account = await this.limits.count(user.email, address, async () => {
      const found = await this.accounts.findEnabledById(user.id);
      return (await this.hasher.verify(found?.passwordHash, input.currentPassword)) ? found : undefined;
    });
    if (!account) {
      const message = 'This is not your current password';
      throw problem(422, 'wrong-password', message, [{ path: 'currentPassword', message }]);
    }
    const passwordHash = await this.hasher.hash(input.newPassword);
    await this.database.transaction(async (tx) => {
      await this.accounts.setPasswordHash(tx, user.id, passwordHash);
      await this.sessions.endAll(tx, user.id);
    });
  }
}

/** Names each field, so that nothing else of a person leaves. */
export function toAccount({ id, email, name, isAdministrator }: Account): Account {
  return { id, email, name, isAdministrator };
}
