import 'reflect-metadata';
import { NestFactory } from '@nestjs/core';
import type { NestExpressApplication } from '@nestjs/platform-express';
import type { Database } from '@overtally/db';
import { randomUUID } from 'node:crypto';
import { mkdtemp, rm } from 'node:fs/promises';
import type { Server } from 'node:http';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import supertest from 'supertest';
import type TestAgent from 'supertest/lib/agent.js';
import { inject } from 'vitest';
import { AppModule } from '../../dist/app.module.js';
import { AppConfig } from '../../dist/config/app-config.js';
import { readEnvironment } from '../../dist/config/environment.js';
import { DATABASE } from '../../dist/database/database.tokens.js';
import { setUpApp } from '../../dist/http/set-up-app.js';
import { databaseUrl, onServer } from './database-server.js';
import { seedPeople, type People, type Role } from './people.js';
import { SESSION_SECRET, sessionCookie } from './sessions.js';

export interface TestApp {
  app: NestExpressApplication;
  /** The listening server, for `supertest(http)` without a session. */
  http: Server;
  database: Database;
  databaseUrl: string;
  people: People;
  /** A project whose members are the people, each in their role. */
  project: { id: string };
  /** Requests of a person, with a new session. */
  signIn(role: Role): Promise<TestAgent>;
  close(): Promise<void>;
}

/**
 * Starts the built application on a database of its own.
 * @param environment variables that differ from those of a quiet test
 */
export async function startTestApp(environment: Record<string, string> = {}): Promise<TestApp> {
  const name = `overtally_test_${randomUUID().replaceAll('-', '')}`;
  await onServer(`create database ${name} template ${inject('templateDatabase')}`);
  const dataDir = await mkdtemp(join(tmpdir(), 'overtally-test-'));
  const config = new AppConfig(
    readEnvironment({
      DATABASE_URL: databaseUrl(name),
      DATA_DIR: dataDir,
      SESSION_SECRET,
      LOG_LEVEL: 'silent',
      WORKER: 'off',
      PORT: '0',
      COMPUTE_THREADS: '1',
      ...environment,
    }),
  );
  const app = await NestFactory.create<NestExpressApplication>(AppModule.with(config), {
    bodyParser: false,
    logger: false,
    forceCloseConnections: true,
  });
  setUpApp(app);
  await app.listen(0, '127.0.0.1');
  const http = app.getHttpServer();
  const database = app.get<Database>(DATABASE);
  const seeded = await seedPeople(database);
  return {
    app,
    http,
    database,
    databaseUrl: config.databaseUrl,
    ...seeded,
    async signIn(role) {
      const cookie = await sessionCookie(database, seeded.people[role].id);
      return supertest.agent(http).set('Cookie', cookie);
    },
    async close() {
      await app.close();
      await onServer(`drop database ${name} with (force)`);
      await rm(dataDir, { recursive: true, force: true });
    },
  };
}
