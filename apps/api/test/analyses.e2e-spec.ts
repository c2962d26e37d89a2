import type { Analysis, Recording, Settings, Spectrum } from '@overtally/contracts';
import type TestAgent from 'supertest/lib/agent.js';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { repeated, squareWave, wavOf } from './support/captures.js';
import { ended, eventually, settled, upload } from './support/recordings.js';
import { startTestApp, type TestApp } from './support/test-app.js';

const sampleRateHz = 10_000;
const general: Settings = { profile: 'general', nominalFrequencyHz: 50 };

let test: TestApp;
let technician: TestAgent;
let recording: Recording;

beforeAll(async () => {
  test = await startTestApp({ WORKER: 'embedded' });
  technician = await test.signIn('technician');
  const samples = Float32Array.from(squareWave(sampleRateHz, 20_000));
  const { id } = await upload(technician, test.project.id, wavOf([samples], sampleRateHz), 'square.wav');
  recording = await settled(technician, id);
});
afterAll(() => test.close());

async function start(id: string, settings: Settings): Promise<Analysis> {
  const { body } = await technician.post(`/api/recordings/${id}/analyses`).send({ settings }).expect(202);
  return body as Analysis;
}

describe('an analysis under other settings', () => {
  it('is queued, computed and becomes the latest; the earlier one stands', async () => {
    const queued = await start(recording.id, { ...general, maxOrder: 7 });
    expect(queued).toMatchObject({ status: 'queued', channels: [], engineVersion: null, finishedAt: null });
    const done = await ended(technician, queued.id);
    expect(done).toMatchObject({
      status: 'done',
      progress: 1,
      settings: { profile: 'general', maxOrder: 7 },
    });
    expect(done.channels[0]!.harmonics.map(({ order }) => order)).toEqual([1, 2, 3, 4, 5, 6, 7]);
    // 100 sqrt(1/9 + 1/25 + 1/49) percent, the orders 3, 5 and 7 of the square wave.
    const expected = 100 * Math.sqrt(1 / 9 + 1 / 25 + 1 / 49);
    expect(Math.abs(done.channels[0]!.thdFPercent! - expected)).toBeLessThan(0.01);
    const after = await settled(technician, recording.id);
    expect(after.latestAnalysisId).toBe(done.id);
    const { body } = await technician.get(`/api/recordings/${recording.id}/analyses`).expect(200);
    expect((body.items as Analysis[]).map(({ id, supersededById }) => ({ id, supersededById }))).toEqual([
      { id: done.id, supersededById: null },
      { id: recording.latestAnalysisId, supersededById: null },
    ]);
  });

  it('keeps to the span that is asked for', async () => {
    const done = await ended(
      technician,
      (await start(recording.id, { ...general, span: { fromS: 0.5, toS: 1 } })).id,
    );
    expect(done.settings.span).toEqual({ fromS: 0.5, toS: 1 });
    const { body } = await technician.get(`/api/analyses/${done.id}/spectrum`).expect(200);
    // Half a second of record resolves 2 Hz.
    expect((body as Spectrum).resolutionHz).toBeGreaterThanOrEqual(2);
  });

  it('fails with a cure where the span lies outside the record, and leaves the recording ready', async () => {
    const failed = await ended(
      technician,
      (await start(recording.id, { ...general, span: { fromS: 5, toS: 6 } })).id,
    );
    expect(failed).toMatchObject({ status: 'failed', problem: { code: 'span-outside-record' } });
    expect(await settled(technician, recording.id)).toMatchObject({ status: 'ready', problem: null });
  });

  it('is refused with the place of what is wrong', async () => {
    const settings = { profile: 'mains', nominalFrequencyHz: 'often', span: { fromS: 2, toS: 1 } };
    const { body } = await technician
      .post(`/api/recordings/${recording.id}/analyses`)
      .send({ settings })
      .expect(400);
    const paths = (body.errors as { path: string }[]).map(({ path }) => path);
    expect(paths).toContain('settings.nominalFrequencyHz');
  });
});

describe('spectrum', () => {
  it('keeps the peaks when it is thinned', async () => {
    const path = `/api/analyses/${recording.latestAnalysisId}/spectrum`;
    const { body: full } = (await technician.get(path).query({ maxPoints: 20_000 }).expect(200)) as {
      body: Spectrum;
    };
    const { body: thin } = (await technician.get(path).query({ maxPoints: 200 }).expect(200)) as {
      body: Spectrum;
    };
    expect(thin.rms.length).toBeLessThanOrEqual(200);
    const run = Math.ceil(full.rms.length / 200);
    thin.rms.forEach((rms, i) => {
      const part = full.rms.slice(i * run, (i + 1) * run);
      expect(rms).toBe(Math.max(...part));
      expect(thin.frequencyHz[i]).toBe(full.frequencyHz[i * run + part.indexOf(rms)]);
    });
    // The fundamental: 4 / (pi sqrt 2) at 50 Hz, on a line of the two-second record.
    const peak = full.rms.indexOf(Math.max(...full.rms));
    expect(full.frequencyHz[peak]).toBeCloseTo(50, 6);
    expect(full.rms[peak]).toBeCloseTo(4 / (Math.PI * Math.SQRT2), 2);
  });

  it('is not there for a channel that is not', async () => {
    await technician.get(`/api/analyses/${recording.latestAnalysisId}/spectrum?channel=1`).expect(404);
  });
});

describe('calling off', () => {
  it('ends a running analysis as cancelled, and a second request is told so', async () => {
    const wave = repeated(squareWave(sampleRateHz, 20_000), 1_000_000);
    const long = Array.from({ length: 8 }, () => wave);
    const { id } = await upload(technician, test.project.id, wavOf(long, sampleRateHz), 'long.wav');
    await eventually<Recording>(technician, `/api/recordings/${id}`, ({ status }) => status === 'analysing');
    const { body: list } = await technician.get(`/api/recordings/${id}/analyses`).expect(200);
    const analysisId = (list.items as Analysis[])[0]!.id;
    await eventually<Analysis>(
      technician,
      `/api/analyses/${analysisId}`,
      ({ status }) => status === 'running',
    );
    await technician.post(`/api/analyses/${analysisId}/cancel`).expect(202);
    const cancelled = await ended(technician, analysisId);
    expect(cancelled).toMatchObject({
      status: 'failed',
      problem: { code: 'cancelled', message: 'Cancelled on request' },
      channels: [],
    });
    expect(await settled(technician, id)).toMatchObject({ status: 'failed', problem: { code: 'cancelled' } });
    await technician.post(`/api/analyses/${analysisId}/cancel`).expect(409);
  });

  it('is closed to guests', async () => {
    const guest = await test.signIn('guest');
    await guest.post(`/api/analyses/${recording.latestAnalysisId}/cancel`).expect(403);
  });
});
