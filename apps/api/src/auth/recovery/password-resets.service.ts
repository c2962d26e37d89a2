import { Inject, Injectable } from '@nestjs/common';
import type { ResetPassword } from '@overtally/contracts';
import type { Database } from '@overtally/db';
import type pg from 'pg';
import { problem, ProblemException } from '../../common/problem.js';
import { consume, limitKey, rateLimiter } from '../../common/rate-limit.js';
import { DATABASE, POOL } from '../../database/database.tokens.js';
import { requestPasswordResetJob } from '../../jobs/definitions/request-password-reset.job.js';
import { JobsService } from '../../jobs/jobs.service.js';
import { MailsService } from '../../mails/mails.service.js';
import { hashOfToken } from '../../mails/secret-links.js';
import { AccountSessions } from '../account-sessions.js';
import { AccountsRepository } from '../accounts.repository.js';
import { PasswordHasher } from '../password-hasher.js';
import { PasswordResetsRepository } from './password-resets.repository.js';

const WINDOW_S = 60 * 60;
const REQUESTS_PER_EMAIL_AND_ADDRESS = 5;
const REQUESTS_PER_ADDRESS = 30;

/** A new password for somebody who does not know the old one, by a link in a message. */
@Injectable()
export class PasswordResetsService {
  private readonly perEmail;
  private readonly perAddress;

  constructor(
    @Inject(DATABASE) private readonly database: Database,
    @Inject(POOL) pool: pg.Pool,
    private readonly repository: PasswordResetsRepository,
    private readonly accounts: AccountsRepository,
    private readonly sessions: AccountSessions,
    private readonly hasher: PasswordHasher,
    private readonly mails: MailsService,
    private readonly jobs: JobsService,
  ) {
    this.perEmail = rateLimiter(pool, 'reset-account', REQUESTS_PER_EMAIL_AND_ADDRESS, WINDOW_S);
    this.perAddress = rateLimiter(pool, 'reset-address', REQUESTS_PER_ADDRESS, WINDOW_S);
  }

  /**
   * Has a link sent to the address if it has an account. The same is done in either case, a worker looks for the account:
   * neither the answer nor its time tells whether there is one.
   * @throws 429 after too many requests
   */
  async request(email: string, address: string): Promise<void> {
    await consume(this.perAddress, limitKey(address), tooManyRequests);
    await consume(this.perEmail, limitKey(`${email} ${address}`), tooManyRequests);
    await this.database.transaction((tx) => this.jobs.enqueue(tx, requestPasswordResetJob, { email }));
  }

  /**
   * Sets the password of the link's person. Sessions and access keys end, since somebody else may hold them, and so do
   * all other links.
   * @throws 410 for a link that was used, has expired or never was
   */
  async reset({ token, password }: ResetPassword): Promise<void> {
    const tokenSha256 = hashOfToken(token);
    if (!(await this.repository.isOpen(tokenSha256, new Date()))) throw deadLink();
    const passwordHash = await this.hasher.hash(password);
    await this.database.transaction(async (tx) => {
      const now = new Date();
      const person = await this.repository.holdOpen(tx, tokenSha256, now);
      if (!person) throw deadLink();
      await this.accounts.setPasswordHash(tx, person.id, passwordHash);
      await this.repository.useAll(tx, person.id, now);
      await this.sessions.endAll(tx, person.id);
      await this.repository.deleteAccessKeys(tx, person.id);
      await this.mails.enqueue(tx, {
        kind: 'password-changed',
        to: person,
        subject: 'Your password was changed',
        message: {
          heading: 'Your password was changed',
          facts: [['Account', person.email]],
          paragraphs: [
            'It was set anew with a link that was sent to this address. You were signed out everywhere, and your access keys were removed.',
          ],
          reason: 'If this was not you, tell an administrator at once.',
        },
      });
    });
  }
}

const deadLink = () =>
  problem(410, 'link-dead', 'This link was used already or has expired; ask for a new one');

function tooManyRequests(waitS: number): ProblemException {
  const detail = `Too many requests for a new password. Try again in ${Math.ceil(waitS / 60)} min`;
  return new ProblemException(429, 'too-many-attempts', detail, undefined, { 'Retry-After': String(waitS) });
}
