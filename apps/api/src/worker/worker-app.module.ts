import { Module, type DynamicModule } from '@nestjs/common';
import { LoggerModule } from 'nestjs-pino';
import { loggerParams } from '../common/logging.js';
import { AppConfig } from '../config/app-config.js';
import { ConfigModule } from '../config/config.module.js';
import { DatabaseModule } from '../database/database.module.js';
import { JobsModule } from '../jobs/jobs.module.js';
import { StorageModule } from '../storage/storage.module.js';
import { WorkerModule } from './worker.module.js';

/** A process that works on the queue and serves no requests. */
@Module({})
export class WorkerAppModule {
  static with(config: AppConfig): DynamicModule {
    return {
      module: WorkerAppModule,
      imports: [
        LoggerModule.forRoot(loggerParams(config)),
        ConfigModule.with(config),
        DatabaseModule,
        StorageModule,
        JobsModule,
        WorkerModule,
      ],
    };
  }
}
