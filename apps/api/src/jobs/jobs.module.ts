import { Global, Inject, Logger, Module, type OnModuleInit } from '@nestjs/common';
import { runMigrations } from 'graphile-worker';
import type { Pool } from 'pg';
import { POOL } from '../database/database.tokens.js';
import { ComputePool } from './compute-pool.js';
import { JobsService } from './jobs.service.js';

@Global()
@Module({ providers: [JobsService, ComputePool], exports: [JobsService, ComputePool] })
export class JobsModule implements OnModuleInit {
  constructor(@Inject(POOL) private readonly pool: Pool) {
    // A connection that breaks while it is lent out would end the process without a listener of its own.
    pool.on('connect', (client) => client.on('error', (error) => new Logger('Database').error(error)));
  }

  /** The queue's own tables must stand before the first job is added, also where no worker runs. */
  async onModuleInit(): Promise<void> {
    await runMigrations({ pgPool: this.pool });
  }
}
