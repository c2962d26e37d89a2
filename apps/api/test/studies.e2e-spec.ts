import {
  problemDetailsSchema,
  studyComparisonSchema,
  studyPageSchema,
  studySchema,
  type ChannelAnalysis,
  type Study,
} from '@overtally/contracts';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { newFinishedAnalysis, type Judgeable } from './support/finished-analysis.js';
import { channelWith, dimmerChannel } from './support/report-example.js';
import { newProject } from './support/factories.js';
import { startTestApp, type TestApp } from './support/test-app.js';

let test: TestApp;
let dimmer: Judgeable;

beforeAll(async () => {
  test = await startTestApp();
  dimmer = await newFinishedAnalysis(test.database, owner());
});
afterAll(() => test.close());

const owner = () => ({ projectId: test.project.id, userId: test.people.analyst.id });
const studiesPath = () => `/api/projects/${test.project.id}/studies`;

const tau = 0.002;
const frequencyHz = 50;
/** rms of order h of a square wave of amplitude 1: 4/(π h √2) for odd h. */
const squareRms = (order: number) => (order % 2 === 0 ? 0 : (4 / (Math.PI * order)) * Math.SQRT1_2);
/** abs(H) of 1/(τs + 1). */
const lowPassGain = (order: number, hertz = frequencyHz) =>
  1 / Math.hypot(1, 2 * Math.PI * hertz * order * tau);

const lowPass = (given: object = {}) => ({
  name: 'Low-pass',
  isOn: true,
  spec: { kind: 'circuit', circuit: 'first-order-low-pass', values: { timeConstantS: tau } },
  ...given,
});
const squareStudy = (given: object = {}) => ({
  input: { kind: 'wave', shape: 'square', amplitude: 1, frequencyHz, maxOrder: 40 },
  ...{ inputQuantity: 'voltage', inputUnit: 'V', outputQuantity: 'voltage', outputUnit: 'V' },
  ...{ stages: [lowPass()], judgement: null },
  ...given,
});

async function save(definition: object = squareStudy(), name = 'Input filter'): Promise<Study> {
  const analyst = await test.signIn('analyst');
  const reply = await analyst.post(studiesPath()).send({ name, definition }).expect(201);
  return studySchema.parse(reply.body);
}

async function refusal(definition: object) {
  const analyst = await test.signIn('analyst');
  const reply = await analyst.post(studiesPath()).send({ name: 'Faulty', definition }).expect(422);
  return problemDetailsSchema.parse(reply.body);
}

describe('a study', () => {
  it('gives the orders of a square wave behind 1/(τs + 1) as the closed form does', async () => {
    const { number, version, result, series } = await save();
    expect(number).toMatch(/^S-\d{4}$/);
    expect(version).toBe(1);
    expect(series.components).toHaveLength(40);
    expect(result.stability).toMatchObject({ verdict: 'stable', poles: [{ re: -1 / tau, im: 0 }] });
    for (const { order, inputRms, outputRms, gain } of result.orders) {
      expect(inputRms).toBeCloseTo(squareRms(order), 12);
      expect(outputRms).toBeCloseTo(squareRms(order) * lowPassGain(order), 12);
      if (order % 2 === 1) expect(gain).toBeCloseTo(lowPassGain(order), 12);
      else expect(gain).toBeNull();
    }
    const share = (order: number) =>
      (squareRms(order) * lowPassGain(order)) / (squareRms(1) * lowPassGain(1));
    const thd = Math.hypot(...Array.from({ length: 39 }, (_, index) => share(index + 2)));
    expect(result.output?.thdF).toBeCloseTo(thd, 10);
  });

  it('starts from the lines of a channel and says of verdicts that they are predicted', async () => {
    const definition = squareStudy({
      input: { kind: 'channel', analysisId: dimmer.analysisId, channel: 0 },
      ...{ inputQuantity: 'current', inputUnit: 'A', outputQuantity: 'current', outputUnit: 'A' },
      stages: [lowPass({ tolerances: [{ parameter: 'timeConstantS', tolerancePercent: 10 }] })],
      judgement: { limitSetId: 'iec61000-3-2.classA', parameters: {}, decisionRule: 'simple-acceptance' },
      spread: { method: 'corners' },
    });
    const { result, series } = await save(definition, 'Dimmer behind a filter');
    const { harmonics } = dimmerChannel();
    expect(series.components.map(({ rms }) => rms)).toEqual(harmonics.map(({ rms }) => rms));
    expect(result.verdictBefore?.result).toBe('fail');
    expect(result.verdictAfter?.result).toBe('pass');
    expect(result.verdictAfter?.reason).toMatch(/^A prediction, not a measurement/);
    expect(result.spread?.sharePassing).toBe(1);
    const third = result.spread!.orders.find(({ order }) => order === 3)!;
    const at = (factor: number) => harmonics[2]!.rms / Math.hypot(1, 2 * Math.PI * 49.981 * 3 * tau * factor);
    expect(third.max).toBeCloseTo(at(0.9), 10);
    expect(third.min).toBeCloseTo(at(1.1), 10);
  });

  it('draws the same values from the same seed', async () => {
    const stages = [lowPass({ tolerances: [{ parameter: 'timeConstantS', tolerancePercent: 20 }] })];
    const drawn = (seed: number) =>
      save(squareStudy({ stages, spread: { method: 'draws', draws: 50, seed } }), 'Drawn');
    const [first, again, other] = [await drawn(7), await drawn(7), await drawn(8)];
    expect(first.result.spread).toEqual(again.result.spread);
    expect(first.result.spread).not.toEqual(other.result.spread);
    expect(first.result.spread?.sharePassing).toBeNull();
  });

  /** Characteristic polynomial of 10/(s + 1)³ under unity feedback: s³ + 3s² + 3s + 11, Routh: 3·3 < 11, unstable. */
  it('has no figures behind an unstable loop, but its poles', async () => {
    const pole = { re: -1, im: 0 };
    const loop = {
      ...{ name: 'Loop', isOn: true },
      spec: {
        kind: 'closed-loop',
        controller: { gain: 10 },
        plant: [{ kind: 'zeros-poles-gain', zeros: [], poles: [pole, pole, pole], gain: 1 }],
        output: 'reference-to-output',
      },
    };
    const { result } = await save(squareStudy({ stages: [loop] }), 'Loop');
    expect(result).toMatchObject({
      output: null,
      orders: [],
      verdictAfter: null,
      spread: null,
      warnings: [],
    });
    expect(result.stability.verdict).toBe('unstable');
    // s = −1 + 10^(1/3) e^(±jπ/3) and −1 − 10^(1/3).
    const root = Math.cbrt(10);
    const right = result.stability.poles.filter(({ re }) => re > 0);
    expect(right).toHaveLength(2);
    for (const { re, im } of right) {
      expect(re).toBeCloseTo(root / 2 - 1, 9);
      expect(Math.abs(im)).toBeCloseTo((root * Math.sqrt(3)) / 2, 9);
    }
  });

  it('names the place of what cannot be worked out', async () => {
    const spec = {
      kind: 'circuit',
      circuit: 'rc-low-pass',
      values: { resistanceOhm: 10, capacitanceF: -1e-6 },
    };
    const negative = await refusal(squareStudy({ stages: [lowPass(), { name: '', isOn: true, spec }] }));
    expect(negative.errors).toMatchObject([
      {
        path: 'definition.stages.1.spec.values.capacitanceF',
        message: expect.stringContaining('greater than 0'),
      },
    ]);
    const unknown = await refusal(
      squareStudy({ stages: [{ ...lowPass(), spec: { kind: 'circuit', circuit: 'flux', values: {} } }] }),
    );
    expect(unknown.errors?.[0]?.path).toBe('definition.stages.0.spec');
    const channel = await refusal(
      squareStudy({ input: { kind: 'channel', analysisId: dimmer.analysisId, channel: 9 } }),
    );
    expect(channel.errors?.[0]?.path).toBe('definition.input.channel');
    const quantity = await refusal(
      squareStudy({ input: { kind: 'channel', analysisId: dimmer.analysisId, channel: 0 } }),
    );
    expect(quantity.errors?.[0]?.path).toBe('definition.inputQuantity');
    const limits = await refusal(
      squareStudy({ judgement: { limitSetId: 'none', parameters: {}, decisionRule: 'simple-acceptance' } }),
    );
    expect(limits.errors?.[0]?.path).toBe('definition.judgement.limitSetId');
    const draws = { method: 'draws', draws: 20_000, seed: 1 };
    const many = { kind: 'wave', shape: 'square', amplitude: 1, frequencyHz, maxOrder: 1000 };
    expect((await refusal(squareStudy({ spread: draws, input: many }))).errors?.[0]?.path).toBe(
      'definition.spread.draws',
    );
  });

  it('takes no analysis of another project', async () => {
    const other = await newProject(test.database, { members: { [test.people.analyst.id]: 'manager' } });
    const analyst = await test.signIn('analyst');
    const input = { kind: 'channel', analysisId: dimmer.analysisId, channel: 0 };
    const body = { name: 'Elsewhere', definition: squareStudy({ input }) };
    const reply = await analyst.post(`/api/projects/${other.id}/studies`).send(body).expect(422);
    expect(reply.body.errors[0].path).toBe('definition.input.analysisId');
  });
});

describe('versions of a study', () => {
  it('follow one another, and the second of two who changed the same is refused', async () => {
    const { id } = await save();
    const analyst = await test.signIn('analyst');
    const slower = squareStudy({
      stages: [lowPass({ spec: { ...lowPass().spec, values: { timeConstantS: 2 * tau } } })],
    });
    const versions = `/api/studies/${id}/versions`;
    const change = { definition: slower, basedOn: 1, comment: 'Twice the time constant' };
    const both = await Promise.all([
      analyst.post(versions).send(change),
      analyst.post(versions).send(change),
    ]);
    expect(both.map(({ status }) => status).sort()).toEqual([201, 409]);
    const newest = studySchema.parse((await analyst.get(`/api/studies/${id}`).expect(200)).body);
    expect(newest.versions.map(({ version }) => version)).toEqual([2, 1]);
    expect(newest.result.orders[0]!.gain).toBeCloseTo(lowPassGain(2), 12);
    const first = studySchema.parse((await analyst.get(`/api/studies/${id}?version=1`).expect(200)).body);
    expect(first.result.orders[0]!.gain).toBeCloseTo(lowPassGain(1), 12);
    await analyst.get(`/api/studies/${id}?version=3`).expect(404);
  });

  it('are found by number and name, retired and deleted', async () => {
    const { id, number } = await save(squareStudy(), 'Trap 100 % for order five');
    const analyst = await test.signIn('analyst');
    const found = async (q: string) =>
      studyPageSchema.parse((await analyst.get(studiesPath()).query({ q }).expect(200)).body).items;
    expect((await found('100 % for')).map((item) => item.id)).toEqual([id]);
    expect((await found(number)).map((item) => item.id)).toEqual([id]);
    const change = { name: 'Trap', retired: true };
    const reply = await analyst.patch(`/api/studies/${id}`).send(change).expect(200);
    expect(studySchema.parse(reply.body)).toMatchObject({ name: 'Trap', retiredAt: expect.any(String) });
    await analyst.delete(`/api/studies/${id}`).expect(204);
    await analyst.get(`/api/studies/${id}`).expect(404);
  });

  it('are listed page by page', async () => {
    await save();
    await save();
    const analyst = await test.signIn('analyst');
    const page = async (cursor?: string) =>
      studyPageSchema.parse((await analyst.get(studiesPath()).query({ limit: 1, cursor }).expect(200)).body);
    const first = await page();
    const second = await page(first.nextCursor!);
    expect(first.items).toHaveLength(1);
    expect(second.items[0]!.id).not.toBe(first.items[0]!.id);
  });
});

describe('a comparison', () => {
  const built = (given: Partial<ChannelAnalysis> = {}, factor = 1) =>
    newFinishedAnalysis(test.database, owner(), [
      channelWith(
        Array.from({ length: 50 }, (_, index) => factor * squareRms(index + 1) * lowPassGain(index + 1)),
        { name: 'Output', quantity: 'voltage', unit: 'V', ...given },
      ),
    ]);
  const compare = async (study: Study, analysisId: string, status = 200) => {
    const analyst = await test.signIn('analyst');
    return analyst
      .get(`/api/studies/${study.id}/comparison`)
      .query({ analysisId, channel: 0 })
      .expect(status);
  };

  it('finds a square wave behind the built low-pass as predicted, and orders of one side alone', async () => {
    const study = await save();
    const { analysisId } = await built({}, 1000 / 1000);
    const { orders, cautions, unit, predictedThdF, measuredThdF } = studyComparisonSchema.parse(
      (await compare(study, analysisId)).body,
    );
    expect(unit).toBe('V');
    expect(cautions).toEqual([]);
    expect(orders).toHaveLength(50);
    for (const { order, predictedRms, measuredRms, differencePercent } of orders) {
      expect(measuredRms).toBeCloseTo(squareRms(order) * lowPassGain(order), 12);
      if (order > 40) expect(predictedRms).toBeNull();
      else expect(predictedRms).toBeCloseTo(measuredRms!, 12);
      if (order > 40 || order % 2 === 0) expect(differencePercent).toBeNull();
      else expect(differencePercent).toBeCloseTo(0, 9);
    }
    expect(predictedThdF).toBeCloseTo(measuredThdF!, 10);
  });

  it('converts units, says when the frequency is another, and refuses another quantity', async () => {
    const study = await save();
    const inMillivolts = await built({ unit: 'mV' }, 1100);
    const { orders } = studyComparisonSchema.parse((await compare(study, inMillivolts.analysisId)).body);
    expect(orders[0]!.differencePercent).toBeCloseTo(100 * (1 / 1.1 - 1), 9);
    const fundamental = { frequencyHz: 60, rms: 1, phaseDeg: 0, frequencyUncertaintyHz: null };
    const other = await built({ fundamental });
    const { cautions } = studyComparisonSchema.parse((await compare(study, other.analysisId)).body);
    expect(cautions).toMatchObject([expect.stringContaining('60 Hz where 50 Hz was assumed')]);
    await compare(study, dimmer.analysisId, 422);
  });
});

describe('roles', () => {
  it('let every member and administrators read, and analysts and managers write', async () => {
    const study = await save();
    const status: Record<string, [number, number]> = {};
    for (const role of ['technician', 'analyst', 'manager', 'guest', 'administrator', 'stranger'] as const) {
      const person = await test.signIn(role);
      const read = await person.get(`/api/studies/${study.id}`);
      const write = await person.patch(`/api/studies/${study.id}`).send({ name: 'Renamed' });
      status[role] = [read.status, write.status];
    }
    expect(status).toEqual({
      ...{ technician: [200, 403], analyst: [200, 200], manager: [200, 200] },
      ...{ guest: [200, 403], administrator: [200, 403], stranger: [404, 404] },
    });
  });
});
