import type { Analysis, PowerPair, Recording, Series, Settings, Spectrum } from '@overtally/contracts';
import { schema } from '@overtally/db';
import { eq } from 'drizzle-orm';
import type TestAgent from 'supertest/lib/agent.js';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { Storage } from '../dist/storage/storage.js';
import { csvOf, wavOf } from './support/captures.js';
import { newAnalysis, newRecording } from './support/project-contents.js';
import { ended, settled, upload } from './support/recordings.js';
import { startTestApp, type TestApp } from './support/test-app.js';

const sampleRateHz = 10_000;
const windowSamples = 2_000;
const windows = 40;
const mains: Settings = { profile: 'mains', nominalFrequencyHz: 50, cyclesPerWindow: 10 };

/** 100 V of 50 Hz with 5 V of order 5, which doubles in window 20; a current of 2 A that lags 60 degrees. */
const time = (n: number) => (2 * Math.PI * 50 * n) / sampleRateHz;
const voltage = Float32Array.from({ length: windows * windowSamples }, (_, n) => {
  const fifth = n < 20 * windowSamples ? 5 : 10;
  return Math.SQRT2 * (100 * Math.sin(time(n)) + fifth * Math.sin(5 * time(n)));
});
const current = voltage.map((_, n) => Math.SQRT2 * 2 * Math.sin(time(n) - Math.PI / 3));

let test: TestApp;
let technician: TestAgent;
let recording: Recording;
let analysis: Analysis;

beforeAll(async () => {
  test = await startTestApp({ WORKER: 'embedded' });
  technician = await test.signIn('technician');
  const { id } = await upload(technician, test.project.id, wavOf([voltage, current], sampleRateHz), 'ui.wav');
  recording = await settled(technician, id);
  const channels = [
    { index: 0, name: 'u', quantity: 'voltage', unit: 'V' },
    { index: 1, name: 'i', quantity: 'current', unit: 'A' },
  ];
  await technician.patch(`/api/recordings/${id}`).send({ channels }).expect(200);
  await settled(technician, id);
  analysis = await analysed(id, mains);
});
afterAll(() => test.close());

async function analysed(recordingId: string, settings: Settings): Promise<Analysis> {
  const { body } = await technician
    .post(`/api/recordings/${recordingId}/analyses`)
    .send({ settings })
    .expect(202);
  return ended(technician, (body as Analysis).id);
}

async function series(query: Record<string, unknown>): Promise<Series> {
  const { body } = await technician.get(`/api/analyses/${analysis.id}/series`).query(query).expect(200);
  return body as Series;
}

describe('figures over time', () => {
  it('are those of the windows, with their times and units', async () => {
    const line = await series({ figure: 'line', order: 5 });
    expect(line).toMatchObject({ channel: 0, order: 5, unit: 'V', aggregation: 'window', thinned: false });
    expect(line.intervalS).toBeCloseTo(0.2, 6);
    expect(line.timeS).toHaveLength(windows);
    expect(line.timeS[7]).toBeCloseTo(1.4, 6);
    // Next to the step the windows, which follow the fundamental to a part of a sample, may share some of it.
    const apart = (i: number) => i < 19 || i > 20;
    line.value.forEach((value, i) => apart(i) && expect(value).toBeCloseTo(i < 20 ? 5 : 10, 3));
    const frequency = await series({ figure: 'frequency' });
    expect(frequency).toMatchObject({ unit: 'Hz', order: null });
    expect(frequency.value[0]).toBeCloseTo(50, 3);
    const thd = await series({ figure: 'thd' });
    expect(thd.unit).toBe('%');
    expect(thd.value[0]).toBeCloseTo(5, 3);
    expect((await series({ channel: 1, figure: 'rms' })).value[3]).toBeCloseTo(2, 4);
  });

  it('are aggregated by root mean square, the last incomplete interval left out', async () => {
    const line = await series({ figure: 'line', order: 5, aggregation: '3s' });
    // IEC 61000-4-30, 4.4: windows 0 to 14 hold 5 V; of 15 to 29 five hold 5 V and ten 10 V.
    expect(line.value).toHaveLength(2);
    expect(line.value[0]).toBeCloseTo(5, 3);
    expect(line.value[1]!).toBeCloseTo(Math.sqrt((5 * 25 + 10 * 100) / 15), 1);
    expect(line.timeS[1]).toBeCloseTo(3, 6);
    expect(line.intervalS).toBeCloseTo(3, 6);
    expect((await series({ figure: 'rms', aggregation: '10min' })).value).toEqual([]);
  });

  it('keep their largest values when thinned', async () => {
    const full = await series({ figure: 'line', order: 5 });
    const thin = await series({ figure: 'line', order: 5, maxPoints: 16 });
    expect(thin.thinned).toBe(true);
    expect(thin.value).toHaveLength(14);
    thin.value.forEach((value, i) => {
      const part = full.value.slice(3 * i, 3 * i + 3);
      expect(value).toBe(Math.max(...part.map(Number)));
      expect(thin.timeS[i]).toBe(full.timeS[3 * i + part.indexOf(value)]);
    });
  });

  it('come as a table of all orders', async () => {
    const path = `/api/analyses/${analysis.id}/series.csv`;
    const reply = await technician.get(path).query({ figure: 'line', aggregation: '3s' }).expect(200);
    expect(reply.headers['content-type']).toBe('text/csv; charset=utf-8');
    const [header, first, ...rest] = reply.text.trimEnd().split('\r\n');
    expect(header!.split(',').slice(0, 4)).toEqual(['time (s)', 'flagged', 'order 1 (V)', 'order 2 (V)']);
    expect(header!.split(',')).toHaveLength(52);
    const cells = first!.split(',').map(Number);
    expect(cells[0]).toBe(0);
    expect(cells[2]).toBeCloseTo(100, 3);
    expect(cells[6]).toBeCloseTo(5, 3);
    expect(rest).toHaveLength(1);
  });

  it.each([
    [{ figure: 'line', order: 60 }, 'Orders 1 to 50'],
    [{ figure: 'line', order: 0 }, 'Orders 1 to 50'],
    [{ figure: 'band', order: 40 }, 'there is no band 40'],
    [{ channel: 2 }, 'no channel 2'],
  ])('say what there is where %j is not', async (query, words) => {
    const { body } = await technician.get(`/api/analyses/${analysis.id}/series`).query(query).expect(404);
    expect(body.detail).toContain(words);
  });

  it('are refused where nothing is followed, and until the analysis is done', async () => {
    const general = await analysed(recording.id, { profile: 'general', nominalFrequencyHz: 50 });
    for (const path of ['series', 'series.csv']) {
      const reply = await technician.get(`/api/analyses/${general.id}/${path}`).expect(404);
      expect(reply.body.code).toBe('no-series');
    }
    const owner = { projectId: test.project.id, userId: test.people.technician.id };
    const { id } = await newRecording(test.database, owner);
    const waiting = await newAnalysis(test.database, id, owner);
    await technician.get(`/api/analyses/${waiting.id}/series`).expect(409);
  });
});

describe('a finished analysis', () => {
  it('tells the power of a voltage and its current', async () => {
    expect(analysis.power).toHaveLength(1);
    const [pair] = analysis.power as [PowerPair];
    // Closed form: P = 100 V · 2 A · cos 60°, Q1 = 100 V · 2 A · sin 60°, positive for a current that lags.
    expect(pair).toMatchObject({ voltageChannel: 0, currentChannel: 1 });
    expect(pair.P).toBeCloseTo(100, 2);
    expect(pair.Q1).toBeCloseTo(100 * Math.sqrt(3), 2);
  });

  it('gives its spectrum as a density too', async () => {
    const path = `/api/analyses/${analysis.id}/spectrum`;
    const { body: spectrum } = (await technician.get(path).expect(200)) as { body: Spectrum };
    const { body: density } = (await technician.get(path).query({ scaling: 'density' }).expect(200)) as {
      body: Spectrum;
    };
    expect(spectrum).toMatchObject({ scaling: 'spectrum', unit: 'V' });
    expect(density).toMatchObject({ scaling: 'density', unit: 'V/√Hz' });
    const width = spectrum.noiseBandwidthHz!;
    // Heinzel et al. 2002, section 9: the bandwidth of a line is ENBW bins, and no window has less than 1.
    expect(width).toBeGreaterThanOrEqual(spectrum.resolutionHz * 0.999);
    density.rms.forEach((value, k) => expect(value).toBeCloseTo(spectrum.rms[k]! / Math.sqrt(width), 9));
  });

  it('names the gaps of the file among its flags, and where they are', async () => {
    const rows = csvOf(Float64Array.from(voltage.subarray(0, 20_000)), sampleRateHz)
      .toString()
      .split('\n');
    rows.splice(8_001, 37);
    const { id } = await upload(technician, test.project.id, Buffer.from(rows.join('\n')), 'gap.csv');
    await settled(technician, id);
    const { channels } = await analysed(id, mains);
    const gap = channels[0]!.flags.find(({ code }) => code === 'gap');
    expect(gap?.evidence).toEqual({
      ...{ count: 1, timesS: [0.8], limit: 1.5, unit: 'sample intervals' },
      value: expect.closeTo(38, 3),
    });
    const before = await analysed(id, { ...mains, span: { fromS: 0, toS: 0.7 } });
    expect(before.channels[0]!.flags.map(({ code }) => code)).not.toContain('gap');
  });

  it('leaves nothing in storage once its recording is deleted', async () => {
    const { id } = await upload(technician, test.project.id, wavOf([current], sampleRateHz), 'gone.wav');
    await settled(technician, id);
    const done = await analysed(id, mains);
    const [row] = await test.database
      .select()
      .from(schema.analysisChannels)
      .where(eq(schema.analysisChannels.analysisId, done.id));
    const storage = test.app.get(Storage, { strict: false });
    expect(await storage.exists(row!.seriesKey!)).toBe(true);
    await technician.delete(`/api/recordings/${id}`).expect(204);
    expect(await storage.exists(row!.seriesKey!)).toBe(false);
  });
});
