import type { Analysis, Recording } from '@overtally/contracts';
import { uniformSource } from '@overtally/fixtures';
import { sql } from 'drizzle-orm';
import { setTimeout as wait } from 'node:timers/promises';
import type TestAgent from 'supertest/lib/agent.js';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { AppConfig } from '../dist/config/app-config.js';
import { openStorage } from '../dist/storage/open-storage.js';
import { csvOf, repeated, squareThdFPercent, squareWave, wavOf } from './support/captures.js';
import { settled, upload } from './support/recordings.js';
import { startTestApp, type TestApp } from './support/test-app.js';
import { kill, spawnWorker } from './support/workers.js';

/** How often a worker is killed; more by hand: KILLS=30. */
const kills = Number(process.env.KILLS ?? 5);
/** Seed of the moments, so that a run can be repeated. */
const seed = Number(process.env.KILL_SEED ?? 20261201);

const sampleRateHz = 10_000;
const cycles = squareWave(sampleRateHz, 20_000);
const table = csvOf(squareWave(sampleRateHz, 40_000), sampleRateHz);
const long = wavOf(
  Array.from({ length: 2 }, () => repeated(cycles, 1_500_000)),
  sampleRateHz,
);

describe('workers killed at random moments', () => {
  let test: TestApp;
  let technician: TestAgent;

  beforeAll(async () => {
    test = await startTestApp({ WORKER: 'off' });
    technician = await test.signIn('technician');
  });
  afterAll(() => test.close());

  /** Recordings that a worker holds a job of, by worker. */
  async function held(): Promise<{ worker: string; id: string }[]> {
    const { rows } = await test.database.execute<{ worker: string; id: string }>(
      sql`select j.locked_by as worker, coalesce(j.payload->>'recordingId', a.recording_id::text) as id
          from graphile_worker._private_jobs j left join analyses a on a.id::text = j.payload->>'analysisId'
          where j.locked_by is not null and j.payload::text <> '{}'`,
    );
    return rows;
  }

  /** What a worker that was not there before is at, once it is at something. */
  async function takenUp(before: ReadonlySet<string>): Promise<string[]> {
    const end = Date.now() + 40_000;
    for (;;) {
      const own = (await held()).filter(({ worker }) => !before.has(worker));
      if (own.length > 0) return own.map(({ id }) => id);
      if (Date.now() > end) throw new Error('No worker took up a job');
      await wait(5);
    }
  }

  /** One finished analysis, exact figures, and files of full length; or a reason. */
  async function expectWhole(recording: Recording): Promise<void> {
    const { id } = recording;
    const { body } = await technician.get(`/api/recordings/${id}/analyses`).expect(200);
    const analyses = body.items as Analysis[];
    expect(analyses.filter(({ status }) => status === 'queued' || status === 'running')).toEqual([]);
    if (recording.status === 'failed') {
      expect(recording.problem?.message).not.toBe('');
      return;
    }
    expect(analyses.filter(({ status }) => status === 'done')).toHaveLength(1);
    // Closed form: a square wave has THD-F = sqrt(sum of 1/n²) over its odd orders.
    for (const { thdFPercent } of recording.summaries)
      expect(Math.abs(thdFPercent! - squareThdFPercent)).toBeLessThan(0.01);
    const toS = recording.durationS!;
    for (const { index } of recording.channels) {
      const end = `channel=${index}&fromS=${toS - 0.01}&toS=${toS}`;
      const waveform = await technician.get(`/api/recordings/${id}/waveform?${end}`).expect(200);
      expect(waveform.body.values.filter(Number.isFinite).length).toBeGreaterThanOrEqual(99);
      await technician
        .get(`/api/analyses/${recording.latestAnalysisId}/spectrum?channel=${index}`)
        .expect(200);
      await technician.get(`/api/analyses/${recording.latestAnalysisId}/series?channel=${index}`).expect(200);
    }
  }

  it(
    `leave every recording ready, or failed with a reason, once, after ${kills} kills (seed ${seed})`,
    { timeout: 60_000 + kills * 30_000 },
    async () => {
      const random = uniformSource(seed);
      const uploaded: string[] = [];
      const hit = new Set<string>();
      const dead = new Set<string>();
      for (let n = 0; n < kills; n += 1) {
        const isLong = random() < 0.6;
        const bytes = isLong ? long : table;
        const made = await upload(technician, test.project.id, bytes, `kill-${n}.${isLong ? 'wav' : 'csv'}`);
        uploaded.push(made.id);
        const doomed = spawnWorker(test);
        await takenUp(dead);
        await wait(random() * 1500);
        const own = (await held()).filter(({ worker }) => !dead.has(worker));
        await kill(doomed);
        for (const { worker, id } of own) {
          hit.add(id);
          dead.add(worker);
        }
      }
      expect(hit.size).toBeGreaterThanOrEqual(Math.min(3, kills));
      const heir = spawnWorker(test);
      const ends: Recording[] = [];
      for (const id of uploaded) ends.push(await settled(technician, id, 60_000 + kills * 10_000));
      for (const recording of ends) await expectWhole(recording);
      // A job that was lost three times ends with a reason; most are taken up again and end well.
      const ready = ends.filter(({ status }) => status === 'ready').length;
      expect(ready).toBeGreaterThan(0);
      await kill(heir);
      console.info(
        `${kills} kills hit ${hit.size} recordings: ${ready} ready, ${ends.length - ready} with a reason`,
      );
      await expectNothingElse(uploaded);
    },
  );

  /** Nothing lies in storage but what the recordings refer to. */
  async function expectNothingElse(ids: readonly string[]): Promise<void> {
    const storage = await openStorage(test.app.get(AppConfig).storage);
    const { rows } = await test.database.execute<{ key: string }>(
      sql`select source_key as key from recordings
          union select samples_key from channels union select pyramid_key from channels
          union select spectrum_key from analysis_channels union select series_key from analysis_channels`,
    );
    const referred = new Set(rows.map(({ key }) => key));
    for (const id of ids) {
      const found: string[] = [];
      for await (const { key } of storage.list(`recordings/${id}/`)) found.push(key);
      for (const key of found) expect([...referred]).toContain(key);
    }
    for (const key of referred) if (key !== null) expect(await storage.size(key)).toBeGreaterThan(0);
  }
});
