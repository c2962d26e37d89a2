import { Inject, Injectable } from '@nestjs/common';
import type pg from 'pg';
import type { RateLimiterPostgres } from 'rate-limiter-flexible';
import { ProblemException } from '../common/problem.js';
import { consume, limitKey, rateLimiter } from '../common/rate-limit.js';
import { POOL } from '../database/database.tokens.js';

const WINDOW_S = 15 * 60;
const FAILURES_PER_ACCOUNT_AND_ADDRESS = 10;
const FAILURES_PER_ADDRESS = 100;

/** Slows down guessing of passwords; kept in the database, so it holds over processes and restarts. */
@Injectable()
export class SignInLimits {
  private readonly limits: [RateLimiterPostgres, RateLimiterPostgres];

  constructor(@Inject(POOL) pool: pg.Pool) {
    this.limits = [
      rateLimiter(pool, 'account', FAILURES_PER_ACCOUNT_AND_ADDRESS, WINDOW_S),
      rateLimiter(pool, 'address', FAILURES_PER_ADDRESS, WINDOW_S),
    ];
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
    const keys = [limitKey(`${account} ${address}`), limitKey(address)] as const;
    await consume(this.limits[1], keys[1], tooManyAttempts);
    await consume(this.limits[0], keys[0], tooManyAttempts);
    const result = await attempt();
    if (result !== undefined) {
      await Promise.all([this.limits[0].delete(keys[0]), this.limits[1].reward(keys[1], 1)]);
    }
    return result;
  }
}

function tooManyAttempts(waitS: number): ProblemException {
  const detail = `Too many failed attempts. Try again in ${Math.ceil(waitS / 60)} min`;
  return new ProblemException(429, 'too-many-attempts', detail, undefined, { 'Retry-After': String(waitS) });
}
