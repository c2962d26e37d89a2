import 'reflect-metadata';
import { NestFactory } from '@nestjs/core';
import { Logger } from 'nestjs-pino';
import { AppConfig } from '../config/app-config.js';
import { EnvironmentFaults, readEnvironment } from '../config/environment.js';
import { WorkerAppModule } from './worker-app.module.js';

/** Starts a worker beside an API that runs with WORKER=off; the API keeps the database up to date. */
async function start(): Promise<void> {
  const config = new AppConfig(readEnvironment());
  const app = await NestFactory.createApplicationContext(WorkerAppModule.with(config), { bufferLogs: true });
  const logger = app.get(Logger);
  app.useLogger(logger);
  app.enableShutdownHooks();
  logger.log(`Worker ready, ${config.jobsAtOnce} jobs at once on ${config.computeThreads} threads`);
}

start().catch((error: unknown) => {
  const text =
    error instanceof EnvironmentFaults ? error.message : `The worker cannot start: ${String(error)}`;
  process.stderr.write(`${text}\n`);
  process.exit(1);
});
