import {
  Inject,
  Injectable,
  Logger,
  type BeforeApplicationShutdown,
  type OnApplicationBootstrap,
} from '@nestjs/common';
import type { Database } from '@overtally/db';
import {
  run,
  WorkerUtils,
  makeWorkerUtils,
  type Runner,
  type TaskList,
  type WorkerEvents,
} from 'graphile-worker';
import { EventEmitter } from 'node:events';
import type { Pool } from 'pg';
import { AnalyseRecordingHandler } from '../analyses/computing/analyse-recording.handler.js';
import { RequestPasswordResetHandler } from '../auth/recovery/request-password-reset.handler.js';
import { AppConfig } from '../config/app-config.js';
import { DATABASE, POOL } from '../database/database.tokens.js';
import { CalibrationNoticesHandler } from '../instruments/notices/calibration-notices.handler.js';
import { calibrationNoticesJob } from '../jobs/definitions/calibration-notices.job.js';
import { clearStorageJob } from '../jobs/definitions/clear-storage.job.js';
import { jobDefinitions } from '../jobs/definitions/index.js';
import type { JobDefinition } from '../jobs/job-definition.js';
import { JobsService } from '../jobs/jobs.service.js';
import { SendMailHandler } from '../mails/sending/send-mail.handler.js';
import { ReadRecordingHandler } from '../recordings/reading/read-recording.handler.js';
import { ClearStorageHandler } from './clear-storage.handler.js';
import { gaveUpProblem, taskFor } from './job-runner.js';
import { matchHandlers, type AnyHandler } from './match-handlers.js';
import { queueLogger } from './queue-logger.js';
import { exhaustedJobs, releaseDeadWorkers, resumeInterrupted, WorkerLease } from './worker-lease.js';

const sweepIntervalMs = 5_000;
const entry = (time: string, { name, maxAttempts, key }: JobDefinition<Record<string, never>>) =>
  `${time} * * * ${name} ?max=${maxAttempts}&jobKey=${key({})}`;
/** Each once a day at an odd minute, in UTC. */
const schedule = [entry('17 2', clearStorageJob), entry('37 5', calibrationNoticesJob)].join('\n');

/** Runs the queue in this process and looks after what dead workers left behind. */
@Injectable()
export class WorkerService implements OnApplicationBootstrap, BeforeApplicationShutdown {
  private readonly logger = new Logger('Worker');
  private readonly handlers: Map<string, AnyHandler>;
  private readonly shutdown = new AbortController();
  private readonly running = new Set<string>();
  private runner: Runner | undefined;
  private utils: WorkerUtils | undefined;
  private lease: WorkerLease | undefined;
  private sweepTimer: NodeJS.Timeout | undefined;
  private sweeping: Promise<void> = Promise.resolve();

  constructor(
    @Inject(POOL) private readonly pool: Pool,
    @Inject(DATABASE) private readonly database: Database,
    private readonly config: AppConfig,
    private readonly jobs: JobsService,
    readRecording: ReadRecordingHandler,
    analyseRecording: AnalyseRecordingHandler,
    clearStorage: ClearStorageHandler,
    sendMail: SendMailHandler,
    requestPasswordReset: RequestPasswordResetHandler,
    calibrationNotices: CalibrationNoticesHandler,
  ) {
    this.handlers = matchHandlers(jobDefinitions, [
      readRecording,
      analyseRecording,
      clearStorage,
      sendMail,
      requestPasswordReset,
      calibrationNotices,
    ]);
  }

  async onApplicationBootstrap(): Promise<void> {
    this.utils = await makeWorkerUtils({ pgPool: this.pool, logger: queueLogger });
    await this.database.transaction(async (tx) => {
      for (const job of [clearStorageJob, calibrationNoticesJob]) await this.jobs.enqueue(tx, job, {});
    });
    const events: WorkerEvents = new EventEmitter();
    events.on('pool:create', ({ workerPool }) => {
      this.lease = new WorkerLease(this.pool, workerPool.id);
    });
    events.on('job:start', ({ job }) => this.running.add(job.id));
    events.on('job:complete', ({ job }) => this.running.delete(job.id));
    const tasks = [...this.handlers].map(([name, handler]) => [name, taskFor(handler, this.shutdown.signal)]);
    this.runner = await run({
      pgPool: this.pool,
      concurrency: this.config.jobsAtOnce,
      noHandleSignals: true,
      crontab: schedule,
      taskList: Object.fromEntries(tasks) as TaskList,
      events,
      logger: queueLogger,
    });
    this.sweepTimer = setInterval(() => this.sweepSoon(), sweepIntervalMs);
    this.sweepSoon();
  }

  async beforeApplicationShutdown(): Promise<void> {
    clearInterval(this.sweepTimer);
    await this.sweeping;
    const interrupted = [...this.running];
    this.shutdown.abort();
    await this.runner?.stop();
    await resumeInterrupted(this.pool, interrupted);
    await this.utils?.release();
    this.lease?.release();
  }

  private sweepSoon(): void {
    this.sweeping = this.sweeping
      .then(() => this.sweep())
      .catch((error: unknown) => this.logger.error({ err: error }, 'Looking after the queue failed'));
  }

  private async sweep(): Promise<void> {
    await this.lease?.hold();
    const dead = await releaseDeadWorkers(this.pool);
    if (dead.length > 0) this.logger.warn({ workers: dead }, 'Jobs of dead workers went back to the queue');
    for (const { id, name, payload } of await exhaustedJobs(this.pool)) {
      const handler = this.handlers.get(name);
      if (handler === undefined) continue;
      await handler.giveUp(handler.definition.payload.parse(payload), gaveUpProblem);
      await this.utils?.completeJobs([id]);
    }
  }
}
