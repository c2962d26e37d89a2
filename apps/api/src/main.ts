import 'reflect-metadata';
import { NestFactory } from '@nestjs/core';
import type { NestExpressApplication } from '@nestjs/platform-express';
import { migrateToLatest, openPool } from '@overtally/db';
import { Logger } from 'nestjs-pino';
import type { Server } from 'node:http';
import { AppModule } from './app.module.js';
import { AppConfig } from './config/app-config.js';
import { EnvironmentFaults, readEnvironment } from './config/environment.js';
import { setUpApp } from './http/set-up-app.js';

const GRACE_MS = 10_000;

async function migrate(databaseUrl: string): Promise<void> {
  const pool = openPool(databaseUrl, 1);
  try {
    await migrateToLatest(pool);
  } finally {
    await pool.end();
  }
}

/** On a signal running requests may finish; those that take longer than the grace are cut off. */
function cutConnectionsAfterGrace(server: Server): void {
  for (const signal of ['SIGTERM', 'SIGINT'] as const) {
    process.once(signal, () => setTimeout(() => server.closeAllConnections(), GRACE_MS).unref());
  }
}

async function start(): Promise<void> {
  const config = new AppConfig(readEnvironment());
  await migrate(config.databaseUrl);
  const app = await NestFactory.create<NestExpressApplication>(AppModule.with(config), {
    bufferLogs: true,
    bodyParser: false,
  });
  setUpApp(app);
  cutConnectionsAfterGrace(app.getHttpServer());
  await app.listen(config.port, config.host);
  app.get(Logger).log(`Ready at ${config.publicUrl}`);
}

start().catch((error: unknown) => {
  process.stderr.write(`${explain(error)}\n`);
  process.exit(1);
});

function explain(error: unknown): string {
  if (error instanceof EnvironmentFaults) return error.message;
  return `Overtally cannot start: ${error instanceof Error ? (error.stack ?? error.message) : String(error)}`;
}
