import { NestFactory } from '@nestjs/core';
import type { INestApplicationContext } from '@nestjs/common';
import { once } from 'node:events';
import { spawn, type ChildProcess } from 'node:child_process';
import { setTimeout as wait } from 'node:timers/promises';
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
export function spawnWorker(test: TestApp, environment: Record<string, string> = {}): ChildProcess {
  return spawnEntry('worker/main.js', test, environment);
}

/** Starts a server beside the one of a test, as a process of its own, and waits until it answers on the port. */
export async function spawnServer(test: TestApp, port: number): Promise<ChildProcess> {
  const server = spawnEntry('main.js', test, { PORT: String(port), WORKER: 'off' });
  const isUp = () =>
    fetch(`http://127.0.0.1:${port}/api/health`).then(
      ({ ok }) => ok,
      () => false,
    );
  for (let tries = 0; !(await isUp()); tries++) {
    if (tries > 600) throw new Error('The server does not answer');
    await wait(100);
  }
  return server;
}

function spawnEntry(
  file: string,
  { app, databaseUrl }: TestApp,
  environment: Record<string, string>,
): ChildProcess {
  const entry = fileURLToPath(new URL(`../../dist/${file}`, import.meta.url));
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

/** Ends a process as a failing machine does, and waits until it is gone. */
export async function kill(child: ChildProcess): Promise<void> {
  const gone = once(child, 'exit');
  child.kill('SIGKILL');
  await gone;
}
