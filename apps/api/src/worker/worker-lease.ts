import { Logger } from '@nestjs/common';
import type { Pool, PoolClient } from 'pg';

const logger = new Logger('Worker');

/** First key of the advisory locks by which workers show that they live. */
const lockClass = 4311;
/** A worker that has just begun may hold jobs a moment before its lock. */
const graceS = 5;

/**
 * Shows other processes that the worker `workerId` lives, by a lock that ends with the connection. A process that dies
 * loses it at once, and its jobs go back to the queue at the next `releaseDeadWorkers`.
 */
export class WorkerLease {
  private client: PoolClient | undefined;

  /** @param answerMs time after which a connection that does not answer counts as lost */
  constructor(
    private readonly pool: Pool,
    private readonly workerId: string,
    private readonly answerMs = 3_000,
  ) {}

  /** Takes the lock, also again after the connection was lost, with or without a word. */
  async hold(): Promise<void> {
    if (this.client !== undefined && (await this.answers(this.client))) return;
    this.release();
    const client = await this.pool.connect();
    client.once('error', () => {
      if (this.client === client) this.release();
    });
    try {
      // The server may not have noticed the end of the connection before; the next call then takes the lock.
      const { rows } = await client.query<{ isHeld: boolean }>(
        'select pg_try_advisory_lock($1, hashtext($2)) as "isHeld"',
        [lockClass, this.workerId],
      );
      if (rows[0]?.isHeld) this.client = client;
      else client.release(true);
    } catch (error) {
      client.release(true);
      throw error;
    }
  }

  /** Ends the connection and the lock with it. */
  release(): void {
    const { client } = this;
    this.client = undefined;
    client?.release(true);
  }

  /** Whether the connection, and with it the lock, is still there. */
  private async answers(client: PoolClient): Promise<boolean> {
    // The types of the driver leave out the time limit of a query.
    const question = { text: 'select 1', query_timeout: this.answerMs };
    try {
      await client.query(question);
      return true;
    } catch (error) {
      logger.warn({ err: error }, 'The connection by which a worker shows that it lives was lost');
      return false;
    }
  }
}

/** Gives jobs held by workers that no longer live back to the queue. Returns the ids of those workers. */
export async function releaseDeadWorkers(pool: Pool): Promise<string[]> {
  const { rows } = await pool.query<{ workerId: string }>(
    `select distinct locked_by as "workerId" from graphile_worker.jobs
     where locked_at < now() - make_interval(secs => $2)
       and not exists (
         select 1 from pg_locks
         where locktype = 'advisory' and granted and classid::bigint = $1
           and objid::bigint = hashtext(locked_by)::bigint & 4294967295
           and database = (select oid from pg_database where datname = current_database()))`,
    [lockClass, graceS],
  );
  const dead = rows.map(({ workerId }) => workerId);
  if (dead.length > 0) await pool.query('select graphile_worker.force_unlock_workers($1::text[])', [dead]);
  return dead;
}

export interface ExhaustedJob {
  id: string;
  name: string;
  payload: unknown;
}

/** Jobs without attempts left, as a crash during the last one leaves them. */
export async function exhaustedJobs(pool: Pool): Promise<ExhaustedJob[]> {
  const { rows } = await pool.query<ExhaustedJob>(
    `select job.id, task.identifier as name, job.payload
     from graphile_worker._private_jobs job
     join graphile_worker._private_tasks task on task.id = job.task_id
     where job.attempts >= job.max_attempts and job.locked_at is null`,
  );
  return rows;
}

/** Gives back the attempts of jobs that a stop of the worker broke off, and lets them run at once. */
export async function resumeInterrupted(pool: Pool, jobIds: string[]): Promise<void> {
  if (jobIds.length === 0) return;
  await pool.query(
    `update graphile_worker._private_jobs set attempts = greatest(attempts - 1, 0), run_at = now(), updated_at = now()
     where id = any($1::bigint[]) and locked_at is null`,
    [jobIds],
  );
}
