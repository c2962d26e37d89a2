import { Inject, Injectable } from '@nestjs/common';
import type pg from 'pg';
import type { RateLimiterPostgres } from 'rate-limiter-flexible';
import { ProblemException } from '../common/problem.js';
import { consume, limitKey, rateLimiter } from '../common/rate-limit.js';
import { POOL } from '../database/database.tokens.js';

const WINDOW_S = 60;
const CHECKS_PER_ADDRESS = 30;

/** Bounds how often one address may ask the public check. */
@Injectable()
export class ReportCheckLimits {
  private readonly limiter: RateLimiterPostgres;

  constructor(@Inject(POOL) pool: pg.Pool) {
    this.limiter = rateLimiter(pool, 'report-check', CHECKS_PER_ADDRESS, WINDOW_S);
  }

  /** @throws a 429 problem with Retry-After once an address has asked too often */
  count(address: string): Promise<void> {
    return consume(this.limiter, limitKey(address), tooManyChecks);
  }
}

function tooManyChecks(waitS: number): ProblemException {
  const detail = `Too many checks from this address. Try again in ${waitS} s`;
  return new ProblemException(429, 'too-many-checks', detail, undefined, { 'Retry-After': String(waitS) });
}
