import type { Project, ReadProblem } from '@overtally/contracts';
import { readdir } from 'node:fs/promises';
import { request as httpRequest } from 'node:http';
import type { AddressInfo } from 'node:net';
import { join } from 'node:path';
import { setTimeout as wait } from 'node:timers/promises';
import type TestAgent from 'supertest/lib/agent.js';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { AppConfig } from '../dist/config/app-config.js';
import { csvOf, squareWave, wavOf } from './support/captures.js';
import { settled, upload } from './support/recordings.js';
import { sessionCookie } from './support/sessions.js';
import { startTestApp, type TestApp } from './support/test-app.js';

const limitBytes = 1024 * 1024;
const wav = wavOf([Float32Array.from(squareWave(10_000, 5_000))], 10_000);

let test: TestApp;
let technician: TestAgent;

beforeAll(async () => {
  test = await startTestApp({ WORKER: 'embedded', MAX_UPLOAD_MB: String(limitBytes / 1024 / 1024) });
  technician = await test.signIn('technician');
});
afterAll(() => test.close());

/** The problem with which a capture ends. */
async function problemOf(bytes: Buffer, fileName: string, fields = {}): Promise<ReadProblem> {
  const recording = await upload(technician, test.project.id, bytes, fileName, fields);
  const { status, problem } = await settled(technician, recording.id);
  expect(status).toBe('failed');
  // The server is still up and says so.
  await technician.get('/api/health').expect(200);
  return problem!;
}

/** A copy of the WAV file with another sample rate in its header (byte 24, RIFF specification). */
function withSampleRate(sampleRateHz: number): Buffer {
  const copy = Buffer.from(wav);
  copy.writeUInt32LE(sampleRateHz, 24);
  return copy;
}

const binary = Buffer.from(Array.from({ length: 4096 }, (_, i) => (i * 197 + (i >> 3) * 31) % 256));

describe('a capture that cannot be read ends with a problem and a cure', () => {
  it.each([
    ['an empty file', Buffer.alloc(0), 'empty.csv', /empty|0 bytes/i],
    ['a header and nothing else', Buffer.from('time (s),u (V)\n'), 'header.csv', /no|row|number|data/i],
    ['binary rubbish named .csv', binary, 'rubbish.csv', /text|binary|table|character/i],
    ['a WAV file that ends in its header', wav.subarray(0, 30), 'short.wav', /end|cut|short|trunc|header/i],
    ['a WAV header with the sample rate 0', withSampleRate(0), 'zero.wav', /sample rate/i],
    ['a table of one row', Buffer.from('time (s),u (V)\n0,1\n'), 'one.csv', /sample|row|rate/i],
  ])('%s', async (_, bytes, fileName, words) => {
    const problem = await problemOf(bytes, fileName);
    expect(problem.message).toMatch(words);
    expect(problem.code).not.toBe('internal-error');
    expect(problem.cure).not.toBe('');
  });

  it('one sample with a stated rate', async () => {
    const { code, message } = await problemOf(Buffer.from('u (V)\n1\n'), 'one.csv', {
      import: JSON.stringify({ sampleRateHz: 1000, timeColumn: null }),
    });
    expect(code).not.toBe('internal-error');
    expect(message).toMatch(/1 sample|one (sample|row)/i);
  });

  it('names the line of a cell that is no number', async () => {
    const lines = csvOf(squareWave(10_000, 2_000), 10_000).toString().split('\n');
    lines[1000] = lines[1000]!.replace(/,.*/, ',volt');
    const { id } = await upload(technician, test.project.id, Buffer.from(lines.join('\n')), 'word.csv');
    const { warnings } = await settled(technician, id);
    expect(warnings).toEqual([
      expect.objectContaining({ code: 'missing-values', count: 1, firstLine: 1001 }),
    ]);
  });

  it('counts missing values, names the first and the longest span without', async () => {
    const lines = csvOf(squareWave(10_000, 4_000), 10_000).toString().split('\n');
    // Data row n (from 0) stands at index n + 1: samples 100 and 101 are missing.
    for (const row of [101, 102]) lines[row] = lines[row]!.replace(/,.*/, ',');
    const recording = await upload(technician, test.project.id, Buffer.from(lines.join('\n')), 'gaps.csv');
    const { status, problem } = await settled(technician, recording.id);
    expect({ status, code: problem?.code }).toEqual({ status: 'failed', code: 'missing-values' });
    expect(problem?.message).toMatch(/^2 values are missing .* sample 101 \(0.01 s\)/);
    expect(problem?.cure).toContain('from 0.0102 s to 0.4 s');
    const settings = { profile: 'general', nominalFrequencyHz: 50, span: { fromS: 0.0102, toS: 0.4 } };
    await technician.post(`/api/recordings/${recording.id}/analyses`).send({ settings }).expect(202);
    expect(await settled(technician, recording.id)).toMatchObject({ status: 'ready', problem: null });
  });

  it('a WAV file cut off in its data is read as far as it goes, with a warning', async () => {
    const recording = await upload(technician, test.project.id, wav.subarray(0, 12_000), 'cut.wav');
    const { status, problem, warnings } = await settled(technician, recording.id);
    expect(problem ?? warnings[0]).toMatchObject({ code: 'truncated' });
    expect(['ready', 'failed']).toContain(status);
  });
});

describe('an upload that is refused', () => {
  const path = () => `/api/projects/${test.project.id}/recordings`;

  it('names the limit when the file is larger', async () => {
    const { body } = await technician
      .post(path())
      .attach('file', Buffer.alloc(limitBytes + 1, '1'), 'large.csv')
      .expect(413);
    expect(body).toMatchObject({
      code: 'file-too-large',
      detail: expect.stringContaining(`${limitBytes} bytes`),
    });
    expect(await partFiles()).toEqual([]);
  });

  it('takes a file of exactly the limit', async () => {
    await technician.post(path()).attach('file', Buffer.alloc(limitBytes, '1'), 'limit.csv').expect(202);
  });

  it.each([0, -1, 'fast', null])('refuses the sample rate %s', async (sampleRateHz) => {
    const { body } = await technician
      .post(path())
      .field('import', JSON.stringify({ sampleRateHz }))
      .attach('file', wav, 'a.wav')
      .expect(400);
    expect(body.errors[0].path).toBe('import.sampleRateHz');
    expect(await partFiles()).toEqual([]);
  });

  it('leaves nothing behind when the client goes away', async () => {
    const before = await rowCount();
    await breakOff();
    await wait(300);
    expect(await partFiles()).toEqual([]);
    expect(await rowCount()).toBe(before);
    await technician.get('/api/health').expect(200);
  });

  async function rowCount(): Promise<number> {
    const { body } = await technician.get(`/api/projects/${test.project.id}`).expect(200);
    return (body as Project).counts.recordings;
  }
});

/** Files of uploads under way in the store. */
function partFiles(): Promise<string[]> {
  return readdir(join(test.app.get(AppConfig).dataDir, 'storage', '.part'));
}

/** Sends the beginning of an upload and closes the connection. */
async function breakOff(): Promise<void> {
  const { port } = test.http.address() as AddressInfo;
  const request = httpRequest({
    port,
    method: 'POST',
    path: `/api/projects/${test.project.id}/recordings`,
    headers: {
      'content-type': 'multipart/form-data; boundary=edge',
      'content-length': '500000',
      cookie: await sessionCookie(test.database, test.people.technician.id),
    },
  });
  request.on('error', () => undefined);
  request.write('--edge\r\ncontent-disposition: form-data; name="file"; filename="a.csv"\r\n\r\n');
  request.write('0,1\n'.repeat(10_000));
  await wait(300);
  expect(await partFiles()).toHaveLength(1);
  request.destroy();
}
