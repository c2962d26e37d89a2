import { NestFactory } from '@nestjs/core';
import type { INestApplicationContext } from '@nestjs/common';
import { spawn, type ChildProcess } from 'node:child_process';
import { fileURLToPath } from 'node:url';
import { AppConfig } from '../../dist/config/app-config.js';
import { WorkerAppModule } from '../../dist/worker/worker-app.module.js';
import { SESSION_SECRET } from './sessions.js';
import type { TestApp } from './test-app.js';

/** Starts a worker beside the API of a test, in this process. */
export function startWorker({ app }: TestApp): Promise<INestApplicationContext> {
  return NestFactory.createApplicationContext(WorkerAppModule.with(app.get(AppConfig)), { logger: false });
}

/** Starts a worker as a process of its own, as an installation does. */
export function spawnWorker({ app, databaseUrl }: TestApp): ChildProcess {
  const entry = fileURLToPath(new URL('../../dist/worker/main.js', import.meta.url));
  return spawn(process.execPath, [entry], {
    stdio: 'ignore',
    env: {
      PATH: process.env.PATH,
      DATABASE_URL: databaseUrl,
      DATA_DIR: app.get(AppConfig).dataDir,
      SESSION_SECRET,
      LOG_LEVEL: 'silent',
      COMPUTE_THREADS: '1',
    },
  });
}
