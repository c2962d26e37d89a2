import type { ImportPreview } from '@overtally/contracts';
import type TestAgent from 'supertest/lib/agent.js';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { csvOf, squareWave } from './support/captures.js';
import { newProject } from './support/factories.js';
import { startTestApp, type TestApp } from './support/test-app.js';

const rateHz = 10_000;
const samples = squareWave(rateHz, 4_000);
const capture = csvOf(samples, rateHz);
/** rms of the square wave cut off above order 39: root of the sum of (4/(pi h))^2 / 2 over odd h, in V. */
const squareRms = Math.sqrt(
  Array.from({ length: 20 }, (_, i) => 2 * i + 1).reduce((sum, h) => sum + (4 / (Math.PI * h)) ** 2 / 2, 0),
);
const tenfold = { channels: [{ column: 'u', name: 'U1', gain: 10 }] };

let test: TestApp;
let technician: TestAgent;

beforeAll(async () => {
  test = await startTestApp();
  technician = await test.signIn('technician');
});
afterAll(() => test.close());

const ask = (head: Buffer, fields: Record<string, string> = {}, projectId = test.project.id) =>
  technician
    .post(`/api/projects/${projectId}/import-preview`)
    .field({ fileName: 'bench.csv', sizeBytes: String(head.length), ...fields })
    .attach('head', head, 'bench.csv');

async function preview(...asked: Parameters<typeof ask>): Promise<ImportPreview> {
  return (await ask(...asked).expect(200)).body as ImportPreview;
}

describe('the signals of a preview', () => {
  it('come scaled as they would be read, with their rms, peak and fundamental', async () => {
    const { signals, clockColumns, options } = await preview(capture, { import: JSON.stringify(tenfold) });
    expect({ clockColumns, options }).toEqual({ clockColumns: [0], options: tenfold });
    expect(signals).toMatchObject([{ name: 'U1', quantity: 'voltage', unit: 'V', startS: 0 }]);
    const [{ rms, peak, fundamentalHz, values, stepS }] = signals as [ImportPreview['signals'][number]];
    expect(values[7]).toBeCloseTo(10 * samples[7]!, 9);
    expect(stepS).toBeCloseTo(1 / rateHz, 12);
    // Twenty whole cycles.
    expect(rms).toBeCloseTo(10 * squareRms, 6);
    expect(peak).toBeCloseTo(10 * Math.max(...samples), 9);
    expect(fundamentalHz).toBeCloseTo(50, 3);
  });

  it('have no fundamental where there are too few cycles, or none', async () => {
    const twoCycles = csvOf(samples.subarray(0, 400), rateHz);
    expect((await preview(twoCycles)).signals).toMatchObject([{ fundamentalHz: null }]);
    const constant = csvOf(new Float64Array(4_000).fill(5), rateHz);
    expect((await preview(constant)).signals).toMatchObject([{ rms: 5, peak: 5, fundamentalHz: null }]);
  });

  it('are empty where nothing can be read', async () => {
    const { signals, problem } = await preview(Buffer.from('no numbers\nat all\n'));
    expect(signals).toEqual([]);
    expect(problem).not.toBeNull();
  });

  it('come of a beginning of up to 1 MiB', async () => {
    const long = Buffer.concat([capture, Buffer.alloc(1024 * 1024 - capture.length, '0.5,0\n')]);
    await preview(long, { sizeBytes: String(2 ** 40) });
    await ask(Buffer.concat([long, Buffer.from('\n')])).expect(413);
  });
});

describe('the reading rule of a preview', () => {
  it('is the one that fits, whose options are used unless others are stated or none wanted', async () => {
    const { id: projectId } = await newProject(test.database, {
      members: { [test.people.technician.id]: 'technician' },
    });
    const rule = { name: 'Bench', fileNamePattern: 'bench*', columnNames: ['time', 'u'], options: tenfold };
    const { body } = await technician.post(`/api/projects/${projectId}/reading-rules`).send(rule).expect(201);
    const readingRule = { id: body.id, name: 'Bench' };
    const stated = { decimal: '.' };
    const asked: [Record<string, string>, Partial<ImportPreview>][] = [
      [{}, { readingRule, options: tenfold }],
      [{ import: '{}' }, { readingRule, options: tenfold }],
      [{ readingRuleId: 'null' }, { readingRule: null, options: {} }],
      [{ import: JSON.stringify(stated) }, { readingRule, options: stated as object }],
      [{ fileName: 'other.csv' }, { readingRule: null, options: {} }],
      [
        { fileName: 'other.csv', readingRuleId: body.id },
        { readingRule, options: tenfold },
      ],
    ];
    for (const [fields, wanted] of asked) {
      const { signals, ...rest } = await preview(capture, fields, projectId);
      expect(rest).toMatchObject(wanted);
      expect(signals[0]!.name).toBe(wanted.options === tenfold ? 'U1' : 'u');
    }
    await ask(capture, { readingRuleId: body.id }).expect(400);
  });
});
