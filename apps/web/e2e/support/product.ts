import { demoPeople, type DemoPerson } from '@overtally/fixtures';
import { spawn, type ChildProcess } from 'node:child_process';
import { randomBytes, randomUUID } from 'node:crypto';
import { mkdtempSync, rmSync } from 'node:fs';
import { createServer, type AddressInfo } from 'node:net';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import pg from 'pg';

/** A running product of its own: server, worker, database and storage, seeded with the demonstration. */
export interface Product {
  baseUrl: string;
  stop: () => Promise<void>;
}

const server = fileURLToPath(new URL('../../../api/dist/main.js', import.meta.url));
const webDist = fileURLToPath(new URL('../../dist', import.meta.url));

/** Starts the built product on a fresh database of TEST_DATABASE_URL's server. */
export async function startProduct(): Promise<Product> {
  const database = await createDatabase();
  const dataDirectory = mkdtempSync(join(tmpdir(), 'overtally-browser-'));
  const port = await freePort();
  const child = spawn(process.execPath, [server], {
    stdio: ['ignore', 'pipe', 'pipe'],
    env: {
      PATH: process.env.PATH,
      NODE_ENV: 'test',
      PORT: String(port),
      DATABASE_URL: database.url,
      DATA_DIR: dataDirectory,
      WEB_DIST: webDist,
      SESSION_SECRET: randomBytes(32).toString('hex'),
      DEMO: 'on',
      LOG_LEVEL: 'warn',
    },
  });
  const log = collectOutput(child);
  const baseUrl = `http://127.0.0.1:${port}`;
  await untilHealthy(baseUrl, child, log);
  return {
    baseUrl,
    stop: async () => {
      await ended(child);
      await database.drop();
      rmSync(dataDirectory, { recursive: true, force: true });
    },
  };
}

/** The person of the demonstration who holds a role. */
export function personOf(role: DemoPerson['role']): DemoPerson {
  const person = demoPeople.find((candidate) => candidate.role === role);
  if (!person) throw new Error(`The demonstration has no ${role}`);
  return person;
}

async function createDatabase(): Promise<{ url: string; drop: () => Promise<void> }> {
  const adminUrl = process.env.TEST_DATABASE_URL;
  if (!adminUrl) throw new Error('Set TEST_DATABASE_URL to an administrator address of a PostgreSQL server');
  const name = `overtally_browser_${randomUUID().replaceAll('-', '')}`;
  const run = async (statement: string) => {
    const client = new pg.Client({ connectionString: adminUrl });
    await client.connect();
    await client.query(statement).finally(() => client.end());
  };
  await run(`create database ${name}`);
  const url = new URL(adminUrl);
  url.pathname = `/${name}`;
  return { url: url.href, drop: () => run(`drop database ${name} with (force)`) };
}

async function freePort(): Promise<number> {
  const probe = createServer();
  await new Promise<void>((resolve) => probe.listen(0, '127.0.0.1', resolve));
  const { port } = probe.address() as AddressInfo;
  await new Promise((resolve) => probe.close(resolve));
  return port;
}

function collectOutput(child: ChildProcess): () => string {
  const parts: string[] = [];
  child.stdout?.on('data', (part: Buffer) => parts.push(part.toString()));
  child.stderr?.on('data', (part: Buffer) => parts.push(part.toString()));
  return () => parts.join('');
}

async function untilHealthy(baseUrl: string, child: ChildProcess, log: () => string): Promise<void> {
  const deadline = Date.now() + 120_000;
  while (Date.now() < deadline) {
    if (child.exitCode !== null) throw new Error(`The server ended with ${child.exitCode}:\n${log()}`);
    const answer = await fetch(`${baseUrl}/api/health`).catch(() => null);
    if (answer?.ok) return;
    await new Promise((resolve) => setTimeout(resolve, 200));
  }
  throw new Error(`The server was not ready in 120 s:\n${log()}`);
}

async function ended(child: ChildProcess): Promise<void> {
  if (child.exitCode !== null) return;
  const exit = new Promise((resolve) => child.once('exit', resolve));
  child.kill('SIGTERM');
  await exit;
}
