import { Global, Inject, Logger, Module, type OnApplicationShutdown } from '@nestjs/common';
import { openDatabase, openPool } from '@overtally/db';
import type pg from 'pg';
import { AppConfig } from '../config/app-config.js';
import { DATABASE, POOL } from './database.tokens.js';

function makePool(config: AppConfig): pg.Pool {
  const pool = openPool(config.databaseUrl);
  // Without a listener the loss of an idle connection would end the process.
  pool.on('error', (error) => new Logger('Database').error(error));
  return pool;
}

@Global()
@Module({
  providers: [
    { provide: POOL, inject: [AppConfig], useFactory: makePool },
    { provide: DATABASE, inject: [POOL], useFactory: openDatabase },
  ],
  exports: [POOL, DATABASE],
})
export class DatabaseModule implements OnApplicationShutdown {
  constructor(@Inject(POOL) private readonly pool: pg.Pool) {}

  async onApplicationShutdown(): Promise<void> {
    await this.pool.end();
  }
}
