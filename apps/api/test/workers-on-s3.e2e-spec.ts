import { reportSchema, verdictSchema, type Recording } from '@overtally/contracts';
import { sql } from 'drizzle-orm';
import type { ChildProcess } from 'node:child_process';
import { createHash } from 'node:crypto';
import { setTimeout as wait } from 'node:timers/promises';
import { afterAll, beforeAll, expect, it } from 'vitest';
import { csvOf, repeated, squareThdFPercent, squareWave, wavOf } from './support/captures.js';
import { classAVerdict } from './support/finished-analysis.js';
import { settled, upload } from './support/recordings.js';
import { startBucket, type Store } from './support/stores.js';
import { startTestApp, type TestApp } from './support/test-app.js';
import { kill, spawnWorker } from './support/workers.js';

const sampleRateHz = 10_000;
const cycles = squareWave(sampleRateHz, 20_000);
const current = csvOf(cycles, sampleRateHz, { header: 'time (s),i (A)' });
const long = wavOf([repeated(cycles, 1_000_000)], sampleRateHz);

let store: Store;
let test: TestApp;
let workers: ChildProcess[];

beforeAll(async () => {
  store = await startBucket();
  test = await startTestApp({ ...store.environment, WORKER: 'off' });
  workers = [spawnWorker(test, store.environment), spawnWorker(test, store.environment)];
});
afterAll(async () => {
  await Promise.all(workers.map(kill));
  await test.close();
  await store.stop();
});

/** Notes which workers hold jobs, until `signal` fires. */
async function watchWorkers(signal: AbortSignal): Promise<Set<string>> {
  const seen = new Set<string>();
  while (!signal.aborted) {
    const { rows } = await test.database.execute<{ worker: string }>(
      sql`select locked_by as worker from graphile_worker._private_jobs where locked_by is not null and payload::text <> '{}'`,
    );
    for (const { worker } of rows) seen.add(worker);
    await wait(10);
  }
  return seen;
}

it('two worker processes bring captures in a bucket to an issued report', { timeout: 120_000 }, async () => {
  const technician = await test.signIn('technician');
  const analyst = await test.signIn('analyst');
  const manager = await test.signIn('manager');
  const stop = new AbortController();
  const watching = watchWorkers(stop.signal);

  const uploaded: Recording[] = [];
  for (let n = 0; n < 3; n += 1) {
    uploaded.push(await upload(technician, test.project.id, current, `current-${n}.csv`));
    uploaded.push(await upload(technician, test.project.id, long, `long-${n}.wav`));
  }
  const ready = await Promise.all(uploaded.map(({ id }) => settled(technician, id, 90_000)));
  stop.abort();
  expect((await watching).size).toBe(2);
  for (const { status, summaries } of ready) {
    expect(status).toBe('ready');
    // Closed form: a square wave has THD-F = sqrt(sum of 1/n²) over its odd orders.
    expect(Math.abs(summaries[0]!.thdFPercent! - squareThdFPercent)).toBeLessThan(0.01);
  }

  const [recording] = ready;
  const source = await technician.get(`/api/recordings/${recording!.id}/source`).buffer(true).expect(200);
  expect(createHash('sha256').update(source.body).digest('hex')).toBe(recording!.file.sha256);

  const judged = await analyst
    .post(`/api/analyses/${recording!.latestAnalysisId}/verdicts`)
    .send(classAVerdict({ channel: 0 }))
    .expect(201);
  const verdict = verdictSchema.parse(judged.body);
  // Order 3 of a square wave of 1 A is 0.3 A rms; class A allows 2.30 A (IEC 61000-3-2, table 1).
  expect(verdict.orders.find(({ order }) => order === 3)).toMatchObject({ limit: 2.3, result: 'pass' });
  const draft = await analyst
    .post(`/api/projects/${test.project.id}/reports`)
    .send({ title: 'Current of a square wave', verdictIds: [verdict.id] })
    .expect(201);
  await analyst.post(`/api/reports/${draft.body.id}/submit`).send({}).expect(200);
  const issued = await manager.post(`/api/reports/${draft.body.id}/issue`).send({}).expect(200);
  const pdf = await technician.get(`/api/reports/${draft.body.id}/pdf`).responseType('blob').expect(200);
  expect(createHash('sha256').update(pdf.body).digest('hex')).toBe(reportSchema.parse(issued.body).pdfSha256);
});
