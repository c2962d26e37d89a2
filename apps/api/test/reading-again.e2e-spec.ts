import type { Analysis, Recording } from '@overtally/contracts';
import { sql } from 'drizzle-orm';
import { access } from 'node:fs/promises';
import { join } from 'node:path';
import type TestAgent from 'supertest/lib/agent.js';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { AppConfig } from '../dist/config/app-config.js';
import { readRecordingJob } from '../dist/jobs/definitions/read-recording.job.js';
import { ReadRecordingHandler } from '../dist/recordings/reading/read-recording.handler.js';
import { csvOf, squareWave } from './support/captures.js';
import { settled, upload } from './support/recordings.js';
import { startTestApp, type TestApp } from './support/test-app.js';
import { startWorker } from './support/workers.js';

const capture = csvOf(squareWave(10_000, 5_000), 10_000);
const stated = { channels: [{ column: 1, name: 'U1', unit: 'V', gain: 10 }] };

let test: TestApp;
let technician: TestAgent;
let analyst: TestAgent;

beforeAll(async () => {
  test = await startTestApp({ WORKER: 'off' });
  technician = await test.signIn('technician');
  analyst = await test.signIn('analyst');
});
afterAll(() => test.close());

const newCapture = (name: string) =>
  upload(technician, test.project.id, capture, name, { import: JSON.stringify(stated) });

async function analysesOf(id: string): Promise<Analysis[]> {
  return (await technician.get(`/api/recordings/${id}/analyses`).expect(200)).body.items as Analysis[];
}

describe('a recording that is read again', () => {
  let recording: Recording;

  it('keeps its options and figures when the new options do not fit', async () => {
    const worker = await startWorker(test);
    recording = await settled(technician, (await newCapture('again.csv')).id);
    expect(recording).toMatchObject({ status: 'ready', import: stated });
    const wrong = { channels: [{ column: 'no such column' }] };
    await technician.post(`/api/recordings/${recording.id}/read`).send(wrong).expect(202);
    expect(await settled(technician, recording.id)).toMatchObject({
      status: 'failed',
      problem: { code: 'unknown-column' },
      import: stated,
      channels: [{ name: 'U1', gain: 10 }],
      latestAnalysisId: recording.latestAnalysisId,
    });
    await worker.close();
  });

  it('names who had it read as the one who started the analysis', async () => {
    const worker = await startWorker(test);
    const options = { channels: [{ column: 1, name: 'U2' }] };
    await analyst.post(`/api/recordings/${recording.id}/read`).send(options).expect(202);
    expect(await settled(technician, recording.id)).toMatchObject({ status: 'ready', import: options });
    expect((await analysesOf(recording.id)).map(({ startedBy }) => startedBy.id)).toEqual([
      test.people.analyst.id,
      test.people.technician.id,
    ]);
    await worker.close();
  });

  it('keeps its earlier analyses readable, as superseded', async () => {
    const [latest, earlier] = await analysesOf(recording.id);
    expect(earlier).toMatchObject({ status: 'done', supersededById: latest!.id });
    const path = `/api/analyses/${earlier!.id}`;
    const { body } = await technician.get(path).expect(200);
    expect(body.channels[0]).toMatchObject({ name: 'U1', unit: 'V' });
    // The square wave of amplitude 1 under the gain of 10: its fundamental has the rms 10 x 4 / (pi sqrt(2)).
    const spectrum = (await technician.get(`${path}/spectrum`).expect(200)).body;
    expect(Math.max(...spectrum.rms)).toBeCloseTo((10 * 4) / (Math.PI * Math.SQRT2), 1);
    const series = (await technician.get(`${path}/series`).expect(200)).body;
    expect(series.unit).toBe('V');
    expect(series.value.length).toBeGreaterThan(0);
  });

  it('leaves nothing in the store when it is deleted, however its id is spelled', async () => {
    const folder = join(test.app.get(AppConfig).dataDir, 'storage', 'recordings', recording.id);
    await access(folder);
    await analyst.delete(`/api/recordings/${recording.id.toUpperCase()}`).expect(204);
    await expect(access(folder)).rejects.toThrow('ENOENT');
  });
});

it('a reading that runs twice at the same time keeps the samples', async () => {
  const { id } = await newCapture('twice.csv');
  const { rows } = await test.database.execute(
    sql`select payload from graphile_worker._private_jobs where payload->>'recordingId' = ${id}`,
  );
  const payload = readRecordingJob.payload.parse(rows[0]!.payload);
  const handler = test.app.get(ReadRecordingHandler);
  const context = { signal: new AbortController().signal };
  await Promise.all([handler.run(payload, context), handler.run(payload, context)]);
  const { body } = await technician.get(`/api/recordings/${id}/waveform?toS=0.01`).expect(200);
  expect(body.values).toHaveLength(100);
  // Nor does giving up a repeat that comes late take them away.
  await handler.giveUp(payload, { code: 'internal-error', message: 'Failed', cure: 'Try again' });
  await technician.get(`/api/recordings/${id}/waveform`).expect(200);
});
