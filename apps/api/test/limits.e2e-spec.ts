import { limitSetPageSchema, limitSetSchema, type LimitSet } from '@overtally/contracts';
import { schema } from '@overtally/db';
import { cloneLimitSet, limitTableText, parseLimitTable, publishedLimitSets } from '@overtally/limits';
import { eq } from 'drizzle-orm';
import supertest from 'supertest';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { newProject } from './support/factories.js';
import { newIssued, newJudged } from './support/judged-reports.js';
import { newLimitSet } from './support/project-contents.js';
import { startTestApp, type TestApp } from './support/test-app.js';

const customerLimits = {
  title: 'Customer specification 7',
  quantity: 'current',
  unit: 'A',
  basis: 'absolute',
  orders: [
    { order: 5, limit: 0.4 },
    { order: 3, limit: 0.9 },
  ],
  source: 'Contract 2026-118, annex 2',
};

let test: TestApp;
let foreign: { id: string };

beforeAll(async () => {
  test = await startTestApp();
  foreign = await newProject(test.database);
});
afterAll(() => test.close());

const projectPath = (suffix = ''): string => `/api/projects/${test.project.id}/limit-sets${suffix}`;
const idsOf = (body: { items: LimitSet[] }): string[] => body.items.map((set) => set.id);

async function createAsAnalyst(given: object = {}): Promise<LimitSet> {
  const analyst = await test.signIn('analyst');
  const reply = await analyst
    .post(projectPath())
    .send({ ...customerLimits, ...given })
    .expect(201);
  return limitSetSchema.parse(reply.body);
}

describe('limit sets', () => {
  it('lists every published set to anyone signed in, and nothing to others', async () => {
    const stranger = await test.signIn('stranger');
    const { body } = await stranger.get('/api/limit-sets').expect(200);
    expect(limitSetPageSchema.parse(body)).toEqual({ items: publishedLimitSets, nextCursor: null });
    await supertest(test.http).get('/api/limit-sets').expect(401);
  });

  it('keeps a custom set in the order of its orders, with what it says of its source', async () => {
    const set = await createAsAnalyst();
    expect(set).toMatchObject({ projectId: test.project.id, version: 1, procedure: 'plain', unit: 'A' });
    expect(set.orders).toEqual([
      { order: 3, limit: 0.9 },
      { order: 5, limit: 0.4 },
    ]);
    expect(set.source).toEqual(['Contract 2026-118, annex 2']);
    const guest = await test.signIn('guest');
    const listed = await guest.get(projectPath()).expect(200);
    expect(idsOf(listed.body)).toContain(set.id);
    expect(idsOf((await guest.get('/api/limit-sets').expect(200)).body)).toContain(set.id);
  });

  it('gives percent limits the percent sign and a TDD limit its parameter', async () => {
    const set = await createAsAnalyst({
      basis: 'percent-of-fundamental',
      unit: '',
      totals: [{ name: 'TDD', limit: 5, maxOrder: 40 }],
    });
    expect([set.unit, set.parameters]).toEqual(['%', ['ilA']]);
  });

  it('keeps a copy of a published set with its rows, conditions and parameters', async () => {
    const original = publishedLimitSets.find((set) => set.id === 'iec61000-3-12.table3')!;
    const copy = await createAsAnalyst(cloneLimitSet(original, 'Drives of our own'));
    expect(copy).toMatchObject({
      ...{ title: 'Drives of our own', projectId: test.project.id, version: 1, confidence: 'medium' },
      ...{ procedure: original.procedure, rowChoice: original.rowChoice, rows: original.rows, orders: [] },
    });
    expect([...copy.parameters].sort()).toEqual(['irefA', 'rsce']);
    expect(copy.source[0]).toContain('iec61000-3-12.table3, version 1');
  });

  it('keeps entries of several kinds and derives what a verdict must be given', async () => {
    const table = parseLimitTable('3;3.4;mA/W;2.3\n15-39 odd: 0.15*15/n;A\n5;4;% IL\n7;250;mA');
    const set = await createAsAnalyst({ orders: table.orders });
    expect(set.orders.map(({ order }) => order).slice(0, 3)).toEqual([3, 5, 7]);
    // What the set says of itself is not said again.
    expect(set.orders[3]).toEqual({ order: 15, limit: 0.15, formula: '0.15*15/n' });
    expect(set.orders[2]).toEqual({ order: 7, limit: 250, basis: 'absolute', unit: 'mA' });
    expect([...set.parameters].sort()).toEqual(['ilA', 'powerW']);
  });

  // RFC 4180 for the form; the limits are those of IEC 61000-3-2, Table 1.
  it('takes a table as text, gives it back as CSV, and reads that to the same limits', async () => {
    const published = publishedLimitSets.find((set) => set.id === 'iec61000-3-2.classA')!;
    const set = await createAsAnalyst({ orders: undefined, table: limitTableText(published) });
    expect(set.orders).toEqual(published.orders);
    const guest = await test.signIn('guest');
    const csv = await guest.get(`/api/limit-sets/${set.id}/table.csv`).expect(200);
    expect(csv.headers['content-type']).toMatch(/^text\/csv/);
    const again = await createAsAnalyst({ orders: undefined, table: csv.text });
    expect(again.orders).toEqual(set.orders);
    const row = await guest.get('/api/limit-sets/ieee519-2022.table2/table.csv?row=1').expect(200);
    expect(parseLimitTable(row.text).totals).toMatchObject([{ name: 'TDD', limit: 8 }]);
    await guest.get('/api/limit-sets/ieee519-2022.table2/table.csv?row=9').expect(404);
    await (await test.signIn('stranger')).get(`/api/limit-sets/${set.id}/table.csv`).expect(404);
  });

  it('names line, column and cure of every problem of a table', async () => {
    const analyst = await test.signIn('analyst');
    const table = 'order,limit,unit\n3,2.3,A\nfive,1,A\n7,1,yd';
    const body = { ...customerLimits, orders: undefined, table };
    const reply = await analyst.post(projectPath()).send(body).expect(422);
    expect(reply.body.errors).toMatchObject([
      { path: 'table', message: expect.stringMatching(/^Line 3, column 1: .* give 3, 15-39 or 15-39 odd$/) },
      { path: 'table', message: expect.stringMatching(/^Line 4, column 5: .* give A, mA/) },
    ]);
    await analyst
      .post(projectPath())
      .send({ ...customerLimits, table })
      .expect(400);
  });

  it('clones a published set and one of the project, and no other', async () => {
    const analyst = await test.signIn('analyst');
    const body = { limitSetId: 'iec61000-3-6.hv', title: 'Planning levels of ours' };
    const cloned = limitSetSchema.parse(
      (await analyst.post(projectPath('/clone')).send(body).expect(201)).body,
    );
    const original = publishedLimitSets.find((set) => set.id === body.limitSetId)!;
    expect(cloned).toMatchObject({ title: body.title, version: 1, clonedFrom: original.id });
    // Values that are not sure do not become so by being copied.
    expect(cloned).toMatchObject({
      orders: original.orders,
      confidence: original.confidence,
      notes: original.notes,
    });
    const twice = await analyst.post(projectPath('/clone')).send({ limitSetId: cloned.id }).expect(201);
    expect(twice.body).toMatchObject({ title: `Copy of ${body.title}`, clonedFrom: cloned.id });
    const other = await newLimitSet(test.database, {
      projectId: foreign.id,
      userId: test.people.stranger.id,
    });
    const reply = await analyst.post(projectPath('/clone')).send({ limitSetId: other.id }).expect(422);
    expect(reply.body.errors[0].path).toBe('limitSetId');
  });

  it('keeps earlier versions readable, lists the newest, and makes new ones from that alone', async () => {
    const first = await createAsAnalyst({ title: 'In two versions' });
    const analyst = await test.signIn('analyst');
    const change = { ...customerLimits, title: 'In two versions', orders: [{ order: 3, limit: 0.8 }] };
    const path = `/api/limit-sets/${first.id}/versions`;
    const second = limitSetSchema.parse((await analyst.post(path).send(change).expect(201)).body);
    expect(second).toMatchObject({ version: 2, familyId: first.id, orders: change.orders });
    const earlier = limitSetSchema.parse((await analyst.get(`/api/limit-sets/${first.id}`).expect(200)).body);
    expect(earlier).toEqual({ ...first, newestId: second.id });
    const listed = idsOf((await analyst.get(projectPath()).expect(200)).body);
    expect([listed.includes(first.id), listed.includes(second.id)]).toEqual([false, true]);
    const versions = await analyst.get(`/api/limit-sets/${second.id}/versions`).expect(200);
    expect(idsOf(versions.body)).toEqual([second.id, first.id]);
    const late = await analyst.post(path).send(change).expect(409);
    expect(late.body.detail).toMatch(/Version 2 is the newest/);
    const judged = await newJudged(test);
    const body = { channel: 0, limitSetId: second.id };
    const { body: verdict } = await analyst
      .post(`/api/analyses/${judged.analysisId}/verdicts`)
      .send(body)
      .expect(201);
    expect(verdict.limitSet).toMatchObject({ version: 2, orders: change.orders });
  });

  it('retires a set with all versions, judges no more by it, and brings it back', async () => {
    const { id } = await createAsAnalyst();
    const analyst = await test.signIn('analyst');
    const { body: retired } = await analyst
      .patch(`/api/limit-sets/${id}`)
      .send({ retired: true })
      .expect(200);
    expect(retired.retiredAt).toBeTruthy();
    const { analysisId } = await newJudged(test);
    const judge = () =>
      analyst.post(`/api/analyses/${analysisId}/verdicts`).send({ channel: 0, limitSetId: id });
    expect((await judge().expect(409)).body.detail).toMatch(
      /was retired; choose another set, or bring it back/,
    );
    await analyst.patch(`/api/limit-sets/${id}`).send({ retired: false }).expect(200);
    await judge().expect(201);
  });

  it('keeps a set that an issued report refers to, and says to retire it', { timeout: 120_000 }, async () => {
    const { id } = await createAsAnalyst();
    const { analysisId } = await newJudged(test);
    const analyst = await test.signIn('analyst');
    const body = { channel: 0, limitSetId: id };
    const verdict = await analyst.post(`/api/analyses/${analysisId}/verdicts`).send(body).expect(201);
    await newIssued(test, [verdict.body.id]);
    const reply = await analyst.delete(`/api/limit-sets/${id}`).expect(409);
    expect(reply.body.detail).toMatch(/issued report refers .* retire it instead/);
    await analyst.get(`/api/limit-sets/${id}`).expect(200);
  });

  it('refuses what could not be judged by, naming the field', async () => {
    const analyst = await test.signIn('analyst');
    const twice = { ...customerLimits, orders: [customerLimits.orders[0], customerLimits.orders[0]] };
    const doubled = await analyst.post(projectPath()).send(twice).expect(400);
    expect(doubled.body.errors[0].path).toBe('orders');
    const unitless = await analyst
      .post(projectPath())
      .send({ ...customerLimits, unit: '' })
      .expect(422);
    expect(unitless.body.errors[0].path).toBe('unit');
  });

  it('shows a custom set to members and administrators, and to strangers not even that it exists', async () => {
    const { id } = await createAsAnalyst();
    for (const role of ['guest', 'technician', 'administrator'] as const) {
      await (await test.signIn(role)).get(`/api/limit-sets/${id}`).expect(200);
    }
    const stranger = await test.signIn('stranger');
    await stranger.get(`/api/limit-sets/${id}`).expect(404);
    await stranger.get('/api/limit-sets/iec61000-3-2.classA').expect(200);
    await stranger.get('/api/limit-sets/iec61000-3-2.classZ').expect(404);
    await stranger.get(`/api/limit-sets?projectId=${test.project.id}`).expect(404);
  });

  it('does not mix the sets of two projects', async () => {
    const other = await newLimitSet(test.database, {
      projectId: foreign.id,
      userId: test.people.stranger.id,
    });
    const analyst = await test.signIn('analyst');
    expect(idsOf((await analyst.get('/api/limit-sets')).body)).not.toContain(other.id);
    await analyst.get(`/api/limit-sets?projectId=${foreign.id}`).expect(404);
    await analyst.delete(`/api/limit-sets/${other.id}`).expect(404);
    const administrator = await test.signIn('administrator');
    const seen = await administrator.get(`/api/limit-sets?projectId=${foreign.id}`).expect(200);
    expect(idsOf(seen.body)).toContain(other.id);
  });

  it('lets analysts and managers write, and nobody else', async () => {
    for (const role of ['technician', 'guest', 'administrator'] as const) {
      await (await test.signIn(role)).post(projectPath()).send(customerLimits).expect(403);
    }
    await (await test.signIn('stranger')).post(projectPath()).send(customerLimits).expect(404);
  });

  it('deletes a custom set and takes it from projects that compare with it', async () => {
    const { id } = await createAsAnalyst();
    const { projects } = schema;
    await test.database
      .update(projects)
      .set({ comparisonLimitSetId: id })
      .where(eq(projects.id, test.project.id));
    await (await test.signIn('technician')).delete(`/api/limit-sets/${id}`).expect(403);
    const manager = await test.signIn('manager');
    await manager.delete(`/api/limit-sets/${id}`).expect(204);
    await manager.get(`/api/limit-sets/${id}`).expect(404);
    const [project] = await test.database.select().from(projects).where(eq(projects.id, test.project.id));
    expect(project?.comparisonLimitSetId).toBeNull();
    await manager.delete('/api/limit-sets/iec61000-3-2.classA').expect(404);
  });
});
