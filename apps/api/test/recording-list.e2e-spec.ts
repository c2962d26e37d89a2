import type { Analysis, Recording } from '@overtally/contracts';
import type TestAgent from 'supertest/lib/agent.js';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { encodeCursor } from '../dist/common/paging.js';
import { csvOf, squareWave } from './support/captures.js';
import { settled, upload } from './support/recordings.js';
import { startTestApp, type TestApp } from './support/test-app.js';

const sampleRateHz = 10_000;
const wave = squareWave(sampleRateHz, 5_000);

let test: TestApp;
let technician: TestAgent;

beforeAll(async () => {
  test = await startTestApp({ WORKER: 'embedded' });
  technician = await test.signIn('technician');
});
afterAll(() => test.close());

const list = (query: Record<string, string | number> = {}) =>
  technician.get(`/api/projects/${test.project.id}/recordings`).query(query);

describe('list of several recordings', () => {
  it('gives each the orders of its own analysis', async () => {
    const sine = Float64Array.from(wave, (_, n) => 7 * Math.sin((2 * Math.PI * 50 * n) / sampleRateHz));
    for (const [name, samples] of Object.entries({ square: wave, sine })) {
      const { id } = await upload(technician, test.project.id, csvOf(samples, sampleRateHz), `${name}.csv`);
      await settled(technician, id);
    }
    const items = (await list().expect(200)).body.items as Recording[];
    expect(items.map(({ name }) => name)).toEqual(['sine', 'square']);
    for (const { latestAnalysisId, summaries } of items) {
      const reply = await technician.get(`/api/analyses/${latestAnalysisId}`).expect(200);
      const { harmonics } = (reply.body as Analysis).channels[0]!;
      expect(summaries.map(({ harmonicRms }) => harmonicRms)).toEqual([harmonics.map(({ rms }) => rms)]);
    }
    // Order 3: none in the sine, 4 / (3 pi sqrt 2) in the square wave (its Fourier series).
    expect(items[0]!.summaries[0]!.harmonicRms[2]).toBeCloseTo(0, 6);
    expect(items[1]!.summaries[0]!.harmonicRms[2]).toBeCloseTo(4 / (3 * Math.PI * Math.SQRT2), 4);
  });
});

describe('a cursor that is not of the order asked for', () => {
  const id = '3f1c7a52-9d0e-4b7a-8c21-5e6f7a8b9c0d';

  it.each([
    ['number', 'Rectifier'],
    ['number', 2 ** 40],
    ['number', 1.5],
    ['createdAt', 'Rectifier'],
    ['createdAt', 7],
    ['name', 7],
    ['name', 'NUL \0'],
  ])('by %s after %j is refused', async (sort, value) => {
    for (const direction of ['', '-']) {
      const cursor = encodeCursor([value, id]);
      const { body } = await list({ sort: `${direction}${sort}`, cursor }).expect(400);
      expect(body.errors[0].path).toBe('cursor');
    }
  });
});
