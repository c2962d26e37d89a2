import { Logger } from '@nestjs/common';
import { openPool } from '@overtally/db';
import { randomUUID } from 'node:crypto';
import type { Pool } from 'pg';
import { afterAll, afterEach, beforeAll, beforeEach, expect, inject, it } from 'vitest';
import { WorkerLease } from '../dist/worker/worker-lease.js';
import { databaseUrl, onServer } from './support/database-server.js';
import { Relay } from './support/relay.js';

const name = `overtally_test_${randomUUID().replaceAll('-', '')}`;
const workerId = `worker-${randomUUID()}`;
const server = new URL(databaseUrl(name));

let relay: Relay;
let relayPort: number;
let observer: Pool;
let pool: Pool;
let lease: WorkerLease;

beforeAll(async () => {
  Logger.overrideLogger(false);
  await onServer(`create database ${name} template ${inject('templateDatabase')}`);
  observer = openPool(server.href, 1);
  relay = new Relay({ host: server.hostname, port: Number(server.port || 5432) });
  relayPort = await relay.listen();
});
beforeEach(() => {
  // One connection: a lease that does not give a lost one back can never take another.
  pool = openPool(Object.assign(new URL(server), { port: relayPort }).href, 1);
  lease = new WorkerLease(pool, workerId, 200);
});
afterEach(async () => {
  lease.release();
  await pool.end();
});
afterAll(async () => {
  relay.close();
  await observer.end();
  await onServer(`drop database ${name} with (force)`);
});

/** Process ids of the sessions that hold the lock. */
async function holders(): Promise<number[]> {
  const { rows } = await observer.query<{ pid: number }>(
    `select pid from pg_locks where locktype = 'advisory' and granted
       and objid::bigint = hashtext($1)::bigint & 4294967295`,
    [workerId],
  );
  return rows.map(({ pid }) => pid);
}

it('is held by one session, however often it is asked for', async () => {
  await lease.hold();
  const first = await holders();
  await lease.hold();
  expect(first).toHaveLength(1);
  expect(await holders()).toEqual(first);
});

it('is taken anew after the server has ended the session', async () => {
  await lease.hold();
  await observer.query('select pg_terminate_backend($1)', await holders());
  await expect.poll(() => pool.totalCount).toBe(0);
  await lease.hold();
  expect(await holders()).toHaveLength(1);
});

it('is taken anew after the connection was lost without a word', async () => {
  await lease.hold();
  const before = await holders();
  relay.loseAll();
  await expect.poll(holders).toEqual([]);
  await lease.hold();
  const after = await holders();
  expect(after).toHaveLength(1);
  expect(after).not.toEqual(before);
});
