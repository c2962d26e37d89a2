import { problemDetailsSchema, verdictPageSchema, verdictSchema, type Verdict } from '@overtally/contracts';
import { evaluate, findPublishedLimitSet, measurementOfChannel } from '@overtally/limits';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { newProject } from './support/factories.js';
import { classAVerdict, newFinishedAnalysis, type Judgeable } from './support/finished-analysis.js';
import { newAnalysis, newLimitSet, newRecording, type Owner } from './support/project-contents.js';
import { dimmerChannel, phaseCutRms } from './support/report-example.js';
import { startTestApp, type TestApp } from './support/test-app.js';

let test: TestApp;
let owner: Owner;
let dimmer: Judgeable;

beforeAll(async () => {
  test = await startTestApp();
  owner = { projectId: test.project.id, userId: test.people.analyst.id };
  dimmer = await newFinishedAnalysis(test.database, owner);
});
afterAll(() => test.close());

const path = (analysisId = dimmer.analysisId): string => `/api/analyses/${analysisId}/verdicts`;

async function judge(given: object = {}, analysisId = dimmer.analysisId): Promise<Verdict> {
  const analyst = await test.signIn('analyst');
  const reply = await analyst
    .post(path(analysisId))
    .send({ ...classAVerdict(), ...given })
    .expect(201);
  return verdictSchema.parse(reply.body);
}

describe('a verdict', () => {
  it('gives the values that the limits package gives for the stored analysis', async () => {
    const limitSet = findPublishedLimitSet('iec61000-3-2.classA')!;
    const parameters = { expandedUncertaintyPercent: 2 };
    const verdict = await judge({ parameters, decisionRule: 'non-binary' });
    const expected = evaluate(limitSet, measurementOfChannel(dimmerChannel()), {
      parameters,
      decisionRule: 'non-binary',
    });
    expect(verdict).toMatchObject({
      ...expected,
      limitSet,
      parameters,
      channelName: 'Supply current',
      unit: 'A',
    });
    expect(verdict.author).toEqual({ id: test.people.analyst.id, name: test.people.analyst.name });
  });

  /** Limits: IEC 61000-3-2:2018, table 1 (2.30 A at order 3, 0.15 A x 15/n from order 15 up); values: closed form. */
  it('compares a phase-cut current with the printed limits of class A', async () => {
    const { orders, result } = await judge();
    expect(result).toBe('fail');
    const third = orders.find((entry) => entry.order === 3)!;
    expect(third.limit).toBe(2.3);
    expect(third.mean).toBeCloseTo(phaseCutRms(3, 3.74, Math.PI / 2), 12);
    const nineteenth = orders.find((entry) => entry.order === 19)!;
    expect(nineteenth.limit).toBeCloseTo((0.15 * 15) / 19, 12);
    expect(nineteenth.result).toBe('fail');
  });

  /** IEEE 519-2022, table 2: 4 % of IL below order 11 for Isc/IL below 20, TDD 5 %. IEC 61000-3-2: class D to 600 W. */
  it('takes the row that the parameters choose, and says where a set does not apply', async () => {
    const limitSetId = 'ieee519-2022.table2';
    const verdict = await judge({ limitSetId, parameters: { iscOverIl: 12, ilA: 10 } });
    expect(verdict.orders.find((entry) => entry.order === 5)?.limit).toBeCloseTo(0.4, 12);
    expect(verdict.totals).toMatchObject([{ name: 'TDD', unit: '%', limit: 5 }]);
    expect(verdict.reason).toContain('Isc/IL below 20');
    expect(verdict.limitSet).toEqual(findPublishedLimitSet(limitSetId));
    const missing = await judge({ limitSetId, parameters: {} });
    expect(missing).toMatchObject({ result: 'not-decidable', reason: 'The set needs iscOverIl, ilA' });
    const large = await judge({ limitSetId: 'iec61000-3-2.classD', parameters: { powerW: 700 } });
    expect(large).toMatchObject({ result: 'not-applicable', orders: [], totals: [] });
    expect(large.reason).toContain('600 W');
  });

  it('needs an analysis that is done', async () => {
    const recording = await newRecording(test.database, owner);
    const queued = await newAnalysis(test.database, recording.id, owner);
    const analyst = await test.signIn('analyst');
    const reply = await analyst.post(path(queued.id)).send(classAVerdict()).expect(409);
    expect(reply.body.detail).toContain('queued');
  });

  it('names a channel and a limit set that are not there', async () => {
    const foreign = await newProject(test.database);
    const set = await newLimitSet(test.database, { projectId: foreign.id, userId: owner.userId });
    const analyst = await test.signIn('analyst');
    const body = classAVerdict({ channel: 7, limitSetId: set.id });
    const reply = await analyst.post(path()).send(body).expect(422);
    const { errors } = problemDetailsSchema.parse(reply.body);
    expect(errors?.map((error) => error.path)).toEqual(['channel', 'limitSetId']);
  });

  it('keeps its limit set when that is deleted', async () => {
    const set = await newLimitSet(test.database, owner);
    const verdict = await judge({ limitSetId: set.id });
    const manager = await test.signIn('manager');
    await manager.delete(`/api/limit-sets/${set.id}`).expect(204);
    const { body } = await manager.get(`/api/verdicts/${verdict.id}`).expect(200);
    expect(body).toEqual(verdict);
    expect(body.limitSet.orders).toEqual([{ order: 5, limit: 1 }]);
  });

  it('is made by analysts and managers, read by members, and hidden from strangers', async () => {
    const { id } = await judge();
    for (const role of ['technician', 'guest', 'administrator'] as const) {
      const person = await test.signIn(role);
      await person.post(path()).send(classAVerdict()).expect(403);
      await person.get(`/api/verdicts/${id}`).expect(200);
    }
    const stranger = await test.signIn('stranger');
    await stranger.post(path()).send(classAVerdict()).expect(404);
    await stranger.get(path()).expect(404);
    await stranger.get(`/api/verdicts/${id}`).expect(404);
  });

  it('stands in the lists of its analysis and its project, the newest first, page by page', async () => {
    const own = await newFinishedAnalysis(test.database, owner);
    const made = [
      await judge({}, own.analysisId),
      await judge({}, own.analysisId),
      await judge({}, own.analysisId),
    ];
    const newestFirst = made.map((verdict) => verdict.id).reverse();
    const guest = await test.signIn('guest');
    const first = verdictPageSchema.parse(
      (await guest.get(`${path(own.analysisId)}?limit=2`).expect(200)).body,
    );
    const next = `${path(own.analysisId)}?limit=2&cursor=${first.nextCursor}`;
    const second = verdictPageSchema.parse((await guest.get(next).expect(200)).body);
    expect([...first.items, ...second.items].map((verdict) => verdict.id)).toEqual(newestFirst);
    expect(second.nextCursor).toBeNull();
    const ofProject = `/api/projects/${test.project.id}/verdicts`;
    const filtered = await guest.get(`${ofProject}?recordingId=${own.recordingId}`).expect(200);
    const { items } = verdictPageSchema.parse(filtered.body);
    expect(items.map((verdict) => verdict.id)).toEqual(newestFirst);
    const all = verdictPageSchema.parse((await guest.get(ofProject).expect(200)).body);
    expect(all.items.length).toBeGreaterThan(3);
    await guest.get(`${ofProject}?cursor=nonsense`).expect(400);
  });
});
