import type { INestApplicationContext } from '@nestjs/common';
import type { Recording } from '@overtally/contracts';
import { sql } from 'drizzle-orm';
import { utimes } from 'node:fs/promises';
import { join } from 'node:path';
import type TestAgent from 'supertest/lib/agent.js';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { AppConfig } from '../dist/config/app-config.js';
import { Storage } from '../dist/storage/storage.js';
import { ClearStorageHandler } from '../dist/worker/clear-storage.handler.js';
import { csvOf, squareThdFPercent, squareWave } from './support/captures.js';
import { settled, upload } from './support/recordings.js';
import { stores, type Store } from './support/stores.js';
import { startTestApp, type TestApp } from './support/test-app.js';
import { startWorker } from './support/workers.js';

const dayMs = 24 * 3600 * 1000;
const sampleRateHz = 10_000;
const capture = csvOf(squareWave(sampleRateHz, 5_000), sampleRateHz);
const missing = { status: 500, code: 'stored-file-missing' };

describe.each(stores)('files of recordings on %s', (kind, start) => {
  let store: Store;
  let test: TestApp;
  let technician: TestAgent;
  let worker: INestApplicationContext;
  let storage: Storage;
  let recording: Recording;

  beforeAll(async () => {
    store = await start();
    test = await startTestApp({ ...store.environment, WORKER: 'off' });
    technician = await test.signIn('technician');
    worker = await startWorker(test);
    storage = worker.get(Storage);
  });
  afterAll(async () => {
    await worker.close();
    await test.close();
    await store.stop();
  });

  const removeOrphans = (now: number) =>
    worker.get(ClearStorageHandler).removeOrphans(now, new AbortController().signal);

  async function keys(): Promise<string[]> {
    const found: string[] = [];
    for (const prefix of ['projects/', 'recordings/', 'reports/'])
      for await (const { key } of storage.list(prefix)) found.push(key);
    return found.sort();
  }

  it('removes nothing where the database refers to none of them', async () => {
    const key = `reports/${crypto.randomUUID()}/revision-1.pdf`;
    await storage.put(key, Buffer.from('%PDF'));
    expect(await removeOrphans(Date.now() + 2 * dayMs)).toBe(0);
    expect(await keys()).toEqual([key]);
    await storage.delete(key);
  });

  it('go from the upload to the analysis and back', { timeout: 90_000 }, async () => {
    const { id } = await upload(technician, test.project.id, capture, 'stored.csv');
    recording = await settled(technician, id, 60_000);
    expect(recording).toMatchObject({ status: 'ready', problem: null });
    // Closed form: a square wave has THD-F = sqrt(sum of 1/n²) over its odd orders.
    expect(Math.abs(recording.summaries[0]!.thdFPercent! - squareThdFPercent)).toBeLessThan(0.01);
    const source = await technician.get(`/api/recordings/${id}/source`).buffer(true).expect(200);
    expect(source.body).toEqual(capture);
    const part = await technician.get(`/api/recordings/${id}/source`).set('Range', 'bytes=3-5').expect(206);
    expect(part.body).toEqual(capture.subarray(3, 6));
    const waveform = await technician.get(`/api/recordings/${id}/waveform?toS=0.01`).expect(200);
    expect(waveform.body.values).toHaveLength(100);
  });

  it('are cleared of what no row refers to once it is a day old, and of nothing else', async () => {
    const inUse = await keys();
    // Source, samples and pyramid, spectrum and series.
    expect(inUse.length).toBeGreaterThanOrEqual(5);
    const id = crypto.randomUUID();
    const orphans = [
      `projects/${test.project.id}/sources/${'0'.repeat(64)}`,
      `recordings/${recording.id}/reads/${id}/channel-0.npy`,
      `recordings/${recording.id}/analyses/${id}/channel-0-spectrum.npy`,
      `recordings/${id}/reads/${id}/channel-0.npy`,
      `reports/${id}/revision-1.pdf`,
    ];
    const foreign = ['projects/readme.txt', 'reports/archive/2025.pdf'];
    for (const key of [...orphans, ...foreign]) await storage.put(key, Buffer.from('bytes'));
    expect(await removeOrphans(Date.now() + dayMs - 60_000)).toBe(0);
    expect(await keys()).toEqual([...inUse, ...orphans, ...foreign].sort());
    expect(await removeOrphans(Date.now() + dayMs + 60_000)).toBe(orphans.length);
    expect(await keys()).toEqual([...inUse, ...foreign].sort());
    for (const key of foreign) await storage.delete(key);
  });

  it('of a reading or an analysis under way are left alone', async () => {
    const key = `recordings/${recording.id}/reads/${crypto.randomUUID()}/channel-0.npy`;
    await storage.put(key, Buffer.from('bytes'));
    await test.database.execute(sql`update recordings set status = 'reading' where id = ${recording.id}`);
    expect(await removeOrphans(Date.now() + 2 * dayMs)).toBe(0);
    await test.database.execute(sql`update recordings set status = 'ready' where id = ${recording.id}`);
    expect(await removeOrphans(Date.now() + 2 * dayMs)).toBe(1);
  });

  it('are cleared every day', async () => {
    const { rows } = await test.database.execute(
      sql`select identifier from graphile_worker._private_known_crontabs`,
    );
    expect(rows).toContainEqual({ identifier: 'clear-storage' });
  });

  // The time of writing can be set on disk alone.
  it.runIf(kind === 'disk')('are cleared when a worker starts', async () => {
    const key = `recordings/${recording.id}/reads/${crypto.randomUUID()}/channel-0.npy`;
    await storage.put(key, Buffer.from('bytes'));
    const twoDaysAgo = (Date.now() - 2 * dayMs) / 1000;
    await utimes(join(test.app.get(AppConfig).dataDir, 'storage', key), twoDaysAgo, twoDaysAgo);
    const second = await startWorker(test);
    await expect.poll(() => storage.exists(key), { timeout: 20_000 }).toBe(false);
    await second.close();
  });

  it('are named as missing on the routes of the recording', async () => {
    const path = `/api/recordings/${recording.id}`;
    for (const key of await keys()) await storage.delete(key);
    const source = await technician.get(`${path}/source`).expect(500);
    expect(source.body).toMatchObject(missing);
    expect(source.headers['content-type']).toMatch('application/problem+json');
    expect(source.headers).not.toHaveProperty('content-disposition');
    const ranged = await technician.get(`${path}/source`).set('Range', 'bytes=0-1').expect(500);
    expect(ranged.body).toMatchObject(missing);
    expect(ranged.headers).not.toHaveProperty('content-range');
    expect((await technician.get(`${path}/waveform`).expect(500)).body).toMatchObject(missing);
    expect((await technician.get(`${path}/samples?channel=0`).expect(500)).body).toMatchObject(missing);
    await technician.get(path).expect(200);
  });

  it('are named as missing by a reading that wants them', { timeout: 90_000 }, async () => {
    const read = await technician.post(`/api/recordings/${recording.id}/read`).send({});
    expect(read.status).toBeLessThan(300);
    expect(await settled(technician, recording.id, 60_000)).toMatchObject({
      status: 'failed',
      problem: { code: 'stored-file-missing' },
    });
  });
});
