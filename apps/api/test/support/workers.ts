import { NestFactory } from '@nestjs/core';
import type { INestApplicationContext } from '@nestjs/common';
import { once } from 'node:events';
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

/**
 * Starts a worker as a process of its own, as an installation does.
 * @param environment that of the store, where files lie elsewhere than in the data folder
 */
export function spawnWorker(
  { app, databaseUrl }: TestApp,
  environment: Record<string, string> = {},
): ChildProcess {
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
      ...environment,
    },
  });
}

/** Ends a worker as a failing machine does, and waits until it is gone. */
export async function kill(worker: ChildProcess): Promise<void> {
  const gone = once(worker, 'exit');
  worker.kill('SIGKILL');
  await gone;
}
