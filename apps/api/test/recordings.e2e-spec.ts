import type { Analysis, Recording } from '@overtally/contracts';
import { createHash } from 'node:crypto';
import type TestAgent from 'supertest/lib/agent.js';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { csvOf, squareThdFPercent, squareWave, wavOf } from './support/captures.js';
import { newAnalysis, newRecording, newReport, newVerdict } from './support/project-contents.js';
import { settled, upload } from './support/recordings.js';
import { startTestApp, type TestApp } from './support/test-app.js';

const sampleRateHz = 10_000;
const square = squareWave(sampleRateHz, 10_000);
const squareCsv = csvOf(square, sampleRateHz);

let test: TestApp;
let technician: TestAgent;

beforeAll(async () => {
  test = await startTestApp({ WORKER: 'embedded' });
  technician = await test.signIn('technician');
});
afterAll(() => test.close());

async function figuresOf(recording: Recording) {
  const { body } = (await technician.get(`/api/analyses/${recording.latestAnalysisId}`).expect(200)) as {
    body: Analysis;
  };
  return body.channels[0]!;
}

describe('a capture on its way from upload to figures', () => {
  let recording: Recording;

  it('is received with its hash, number and name', async () => {
    recording = await upload(technician, test.project.id, squareCsv, 'Rectifier 3.csv', {
      eut: 'PSU 12, S/N 4',
    });
    expect(recording).toMatchObject({
      number: 'R-0001',
      name: 'Rectifier 3',
      eut: 'PSU 12, S/N 4',
      duplicateOf: null,
      latestAnalysisId: null,
      // SHA-256 by Node's own implementation over the bytes that were sent.
      file: {
        name: 'Rectifier 3.csv',
        size: squareCsv.length,
        sha256: createHash('sha256').update(squareCsv).digest('hex'),
      },
    });
  });

  it('is read and analysed', async () => {
    recording = await settled(technician, recording.id);
    expect(recording).toMatchObject({
      status: 'ready',
      problem: null,
      format: 'csv',
      sampleRateHz,
      sampleCount: square.length,
      durationS: 1,
      channels: [{ index: 0, quantity: 'voltage', unit: 'V', gain: 1, offset: 0 }],
    });
    const channel = await figuresOf(recording);
    expect(channel.fundamental?.frequencyHz).toBeCloseTo(50, 4);
    expect(Math.abs(channel.thdFPercent! - squareThdFPercent)).toBeLessThan(0.01);
    // rms of order h is 4 / (pi h sqrt 2), the Fourier series of the square wave.
    for (const { order, rms } of channel.harmonics) {
      const expected = order % 2 === 1 && order < 40 ? 4 / (Math.PI * order * Math.SQRT2) : 0;
      expect(Math.abs(rms - expected)).toBeLessThan(1e-4);
    }
  });

  it('gives its source back byte for byte, whole and in parts', async () => {
    const whole = await technician.get(`/api/recordings/${recording.id}/source`).buffer().expect(200);
    expect(whole.body as Buffer).toEqual(squareCsv);
    expect(whole.headers).toMatchObject({
      etag: `"${recording.file.sha256}"`,
      'content-disposition': 'attachment; filename="Rectifier 3.csv"',
      'accept-ranges': 'bytes',
    });
    const part = await technician
      .get(`/api/recordings/${recording.id}/source`)
      .set('Range', 'bytes=100-199')
      .buffer()
      .expect(206);
    expect(part.headers['content-range']).toBe(`bytes 100-199/${squareCsv.length}`);
    expect(part.body as Buffer).toEqual(squareCsv.subarray(100, 200));
    await technician
      .get(`/api/recordings/${recording.id}/source`)
      .set('Range', 'bytes=99999999-')
      .expect(416);
    await technician
      .get(`/api/recordings/${recording.id}/source`)
      .set('If-None-Match', `"${recording.file.sha256}"`)
      .expect(304);
  });

  it('shows its summary in the list', async () => {
    const { body } = await technician.get(`/api/projects/${test.project.id}/recordings`).expect(200);
    const [row] = body.items as Recording[];
    expect(row).toMatchObject({ id: recording.id, latestAnalysisId: recording.latestAnalysisId });
    const [summary] = row!.summaries;
    expect(summary!.thdFPercent).toBeCloseTo(squareThdFPercent, 2);
    // Order 5 of the square wave is a fifth of the fundamental.
    expect(summary!.harmonicRms[4]! / summary!.harmonicRms[0]!).toBeCloseTo(0.2, 4);
  });

  it('is recognised when the same bytes come again', async () => {
    const again = await upload(technician, test.project.id, squareCsv, 'copy.csv', { name: 'Again' });
    expect(again).toMatchObject({
      number: 'R-0002',
      name: 'Again',
      duplicateOf: { id: recording.id, number: 'R-0001' },
    });
    await settled(technician, again.id);
    // The bytes are stored once, and stay while one recording uses them.
    const analyst = await test.signIn('analyst');
    await analyst.delete(`/api/recordings/${again.id}`).expect(204);
    const source = await technician.get(`/api/recordings/${recording.id}/source`).buffer().expect(200);
    expect(source.body.length).toBe(squareCsv.length);
  });
});

describe('the same wave in other files', () => {
  it('gives the same THD as 32-bit float WAV', async () => {
    const wav = wavOf([Float32Array.from(square)], sampleRateHz);
    const recording = await upload(technician, test.project.id, wav, 'square.wav', {
      import: JSON.stringify({
        channels: [{ column: 0, name: 'U1', quantity: 'voltage', unit: 'V', gain: 10 }],
      }),
    });
    const ready = await settled(technician, recording.id);
    expect(ready).toMatchObject({
      status: 'ready',
      format: 'wav',
      channels: [{ name: 'U1', unit: 'V', gain: 10 }],
    });
    const channel = await figuresOf(ready);
    expect(Math.abs(channel.thdFPercent! - squareThdFPercent)).toBeLessThan(0.01);
    // Gain 10: the fundamental of the square wave of amplitude 10 has rms 40 / (pi sqrt 2).
    expect(channel.fundamental!.rms).toBeCloseTo(40 / (Math.PI * Math.SQRT2), 3);
  });

  it('gives the same THD as CSV with decimal commas', async () => {
    const csv = csvOf(square, sampleRateHz, { header: 't (s);i (A)', delimiter: ';', decimal: ',' });
    const recording = await upload(technician, test.project.id, csv, 'komma.csv');
    const ready = await settled(technician, recording.id);
    expect(ready).toMatchObject({
      status: 'ready',
      sampleRateHz,
      channels: [{ quantity: 'current', unit: 'A' }],
    });
    expect(Math.abs((await figuresOf(ready)).thdFPercent! - squareThdFPercent)).toBeLessThan(0.01);
  });
});

describe('upload that is refused', () => {
  const path = () => `/api/projects/${test.project.id}/recordings`;

  it('names the fields of import options that are not valid', async () => {
    const { body } = await technician
      .post(path())
      .field('import', JSON.stringify({ sampleRateHz: 0, channels: [{ column: 0, gain: 'two' }], colour: 1 }))
      .attach('file', squareCsv, 'a.csv')
      .expect(400);
    const paths = (body.errors as { path: string }[]).map((error) => error.path);
    expect(paths).toEqual(expect.arrayContaining(['import.sampleRateHz', 'import.channels.0.gain']));
    await technician.post(path()).attach('file', squareCsv, 'a.csv').field('import', '{').expect(400);
  });

  it('asks for the file when there is none', async () => {
    const { body } = await technician.post(path()).field('name', 'Nothing').expect(400);
    expect(body.errors).toEqual([{ path: 'file', message: 'Send the capture as a part named file' }]);
  });

  it('is closed to guests', async () => {
    const guest = await test.signIn('guest');
    await guest.post(path()).attach('file', squareCsv, 'a.csv').expect(403);
  });
});

describe('waveform', () => {
  const count = 300_000;
  const noise = pseudoRandom(count);
  let recording: Recording;

  beforeAll(async () => {
    const wav = wavOf([noise], 50_000);
    const options = { channels: [{ column: 0, unit: 'A', quantity: 'current', gain: -2, offset: 0.5 }] };
    recording = await upload(technician, test.project.id, wav, 'noise.wav', {
      import: JSON.stringify(options),
    });
    recording = await settled(technician, recording.id);
  });

  it.each([
    { fromS: 0, toS: 6, points: 2000 },
    { fromS: 0, toS: 6, points: 37 },
    { fromS: 1.00002, toS: 3.9, points: 500 },
    { fromS: 2, toS: 2.1, points: 1000 },
  ])('is the minimum and maximum of each bin: $fromS s to $toS s in $points', async (query) => {
    const { body } = await technician
      .get(`/api/recordings/${recording.id}/waveform`)
      .query(query)
      .expect(200);
    expect(body).toMatchObject({ kind: 'envelope', unit: 'A', values: [] });
    expect(body.minimum.length).toBeLessThanOrEqual(query.points);
    const start = Math.round(body.startS * 50_000);
    const step = Math.round(body.stepS * 50_000);
    expect(start).toBeLessThanOrEqual(query.fromS * 50_000);
    expect(start + step * body.minimum.length).toBeGreaterThanOrEqual(Math.floor(query.toS * 50_000));
    // All but the last bin, which may end with the part asked for: brute force over the samples.
    for (let bin = 0; bin < body.minimum.length - 1; bin += 1) {
      const part = Array.from(
        noise.subarray(start + bin * step, start + (bin + 1) * step),
        (x) => -2 * x + 0.5,
      );
      expect(body.minimum[bin]).toBe(Math.min(...part));
      expect(body.maximum[bin]).toBe(Math.max(...part));
    }
  });

  it('is the samples themselves where they are few', async () => {
    const query = { fromS: 1, toS: 1.01, points: 800 };
    const { body } = await technician
      .get(`/api/recordings/${recording.id}/waveform`)
      .query(query)
      .expect(200);
    expect(body).toMatchObject({ kind: 'samples', startS: 1, stepS: 1 / 50_000, minimum: [], maximum: [] });
    expect(body.values).toEqual(Array.from(noise.subarray(50_000, 50_500), (x) => -2 * x + 0.5));
  });

  it('comes whole as an array file', async () => {
    const { body } = await technician.get(`/api/recordings/${recording.id}/samples`).buffer().expect(200);
    const bytes = body as Buffer;
    // NumPy format 1.0: magic, version, little-endian length of the header text at byte 8.
    expect(bytes.subarray(0, 6).toString('latin1')).toBe('\x93NUMPY');
    const offset = 10 + bytes.readUInt16LE(8);
    expect(bytes.subarray(10, offset).toString()).toContain(`'shape': (${count},)`);
    expect(bytes.length).toBe(offset + 8 * count);
    for (const n of [0, 1, 12_345, count - 1]) {
      expect(bytes.readDoubleLE(offset + 8 * n)).toBe(-2 * noise[n]! + 0.5);
    }
  });

  it('names the length of the record when a part behind it is asked for', async () => {
    const query = { fromS: 7, toS: 8 };
    const { body } = await technician
      .get(`/api/recordings/${recording.id}/waveform`)
      .query(query)
      .expect(400);
    expect(body.detail).toContain('lasts 6 s');
    await technician.get(`/api/recordings/${recording.id}/waveform`).query({ channel: 4 }).expect(404);
  });
});

describe('list of recordings', () => {
  it('pages through all of them in either order, without loss or repeat', async () => {
    for (const sort of ['number', '-number', 'name', '-name', 'createdAt', '-createdAt']) {
      const numbers: string[] = [];
      let cursor: string | undefined;
      do {
        const { body } = await technician
          .get(`/api/projects/${test.project.id}/recordings`)
          .query({ sort, limit: 2, ...(cursor && { cursor }) })
          .expect(200);
        numbers.push(...(body.items as Recording[]).map(({ number }) => number));
        cursor = body.nextCursor ?? undefined;
      } while (cursor !== undefined);
      expect(new Set(numbers).size).toBe(numbers.length);
      expect(numbers.length).toBe(4);
      if (sort === '-number') expect(numbers).toEqual([...numbers].sort().reverse());
    }
  });

  it('finds by number, name, equipment and file name, and by state', async () => {
    const found = async (query: Record<string, string>) => {
      const { body } = await technician
        .get(`/api/projects/${test.project.id}/recordings`)
        .query(query)
        .expect(200);
      return (body.items as Recording[]).map(({ number }) => number);
    };
    expect(await found({ q: 'r-0001' })).toEqual(['R-0001']);
    expect(await found({ q: 's/n 4' })).toEqual(['R-0001']);
    expect(await found({ q: 'KOMMA' })).toHaveLength(1);
    expect(await found({ q: '100%' })).toEqual([]);
    expect(await found({ status: 'failed' })).toEqual([]);
  });
});

describe('change of a recording', () => {
  it('keeps bench data and follows new scaling with a new analysis', async () => {
    const { body: page } = await technician
      .get(`/api/projects/${test.project.id}/recordings?q=R-0001`)
      .expect(200);
    const before = page.items[0] as Recording;
    const { body: changed } = await technician
      .patch(`/api/recordings/${before.id}`)
      .send({ remark: 'Probe was at 10:1', channels: [{ index: 0, gain: 10 }] })
      .expect(200);
    expect(changed).toMatchObject({
      status: 'analysing',
      remark: 'Probe was at 10:1',
      latestAnalysisId: null,
    });
    const after = await settled(technician, before.id);
    expect(after.summaries[0]!.rms / before.summaries[0]!.rms).toBeCloseTo(10, 6);
    const { body: old } = await technician.get(`/api/analyses/${before.latestAnalysisId}`).expect(200);
    expect(old.supersededById).toBe(after.latestAnalysisId);
    const { body: unknown } = await technician
      .patch(`/api/recordings/${before.id}`)
      .send({ channels: [{ index: 7, gain: 1 }] })
      .expect(400);
    expect(unknown.errors[0].path).toBe('channels.0.index');
  });

  it('reads the source again under other options', async () => {
    const { body: page } = await technician
      .get(`/api/projects/${test.project.id}/recordings?q=R-0001`)
      .expect(200);
    const before = page.items[0] as Recording;
    const options = { channels: [{ column: 1, name: 'Mains', quantity: 'voltage', unit: 'V', gain: 100 }] };
    await technician.post(`/api/recordings/${before.id}/read`).send(options).expect(202);
    const after = await settled(technician, before.id);
    expect(after).toMatchObject({
      status: 'ready',
      import: options,
      channels: [{ name: 'Mains', gain: 100 }],
    });
    expect(after.latestAnalysisId).not.toBe(before.latestAnalysisId);
  });

  it('is deleted by who works at the bench with all its files, and not by a guest', async () => {
    const { body: page } = await technician
      .get(`/api/projects/${test.project.id}/recordings?q=R-0001`)
      .expect(200);
    const { id } = page.items[0] as Recording;
    const guest = await test.signIn('guest');
    await guest.delete(`/api/recordings/${id}`).expect(403);
    await technician.delete(`/api/recordings/${id}`).expect(204);
    await technician.get(`/api/recordings/${id}`).expect(404);
  });
});

describe('a recording that a report speaks of', () => {
  it('is kept, and the report is named', async () => {
    const owner = { projectId: test.project.id, userId: test.people.analyst.id };
    const { id } = await newRecording(test.database, owner);
    const analysis = await newAnalysis(test.database, id, owner);
    const verdict = await newVerdict(test.database, analysis.id, owner);
    await newReport(test.database, verdict.id, owner);
    const analyst = await test.signIn('analyst');
    const { body } = await analyst.delete(`/api/recordings/${id}`).expect(409);
    expect(body).toMatchObject({ code: 'in-report', detail: expect.stringContaining('Harmonic currents') });
    await analyst.get(`/api/recordings/${id}`).expect(200);
  });
});

describe('import preview', () => {
  it('shows how the beginning of a file would be read', async () => {
    const { body } = await technician
      .post(`/api/projects/${test.project.id}/import-preview`)
      .attach('head', squareCsv.subarray(0, 4096), 'head')
      .field('fileName', 'Rectifier 3.csv')
      .field('sizeBytes', String(squareCsv.length))
      .expect(200);
    expect(body).toMatchObject({ format: 'csv', delimiter: ',', decimal: '.', timeColumn: 0, problem: null });
    expect(body.sampleRateHz).toBeCloseTo(sampleRateHz, 3);
    expect(body.lines[0]).toBe('time (s),u (V)');
  });
});

/** Floats from -1 to 1 by a linear congruential generator (Numerical Recipes, 2nd edition, 7.1). */
function pseudoRandom(length: number): Float32Array {
  let state = 1;
  return Float32Array.from({ length }, () => {
    state = (Math.imul(1_664_525, state) + 1_013_904_223) >>> 0;
    return state / 2 ** 31 - 1;
  });
}
