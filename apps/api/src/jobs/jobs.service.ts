import { Injectable } from '@nestjs/common';
import type { Tx } from '@overtally/db';
import { sql } from 'drizzle-orm';
import type { JobDefinition } from './job-definition.js';

/** The queue, as seen by those who hand work on. */
@Injectable()
export class JobsService {
  /** Adds a job inside the caller's transaction: it is seen by workers once, and only if, the transaction commits. */
  async enqueue<Payload>(tx: Tx, definition: JobDefinition<Payload>, payload: Payload): Promise<void> {
    const body = JSON.stringify(definition.payload.parse(payload));
    await tx.execute(sql`
      select graphile_worker.add_job(
        ${definition.name}::text,
        payload => ${body}::json,
        max_attempts => ${definition.maxAttempts}::int,
        job_key => ${definition.key(payload)}::text
      )`);
  }
}
