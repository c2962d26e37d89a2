import {
  reportSchema,
  verdictSchema,
  type Analysis,
  type Recording,
  type Verdict,
} from '@overtally/contracts';
import type TestAgent from 'supertest/lib/agent.js';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { wavOf } from './support/captures.js';
import { ended, settled, upload } from './support/recordings.js';
import { startTestApp, type TestApp } from './support/test-app.js';

const sampleRateHz = 10_000;
const windowSamples = 2_000;
const patienceMs = 100_000;
const omega = 2 * Math.PI * 50;

interface Bench {
  windows: number;
  /** rms of order 5 of the current in a window, in A. */
  fifthA: (window: number) => number;
  /** rms of order 5 of the voltage, in V. */
  fifthV?: number;
}

/** 230 V of 50 Hz and a current of 2 A in phase, both with order 5. */
function benchWav({ windows, fifthA, fifthV = 0 }: Bench): Buffer {
  const count = windows * windowSamples;
  const sample = (rms: number, order: number, n: number) =>
    Math.SQRT2 * rms * Math.sin((order * omega * n) / sampleRateHz);
  const voltage = Float32Array.from({ length: count }, (_, n) => sample(230, 1, n) + sample(fifthV, 5, n));
  const current = Float32Array.from(
    { length: count },
    (_, n) => sample(2, 1, n) + sample(fifthA(Math.floor(n / windowSamples)), 5, n),
  );
  return wavOf([voltage, current], sampleRateHz);
}

let test: TestApp;
let technician: TestAgent;
let analyst: TestAgent;

beforeAll(async () => {
  test = await startTestApp({ WORKER: 'embedded' });
  technician = await test.signIn('technician');
  analyst = await test.signIn('analyst');
});
afterAll(() => test.close());

interface Benched {
  recording: Recording;
  analysis: Analysis;
}

async function benched(bench: Bench, name: string): Promise<Benched> {
  const { id } = await upload(technician, test.project.id, benchWav(bench), `${name}.wav`);
  await settled(technician, id, patienceMs);
  const channels = [
    { index: 0, name: 'u', quantity: 'voltage', unit: 'V' },
    { index: 1, name: 'i', quantity: 'current', unit: 'A' },
  ];
  await technician.patch(`/api/recordings/${id}`).send({ channels }).expect(200);
  const recording = await settled(technician, id, patienceMs);
  return { recording, analysis: await ended(technician, recording.latestAnalysisId!) };
}

async function judge({ analysis }: Benched, given: object = {}): Promise<Verdict> {
  const body = { limitSetId: 'iec61000-3-2.classA', channel: 1, ...given };
  const reply = await analyst.post(`/api/analyses/${analysis.id}/verdicts`).send(body).expect(201);
  return verdictSchema.parse(reply.body);
}

const fifth = ({ orders }: Verdict) => orders.find(({ order }) => order === 5)!;

/** A burst of 3 A on 0.3 A for eight windows, so that the 1.5 s smoothed value passes 150 % of 1.14 A. */
const burst = (windows: number): Bench => ({
  windows,
  fifthA: (window) => (window >= 10 && window < 18 ? 3 : 0.3),
});

/** IEC 61000-4-7, 5.5.1, table 3: alpha 8.012, beta 7.012 at windows of 200 ms. */
function smoothed({ windows, fifthA }: Bench): number[] {
  const values = [fifthA(0)];
  for (let n = 1; n < windows; n += 1) values.push((fifthA(n) + 7.012 * values[n - 1]!) / 8.012);
  return values;
}

// IEC 61000-3-2, 6.2.3: up to 200 % when the time above 150 % is under 10 % of the observation and the mean under 90 %.
describe('single values above 150 % of class A', { timeout: 240_000 }, () => {
  it.each([
    [41, 'pass', /^A single smoothed value is at 18\d % .* 10 % of the time above 150 %, mean below 90 %/],
    [39, 'fail', /10 % of the time above 150 % is too long for the 200 % rule/],
  ] as const)('in 4 of %i windows: %s', async (windows, result, reason) => {
    const bench = burst(windows);
    const expected = smoothed(bench);
    expect(expected.filter((value) => value > 1.5 * 1.14).length).toBe(4);
    const subject = await benched(bench, `burst-${windows}`);
    const harmonic = subject.analysis.channels[1]!.harmonics.find(({ order }) => order === 5)!;
    expect(harmonic.smoothedMaxRms).toBeCloseTo(Math.max(...expected), 2);
    const mean = expected.reduce((sum, value) => sum + value, 0) / windows;
    expect(harmonic.smoothedMeanRms).toBeCloseTo(mean, 2);
    const row = fifth(await judge(subject));
    expect(row).toMatchObject({ limit: 1.14, result });
    expect(row.reason).toMatch(reason);
  });
});

describe('repeats, supply and shape', { timeout: 240_000 }, () => {
  let first: Benched;
  let second: Benched;
  let verdict: Verdict;
  beforeAll(async () => {
    first = await benched({ windows: 10, fifthA: () => 0.5 }, 'first');
    // 1 % of order 5 in the voltage; the supply may have 0.4 % (IEC 61000-3-2, A.2).
    second = await benched({ windows: 10, fifthA: () => 0.6, fifthV: 2.3 }, 'second');
    verdict = await judge(first, { repeats: [{ analysisId: second.analysis.id, channel: 1 }] });
  }, 300_000);

  it('gives the mean of the repeats with their spread in percent of the limit', () => {
    const row = fifth(verdict);
    expect(row.mean).toBeCloseTo(0.55, 3);
    expect(row.limit).toBe(1.14);
    const spread = verdict.repeatability!.orders.find(({ order }) => order === 5)!;
    // Sample deviation 0.1 A / sqrt 2, furthest 0.05 A, both of 1.14 A.
    expect(spread.count).toBe(2);
    expect(spread.repeatabilityPercent).toBeCloseTo((100 * 0.1) / Math.SQRT2 / 1.14, 1);
    expect(spread.deviationPercent).toBeCloseTo((100 * 0.05) / 1.14, 1);
    expect(verdict.repeatability!.isRepeatable).toBe(true);
    expect(verdict.reason).toMatch(/^Worst of 2 repeats\./);
    expect(verdict.repeats).toMatchObject([
      { analysisId: first.analysis.id, recordingNumber: first.recording.number, channel: 1, result: 'pass' },
      { analysisId: second.analysis.id, recordingNumber: second.recording.number, result: 'pass' },
    ]);
  });

  it('checks the voltage beside the current, the worst of the repeats, and leaves the result alone', async () => {
    const alone = await judge(first);
    expect(alone.supply).toMatchObject({ channelName: 'u', nominalV: 230, frequencyHz: 50, result: 'pass' });
    expect(alone.supply?.assumption).toMatch(/230 V, the usual one nearest/);
    expect(verdict.result).toBe('pass');
    expect(verdict.supply).toMatchObject({ result: 'fail' });
    expect(verdict.supply?.summary).toMatch(/^Repeat 2: The test voltage misses .*: harmonic 5\./);
    const missed = verdict.supply?.checks.filter(({ result }) => result === 'fail');
    expect(missed).toMatchObject([{ name: 'harmonic 5', upTo: 0.4 }]);
    expect(missed?.[0]?.value).toBeCloseTo(1, 2);
    const stated = await judge(first, { parameters: { nominalV: 240 } });
    // 230 V is 4.2 % below 240 V; 2 % are allowed.
    expect(stated.supply).toMatchObject({ nominalV: 240, result: 'fail' });
    const other = await judge(first, {
      limitSetId: 'ieee519-2022.table2',
      parameters: { iscOverIl: 12, ilA: 10 },
    });
    expect(other.supply).toBeNull();
  });

  it('reads the shape of the current against the voltage: a sine peaks at 90°, 65° are allowed', async () => {
    const lamp = { limitSetId: 'iec61000-3-2.classC.5to25W.ed5', parameters: { powerW: 10 } };
    expect((await judge(first, lamp)).reason).toMatch(
      /alternative 2 .*: .*[Cc]urrent shape|peaks at (89|90|91)/,
    );
  });

  it('refuses repeats that do not go together, naming each', async () => {
    const repeats = [
      { analysisId: second.analysis.id, channel: 0 },
      { analysisId: first.analysis.id, channel: 1 },
      { analysisId: '00000000-0000-4000-8000-000000000000', channel: 1 },
    ];
    const body = { limitSetId: 'iec61000-3-2.classA', channel: 1, repeats };
    const reply = await analyst.post(`/api/analyses/${first.analysis.id}/verdicts`).send(body).expect(422);
    const { errors } = reply.body as { errors: { path: string; message: string }[] };
    expect(errors.map(({ path }) => path)).toEqual(['repeats.0', 'repeats.1', 'repeats.2']);
    expect(errors[0]?.message).toMatch(/u is voltage in V; a repeat is current in A/);
    expect(errors[1]?.message).toMatch(/already/);
    expect(errors[2]?.message).toMatch(/no such analysis/);
  });

  it('keeps a recording that is a repeat, and lets it go with the verdict', async () => {
    const reply = await technician.delete(`/api/recordings/${second.recording.id}`).expect(409);
    expect(reply.body.detail).toContain(`a verdict on ${first.recording.number}`);
    const spare = await benched({ windows: 10, fifthA: () => 0.5 }, 'spare');
    await judge(spare, { repeats: [{ analysisId: second.analysis.id, channel: 1 }] });
    await technician.delete(`/api/recordings/${spare.recording.id}`).expect(204);
  });

  it('is out of date once a repeat was scaled anew', async () => {
    const channels = [{ index: 1, gain: 2 }];
    await technician.patch(`/api/recordings/${second.recording.id}`).send({ channels }).expect(200);
    await settled(technician, second.recording.id, patienceMs);
    const body = { title: 'Repeated', verdictIds: [verdict.id] };
    const made = await analyst.post(`/api/projects/${test.project.id}/reports`).send(body);
    const reply =
      made.status === 201
        ? await analyst.post(`/api/reports/${reportSchema.parse(made.body).id}/submit`).send({})
        : made;
    expect(reply.status).toBe(409);
    expect(JSON.stringify(reply.body)).toContain(second.recording.number);
  });
});
