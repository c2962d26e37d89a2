import type { Recording } from '@overtally/contracts';
import type TestAgent from 'supertest/lib/agent.js';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { csvOf, squareWave, wavOf } from './support/captures.js';
import { settled, upload } from './support/recordings.js';
import { startTestApp, type TestApp } from './support/test-app.js';

const wave = squareWave(10_000, 5_000);

let test: TestApp;
let technician: TestAgent;
let manager: TestAgent;

beforeAll(async () => {
  test = await startTestApp({ WORKER: 'embedded' });
  technician = await test.signIn('technician');
  manager = await test.signIn('manager');
});
afterAll(() => test.close());

const inProject = (path: string) => `/api/projects/${test.project.id}/${path}`;
const pathsOf = ({ body }: { body: { errors?: { path: string }[] } }) => body.errors?.map(({ path }) => path);

// PostgreSQL 15 manual, 8.3 and 8.14.1: no text holds NUL, and jsonb no half of a surrogate pair.
describe('text that the database cannot keep is refused by its place', () => {
  it('in bodies', async () => {
    const name = await manager.patch(`/api/projects/${test.project.id}`).send({ name: 'A\0B' }).expect(400);
    expect(pathsOf(name)).toEqual(['name']);
  });

  it('in queries', async () => {
    expect(pathsOf(await technician.get(`${inProject('recordings')}?q=%00`).expect(400))).toEqual(['q']);
  });

  it('in form fields, also within their JSON', async () => {
    const capture = csvOf(wave, 10_000);
    const options = {
      channels: [
        { column: 1, name: 'a\0' },
        { column: 1, unit: '\udc00' },
      ],
    };
    const reply = await technician
      .post(inProject('recordings'))
      .field('import', JSON.stringify(options))
      .field('remark', 'NUL \0')
      .attach('file', capture, 'a.csv')
      .expect(400);
    expect(pathsOf(reply)!.sort()).toEqual(['import.channels.0.name', 'import.channels.1.unit', 'remark']);
  });
});

it('keeps a capture whose cells and name are padded with NUL', async () => {
  const capture = csvOf(wave, 10_000, { header: 'time (s)\0,u\0 (V)\0\0' });
  const head =
    '--edge\r\ncontent-disposition: form-data; name="file"; filename*=utf-8\'\'padded%00.csv\r\n\r\n';
  const { body } = await technician
    .post(inProject('recordings'))
    .set('Content-Type', 'multipart/form-data; boundary=edge')
    .send(`${head}${capture.toString()}\r\n--edge--\r\n`)
    .expect(202);
  const { id, name } = body as Recording;
  expect(name).toBe('padded');
  expect(await settled(technician, id)).toMatchObject({
    status: 'ready',
    problem: null,
    channels: [{ name: 'u', unit: 'V' }],
  });
});

describe('a form with more text than a capture needs', () => {
  const manyFields = Array.from({ length: 17 }, (_, i) => [`field${i}`, 'x'] as const);
  const longField = [['remark', 'x'.repeat(256 * 1024 + 1)]] as const;

  it.each([
    ['import-preview', 'head', manyFields],
    ['import-preview', 'head', longField],
    ['recordings', 'file', manyFields],
    ['recordings', 'file', longField],
  ])('is refused by %s (%s)', async (path, file, fields) => {
    const request = technician.post(inProject(path));
    void request.field('fileName', 'a.csv').field('sizeBytes', '100000');
    for (const [name, value] of fields) void request.field(name, value);
    const { status } = await request.attach(file, csvOf(wave, 10_000), 'a.csv');
    expect([400, 413]).toContain(status);
  });
});

describe('a damaged value beyond all quantities', () => {
  let recording: Recording;

  it('ends the analysis with its place and leaves the list readable', async () => {
    const lines = csvOf(wave, 10_000).toString().split('\n');
    lines[101] = lines[101]!.replace(/,.*/, ',1e308');
    const options = { channels: [{ column: 1, unit: 'V', gain: 1e6 }] };
    const { id } = await upload(technician, test.project.id, Buffer.from(lines.join('\n')), 'damaged.csv', {
      import: JSON.stringify(options),
    });
    recording = await settled(technician, id);
    expect(recording.problem).toMatchObject({ code: 'cannot-be-analysed' });
    expect(recording.problem!.message).toContain('sample 100 (0.01 s)');
    await technician.get(inProject('recordings')).expect(200);
  });

  it('is a gap in the waveform, drawn in samples or in bins', async () => {
    const part = async (query: object) =>
      (await technician.get(`/api/recordings/${recording.id}/waveform`).query(query).expect(200)).body;
    const { values } = await part({ fromS: 0.009, toS: 0.011, points: 100 });
    expect(values.map((value: number | null) => value === null)).toEqual(
      Array.from({ length: 20 }, (_, i) => i === 10),
    );
    const { maximum } = await part({ points: 50 });
    expect(maximum[0]).toBeNull();
    expect(maximum[1]).toBeGreaterThan(0);
  });
});

it('a header that claims 2^64 - 1 bytes leaves the list readable', async () => {
  const wav = wavOf([Float32Array.from(wave)], 10_000);
  // RF64 (EBU Tech 3306): 64-bit sizes in a chunk of their own, 2^32 - 1 where the 32-bit sizes stand.
  const sizes = Buffer.alloc(36);
  sizes.write('ds64', 0);
  sizes.writeUInt32LE(28, 4);
  sizes.fill(255, 16, 24);
  const rf64 = Buffer.concat([wav.subarray(0, 12), sizes, wav.subarray(12)]);
  rf64.write('RF64', 0);
  for (const offset of [4, 76]) rf64.writeUInt32LE(0xffffffff, offset);
  const { id } = await upload(technician, test.project.id, rf64, 'long.wav');
  const { warnings } = await settled(technician, id);
  expect(warnings).toEqual([expect.objectContaining({ code: 'truncated' })]);
  await technician.get(inProject('recordings')).expect(200);
});
