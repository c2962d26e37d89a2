import type { Analysis, Recording } from '@overtally/contracts';
import { sql } from 'drizzle-orm';
import type TestAgent from 'supertest/lib/agent.js';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { analyseRecordingJob } from '../dist/jobs/definitions/analyse-recording.job.js';
import { readRecordingJob } from '../dist/jobs/definitions/read-recording.job.js';
import { JobsService } from '../dist/jobs/jobs.service.js';
import { csvOf, repeated, squareThdFPercent, squareWave, wavOf } from './support/captures.js';
import { eventually, settled, upload } from './support/recordings.js';
import { startTestApp, type TestApp } from './support/test-app.js';
import { kill, spawnWorker, startWorker } from './support/workers.js';

const sampleRateHz = 10_000;
const short = csvOf(squareWave(sampleRateHz, 5_000), sampleRateHz);
const samples = repeated(squareWave(sampleRateHz, 20_000), 1_000_000);
const long = wavOf(
  Array.from({ length: 3 }, () => samples),
  sampleRateHz,
);

let test: TestApp;
let technician: TestAgent;

beforeAll(async () => {
  test = await startTestApp({ WORKER: 'off' });
  technician = await test.signIn('technician');
});
afterAll(() => test.close());

async function analysesOf(recordingId: string): Promise<Analysis[]> {
  const { body } = await technician.get(`/api/recordings/${recordingId}/analyses`).expect(200);
  return body.items as Analysis[];
}

function inState(id: string, ...states: string[]): Promise<Recording> {
  return eventually<Recording>(technician, `/api/recordings/${id}`, ({ status }) => states.includes(status));
}

async function expectGoodFigures(id: string): Promise<void> {
  const recording = await settled(technician, id, 80_000);
  expect(recording).toMatchObject({ status: 'ready', problem: null });
  expect(Math.abs(recording.summaries[0]!.thdFPercent! - squareThdFPercent)).toBeLessThan(0.01);
  expect((await analysesOf(id)).filter(({ status }) => status === 'done')).toHaveLength(1);
}

describe('a worker beside the API', () => {
  it('leaves a recording waiting until one runs', async () => {
    const { id } = await upload(technician, test.project.id, short, 'waiting.csv');
    expect((await technician.get(`/api/recordings/${id}`)).body.status).toBe('received');
    const worker = await startWorker(test);
    await expectGoodFigures(id);
    await worker.close();
  });

  it('does each job once where two run and jobs were queued twice', async () => {
    const { id } = await upload(technician, test.project.id, short, 'twice.csv');
    const { rows } = await test.database.execute(sql`select read_id from recordings where id = ${id}`);
    const readId = String(rows[0]!.read_id);
    const jobs = test.app.get(JobsService);
    const repeat = () =>
      test.database.transaction((tx) =>
        jobs.enqueue(tx, readRecordingJob, {
          ...{ recordingId: id, readId, options: {}, readingRule: null },
          requestedById: test.people.technician.id,
        }),
      );
    await repeat();
    const workers = await Promise.all([startWorker(test), startWorker(test)]);
    await repeat();
    await expectGoodFigures(id);
    const [analysis] = await analysesOf(id);
    await test.database.transaction((tx) =>
      jobs.enqueue(tx, analyseRecordingJob, { analysisId: analysis!.id }),
    );
    await queueEmpty();
    await expectGoodFigures(id);
    expect(await analysesOf(id)).toHaveLength(1);
    await Promise.all(workers.map((worker) => worker.close()));
  });

  it('takes a job up again that a stop of the worker broke off', { timeout: 90_000 }, async () => {
    const first = await startWorker(test);
    const { id } = await upload(technician, test.project.id, long, 'stopped.wav');
    await inState(id, 'analysing');
    await eventually<{ items: Analysis[] }>(technician, `/api/recordings/${id}/analyses`, ({ items }) =>
      items.some(({ status }) => status === 'running'),
    );
    await first.close();
    expect((await technician.get(`/api/recordings/${id}`)).body).toMatchObject({
      status: 'analysing',
      problem: null,
    });
    const second = await startWorker(test);
    await expectGoodFigures(id);
    await second.close();
  });

  it('takes a job up again whose worker was killed', { timeout: 90_000 }, async () => {
    const { id } = await upload(technician, test.project.id, long, 'killed.wav');
    const doomed = spawnWorker(test);
    await inState(id, 'reading', 'analysing');
    await kill(doomed);
    const heir = await startWorker(test);
    await expectGoodFigures(id);
    await heir.close();
  });

  it('ends a recording whose last attempt was lost, so that nobody waits for it', async () => {
    const { id } = await upload(technician, test.project.id, short, 'lost.csv');
    await test.database.execute(
      sql`update graphile_worker._private_jobs set attempts = max_attempts where payload->>'recordingId' = ${id}`,
    );
    const worker = await startWorker(test);
    expect(await settled(technician, id)).toMatchObject({
      status: 'failed',
      problem: { code: 'internal-error' },
    });
    await queueEmpty();
    await worker.close();
  });
});

describe('reading that fails for reasons of the installation', () => {
  it(
    'is tried again, then ends with a problem that does not blame the file',
    { timeout: 90_000 },
    async () => {
      const { id } = await upload(technician, test.project.id, short.subarray(0, 5000), 'gone.csv');
      await test.database.execute(
        sql`update recordings set source_key = 'projects/none/sources/none' where id = ${id}`,
      );
      const worker = await startWorker(test);
      expect(await settled(technician, id)).toMatchObject({
        status: 'failed',
        problem: { code: 'stored-file-missing' },
      });
      await worker.close();
    },
  );
});

/** Waits until no job is left in the queue. */
async function queueEmpty(): Promise<void> {
  await expect
    .poll(async () => (await test.database.execute(sql`select id from graphile_worker.jobs`)).rows, {
      timeout: 20_000,
    })
    .toEqual([]);
}
