import { createHash } from 'node:crypto';
import type pg from 'pg';
import { RateLimiterPostgres, RateLimiterRes } from 'rate-limiter-flexible';
import type { ProblemException } from './problem.js';

/**
 * A limit kept in the database, so that it holds over processes and restarts.
 * @param keyPrefix tells it from other limits
 * @param points how often a key may be counted within `durationS` seconds
 */
export const rateLimiter = (pool: pg.Pool, keyPrefix: string, points: number, durationS: number) =>
  new RateLimiterPostgres({
    storeClient: pool,
    tableName: 'sign_in_limits',
    tableCreated: true,
    keyPrefix,
    points,
    duration: durationS,
  });

/**
 * Counts one act under a key.
 * @param refuse makes the problem to throw once there were too many, from the seconds to wait
 */
export async function consume(
  limiter: RateLimiterPostgres,
  key: string,
  refuse: (waitS: number) => ProblemException,
): Promise<void> {
  try {
    await limiter.consume(key, 1);
  } catch (refusal) {
    if (!(refusal instanceof RateLimiterRes)) throw refusal;
    throw refuse(Math.max(1, Math.ceil(refusal.msBeforeNext / 1000)));
  }
}

/** Of one length whatever the input, so that no e-mail or network addresses lie in the table. */
export const limitKey = (text: string): string => createHash('sha256').update(text).digest('hex');
