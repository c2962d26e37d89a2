import { Inject, Injectable } from '@nestjs/common';
import { createHash } from 'node:crypto';
import type pg from 'pg';
import { RateLimiterPostgres, RateLimiterRes } from 'rate-limiter-flexible';
import { ProblemException } from '../common/problem.js';
import { POOL } from '../database/database.tokens.js';

const WINDOW_S = 15 * 60;
const FAILURES_PER_ACCOUNT_AND_ADDRESS = 10;
const FAILURES_PER_ADDRESS = 100;

/** Slows down guessing of passwords; kept in the database, so it holds over processes and restarts. */
@Injectable()
export class SignInLimits {
  private readonly limits: [RateLimiterPostgres, RateLimiterPostgres];

  constructor(@Inject(POOL) pool: pg.Pool) {
    const make = (keyPrefix: string, points: number) =>
      new RateLimiterPostgres({
        storeClient: pool,
        tableName: 'sign_in_limits',
        tableCreated: true,
        keyPrefix,
        points,
        duration: WINDOW_S,
      });
    this.limits = [make('account', FAILURES_PER_ACCOUNT_AND_ADDRESS), make('address', FAILURES_PER_ADDRESS)];
  }

  /**
   * Runs one attempt. It is counted before it is made, so that many at once do not slip through, and a
   * success is taken off again: failures alone add up.
   * @param attempt undefined stands for a failure
   * @throws a 429 problem with Retry-After once too many failed
   */
  async count<T>(
    account: string,
    address: string,
    attempt: () => Promise<T | undefined>,
  ): Promise<T | undefined> {
    const keys = [hashed(`${account} ${address}`), hashed(address)] as const;
    await this.consume(this.limits[1], keys[1]);
    await this.consume(this.limits[0], keys[0]);
    const result = await attempt();
    if (result !== undefined) {
      await Promise.all([this.limits[0].delete(keys[0]), this.limits[1].reward(keys[1], 1)]);
    }
    return result;
  }

  private async consume(limiter: RateLimiterPostgres, key: string): Promise<void> {
    try {
      await limiter.consume(key, 1);
    } catch (refusal) {
      if (!(refusal instanceof RateLimiterRes)) throw refusal;
      throw tooManyAttempts(Math.max(1, Math.ceil(refusal.msBeforeNext / 1000)));
    }
  }
}

function tooManyAttempts(waitS: number): ProblemException {
  const detail = `Too many failed attempts. Try again in ${Math.ceil(waitS / 60)} min`;
  return new ProblemException(429, 'too-many-attempts', detail, undefined, { 'Retry-After': String(waitS) });
}

/** Of one length whatever the input, and no e-mail addresses lie in the table. */
function hashed(text: string): string {
  return createHash('sha256').update(text).digest('hex');
}
