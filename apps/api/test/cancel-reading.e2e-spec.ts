import type { Analysis, Recording } from '@overtally/contracts';
import { sql } from 'drizzle-orm';
import type TestAgent from 'supertest/lib/agent.js';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { readRecordingJob } from '../dist/jobs/definitions/read-recording.job.js';
import { recordingPrefix } from '../dist/recordings/recording-keys.js';
import { ReadRecordingHandler } from '../dist/recordings/reading/read-recording.handler.js';
import { Storage } from '../dist/storage/storage.js';
import { csvOf, repeated, squareWave, wavOf } from './support/captures.js';
import { eventually, settled, upload } from './support/recordings.js';
import { startTestApp, type TestApp } from './support/test-app.js';
import { startWorker } from './support/workers.js';

const rateHz = 10_000;
const cycles = squareWave(rateHz, 2_000);
const capture = csvOf(cycles, rateHz);
/** Some seconds of reading on any machine. */
const long = wavOf([repeated(cycles, 40_000_000)], rateHz);

const cancelled = { status: 'failed', problem: { code: 'reading-cancelled' } };
const context = { signal: new AbortController().signal };

let test: TestApp;
let technician: TestAgent;

beforeAll(async () => {
  test = await startTestApp({ WORKER: 'off' });
  technician = await test.signIn('technician');
});
afterAll(() => test.close());

const cancel = (id: string) => technician.post(`/api/recordings/${id}/cancel-reading`);
const get = async (id: string) =>
  (await technician.get(`/api/recordings/${id}`).expect(200)).body as Recording;
const newCapture = (name: string, bytes = capture) => upload(technician, test.project.id, bytes, name);

/** The jobs that wait to read a recording, as their handler gets them. */
async function queuedReadings(id: string) {
  const { rows } = await test.database.execute(
    sql`select payload from graphile_worker._private_jobs where payload->>'recordingId' = ${id}`,
  );
  return rows.map(({ payload }) => readRecordingJob.payload.parse(payload));
}

async function storedReadings(id: string): Promise<string[]> {
  const keys = new Set<string>();
  for await (const { key } of test.app.get(Storage, { strict: false }).list(recordingPrefix(id))) {
    if (key.includes('/reads/')) keys.add(key.split('/')[3]!);
  }
  return [...keys];
}

/** What a worker had under way goes soon after it notices. */
function expectStored(id: string, readings: number): Promise<void> {
  return expect.poll(() => storedReadings(id), { timeout: 10_000 }).toHaveLength(readings);
}

describe('a reading that is called off before it began', () => {
  it('leaves a recording that can be read again, and does nothing any more', async () => {
    const { id } = await newCapture('queued.csv');
    const readings = await queuedReadings(id);
    const { body } = await cancel(id).expect(202);
    expect(body).toMatchObject(cancelled);
    expect(body.problem.cure).toContain('Read it again');
    const handler = test.app.get(ReadRecordingHandler);
    for (const reading of readings) await handler.run(reading, context);
    expect(readings).toHaveLength(1);
    expect(await get(id)).toMatchObject(cancelled);
    expect(await storedReadings(id)).toEqual([]);
    expect((await cancel(id).expect(409)).body.code).toBe('not-being-read');
  });

  it('does not come back when the recording is read again under other options', async () => {
    const { id } = await newCapture('other.csv');
    const [first] = await queuedReadings(id);
    await cancel(id).expect(202);
    const options = { channels: [{ column: 1, name: 'U2' }] };
    await technician.post(`/api/recordings/${id}/read`).send(options).expect(202);
    const handler = test.app.get(ReadRecordingHandler);
    await handler.run(first!, context);
    expect(await get(id)).toMatchObject({ status: 'received', channels: [] });
    for (const reading of await queuedReadings(id)) await handler.run(reading, context);
    expect(await get(id)).toMatchObject({ import: options, channels: [{ name: 'U2' }] });
  });
});

describe('a reading that is called off while a worker has it', () => {
  let worker: Awaited<ReturnType<typeof startWorker>>;
  beforeAll(async () => {
    worker = await startWorker(test);
  });
  afterAll(() => worker.close());

  it('stops soon and leaves no samples', async () => {
    const { id } = await newCapture('long.wav', long);
    await eventually<Recording>(technician, `/api/recordings/${id}`, ({ progress }) => progress > 0);
    await cancel(id).expect(202);
    // The thread is free for the next recording long before it would have read all of this one.
    expect(await settled(technician, (await newCapture('next.csv')).id)).toMatchObject({ status: 'ready' });
    expect(await get(id)).toMatchObject(cancelled);
    await expectStored(id, 0);
  });

  it('gives the recording back as the earlier reading left it', async () => {
    const before = await settled(technician, (await newCapture('earlier.csv')).id);
    const { id } = before;
    const options = { channels: [{ column: 1, gain: 2 }] };
    await technician.post(`/api/recordings/${id}/read`).send(options).expect(202);
    const reply = await cancel(id);
    // The reading may have been quicker; then it stands.
    const after = await settled(technician, id);
    if (reply.status === 202) expect(after).toEqual(before);
    else expect(after).toMatchObject({ status: 'ready', import: options });
    await expectStored(id, 1);
    const analyses = (await technician.get(`/api/recordings/${id}/analyses`).expect(200)).body
      .items as Analysis[];
    expect(analyses.filter(({ supersededById }) => supersededById === null)).toHaveLength(1);
    await technician.get(`/api/recordings/${id}/waveform`).expect(200);
  });

  it('ends one way or the other whenever it is called off', { timeout: 60_000 }, async () => {
    for (let waitMs = 0; waitMs <= 320; waitMs += 40) {
      const { id } = await newCapture(`race-${waitMs}.csv`);
      await new Promise((resolve) => setTimeout(resolve, waitMs));
      const { status: reply } = await cancel(id);
      const { status, problem, channels } = await settled(technician, id);
      expect([202, 409]).toContain(reply);
      if (reply === 202) expect({ status, problem, channels }).toMatchObject({ ...cancelled, channels: [] });
      else expect({ status, channels: channels.length }).toEqual({ status: 'ready', channels: 1 });
      await expectStored(id, reply === 202 ? 0 : 1);
    }
  });
});

describe('an analysis that another reading had called off', () => {
  it('is made anew when that reading is called off in turn', async () => {
    const { id } = await newCapture('again.csv');
    const handler = test.app.get(ReadRecordingHandler);
    for (const reading of await queuedReadings(id)) await handler.run(reading, context);
    expect((await get(id)).status).toBe('analysing');
    await technician.post(`/api/recordings/${id}/read`).send({}).expect(202);
    await cancel(id).expect(202);
    const worker = await startWorker(test);
    expect(await settled(technician, id)).toMatchObject({ status: 'ready', problem: null });
    await worker.close();
  });
});
