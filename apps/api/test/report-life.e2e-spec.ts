import { projectSchema, reportPageSchema, reportSchema, type Report } from '@overtally/contracts';
import { schema } from '@overtally/db';
import { eq } from 'drizzle-orm';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { anotherMember, freezeWith, newBehind } from './support/behind-reports.js';
import { newDraft, newInReview, newIssued, newJudged, type Judged } from './support/judged-reports.js';
import { newAnalysis } from './support/project-contents.js';
import { startTestApp, type TestApp } from './support/test-app.js';

let test: TestApp;
let dimmer: Judged;
beforeAll(async () => {
  test = await startTestApp();
  dimmer = await newJudged(test);
});
afterAll(() => test.close());

type Role = Parameters<TestApp['signIn']>[0];

const post = async (role: Role, id: string, step: string, body: object = {}) =>
  (await test.signIn(role)).post(`/api/reports/${id}/${step}`).send(body);
const read = async (role: Role, id: string): Promise<Report> =>
  reportSchema.parse((await (await test.signIn(role)).get(`/api/reports/${id}`).expect(200)).body);
const kinds = ({ events }: Report) => events.map(({ kind }) => kind);

describe('a report between its preparer and the manager', () => {
  it('shows what must be mended until it is submitted again, in the list too', async () => {
    const { id } = await newInReview(test, [dimmer.verdict.id]);
    await post('manager', id, 'return', { comment: 'Name the probe' });
    const returned = await read('analyst', id);
    expect(returned).toMatchObject({
      status: 'draft',
      returned: { by: { name: 'Manager' }, comment: 'Name the probe' },
    });
    const list = await (await test.signIn('analyst')).get(`/api/projects/${test.project.id}/reports`);
    const item = reportPageSchema.parse(list.body).items.find((each) => each.id === id);
    expect(item?.returned?.comment).toBe('Name the probe');
    const again = reportSchema.parse((await post('analyst', id, 'submit')).body);
    expect(again).toMatchObject({ returned: null, submittedBy: { name: 'Analyst' } });
  });

  it('is taken back from review by who brought it there and by nobody else', async () => {
    const { id } = await newInReview(test, [dimmer.verdict.id]);
    const { agent } = await anotherMember(test, 'analyst');
    const other = await agent.post(`/api/reports/${id}/withdraw`).send({}).expect(403);
    expect(other.body.code).toBe('not-the-preparer');
    expect((await post('technician', id, 'withdraw')).status).toBe(403);
    const { status, body } = await post('analyst', id, 'withdraw', { comment: 'Wrong verdict' });
    expect([status, body.status, body.returned]).toEqual([200, 'draft', null]);
    expect(kinds(reportSchema.parse(body))).toEqual(['created', 'submitted', 'withdrawn']);
    expect((await post('analyst', id, 'withdraw')).status).toBe(409);
  });

  it('takes comments in any state from the laboratory, which guests do not see', async () => {
    const { id } = await newIssued(test, [dimmer.verdict.id]);
    expect((await post('technician', id, 'comments', { comment: 'Probe was warm' })).status).toBe(201);
    expect((await post('technician', id, 'comments', { comment: ' ' })).status).toBe(400);
    for (const role of ['guest', 'administrator'] as const) {
      expect((await post(role, id, 'comments', { comment: 'Me too' })).status).toBe(403);
    }
    expect((await read('manager', id)).events.at(-1)).toMatchObject({
      kind: 'commented',
      by: { name: 'Technician' },
      comment: 'Probe was warm',
    });
    expect(kinds(await read('guest', id))).not.toContain('commented');
  });

  it('counts for guests only what was issued', async () => {
    const count = async (role: Role) =>
      projectSchema.parse((await (await test.signIn(role)).get(`/api/projects/${test.project.id}`)).body)
        .counts.reports;
    const before = [await count('guest'), await count('analyst')];
    await newDraft(test, [dimmer.verdict.id]);
    expect([await count('guest'), await count('analyst')]).toEqual([before[0], before[1]! + 1]);
  });
});

describe('who prepared a report', () => {
  // ISO/IEC 17025:2017, 7.8.1.1: results are reviewed and authorized prior to release.
  it('does not issue it, nor does who submitted it, unless the project says so', async () => {
    const manager = await test.signIn('manager');
    const body = { title: 'Own report', verdictIds: [dimmer.verdict.id] };
    const made = await manager.post(`/api/projects/${test.project.id}/reports`).send(body).expect(201);
    await manager.post(`/api/reports/${made.body.id}/submit`).send({}).expect(200);
    const refused = await manager.post(`/api/reports/${made.body.id}/issue`).send({}).expect(403);
    expect(refused.body.code).toBe('preparer-may-not-issue');
    expect(refused.body.detail).toMatch(/another manager.*project settings/);

    const drafted = await newDraft(test, [dimmer.verdict.id]);
    await manager.post(`/api/reports/${drafted.id}/submit`).send({}).expect(200);
    await manager.post(`/api/reports/${drafted.id}/issue`).send({}).expect(403);
    const { agent } = await anotherMember(test, 'manager');
    const other = await agent.post(`/api/reports/${drafted.id}/issue`).send({}).expect(200);
    expect(other.body.isIssuedByPreparer).toBe(false);

    const path = `/api/projects/${test.project.id}`;
    await (await test.signIn('analyst')).patch(path).send({ preparerMayIssue: true }).expect(403);
    await manager.patch(path).send({ preparerMayIssue: true }).expect(200);
    const issued = await manager.post(`/api/reports/${made.body.id}/issue`).send({}).expect(200);
    await manager.patch(path).send({ preparerMayIssue: false }).expect(200);
    const report = reportSchema.parse(issued.body);
    expect(report).toMatchObject({
      isIssuedByPreparer: true,
      content: { project: { preparerMayIssue: true } },
    });
    expect(report.events.at(-1)?.comment).toMatch(/prepared and issued by the same person/i);
  });
});

describe('calibration that was overdue at the capture', () => {
  it('keeps a report from being issued until the manager says why the results stand', async () => {
    const report = await newInReview(test, [dimmer.verdict.id]);
    const { chain, instrument } = await newBehind(test, '2026-02-03');
    await freezeWith(test, report, () => ({ chain }));
    expect((await read('manager', report.id)).cautions).toMatchObject([
      { code: 'calibration-overdue', section: 0 },
    ]);
    const refused = await post('manager', report.id, 'issue');
    expect(refused.status).toBe(409);
    expect(refused.body.code).toBe('calibration-overdue');
    expect(refused.body.detail).toContain(instrument.name);
    expect(refused.body.detail).toContain('2026-02-03');
    expect((await post('manager', report.id, 'issue', { overdueReason: 'Fine' })).status).toBe(400);
    const overdueReason = 'Compared with the reference probe on the day, within 0.1 %';
    const { status, body } = await post('manager', report.id, 'issue', { overdueReason });
    expect([status, body.overdueReason]).toEqual([200, overdueReason]);
    expect(body.events.at(-1).comment).toContain(overdueReason);
  });

  it('is not said of a chain in calibration; one that is not named is a caution alone', async () => {
    const report = await newInReview(test, [dimmer.verdict.id]);
    expect((await read('manager', report.id)).cautions).toMatchObject([{ code: 'chain-not-named' }]);
    const { chain } = await newBehind(test, '2027-02-03');
    await freezeWith(test, report, () => ({ chain }));
    expect((await read('manager', report.id)).cautions).toEqual([]);
    const overdueReason = 'Nothing was overdue, so this is kept nowhere';
    const { body } = await post('manager', report.id, 'issue', { overdueReason });
    expect(body).toMatchObject({ status: 'issued', overdueReason: null });
  });
});

describe('a new revision', () => {
  const recipients = [{ name: 'Halden', email: 'test@halden.example' }];

  it('starts from what was issued, keeps the number, and supersedes it when it is issued', async () => {
    const first = await newIssued(test, [dimmer.verdict.id], { deviations: 'None', recipients });
    const { status, body } = await post('analyst', first.id, 'revise');
    expect(status).toBe(201);
    const draft = reportSchema.parse(body);
    expect(draft).toMatchObject({
      ...{ status: 'draft', number: first.number, revision: 1, checkCode: null },
      ...{ title: first.title, deviations: 'None', recipients, verdictIds: first.verdictIds },
      replaces: { id: first.id, revision: 0, status: 'issued' },
    });
    const { id } = draft;
    expect((await read('analyst', first.id)).replacedBy).toMatchObject({ id, status: 'draft' });
    expect((await read('guest', first.id)).replacedBy).toBeNull();

    const mute = await post('analyst', id, 'submit');
    expect([mute.status, mute.body.code]).toEqual([422, 'revision-reason-missing']);
    const revisionReason = 'The rated power was wrong';
    const submitted = await post('analyst', id, 'submit', { revisionReason });
    expect(submitted.body.content.revisionReason).toBe(revisionReason);
    const second = reportSchema.parse((await post('manager', id, 'issue')).body);
    expect(second).toMatchObject({ number: first.number, revision: 1, status: 'issued', revisionReason });
    expect(second.checkCode).not.toBe(first.checkCode);

    const replaced = await read('guest', first.id);
    expect(replaced).toMatchObject({ status: 'superseded', replacedBy: { id, status: 'issued' } });
    expect(replaced.events.at(-1)).toMatchObject({ kind: 'superseded', by: { name: 'Manager' } });
    const { content, pdfSha256, title, checkCode } = first;
    expect(replaced).toMatchObject({ content, pdfSha256, title, checkCode });
    expect((await post('analyst', first.id, 'revise')).status).toBe(409);

    const next = await newIssued(test, [dimmer.verdict.id]);
    expect(Number(next.number!.slice(3))).toBe(Number(first.number!.slice(3)) + 1);
  });

  it('is made once at a time, also by two people at the same moment, and again once deleted', async () => {
    const first = await newIssued(test, [dimmer.verdict.id]);
    expect((await post('technician', first.id, 'revise')).status).toBe(403);
    const both = await Promise.all([
      post('analyst', first.id, 'revise'),
      post('manager', first.id, 'revise'),
    ]);
    expect(both.map(({ status }) => status).sort()).toEqual([201, 409]);
    expect(both.find(({ status }) => status === 409)?.body.code).toBe('revision-under-way');
    const made = both.find(({ status }) => status === 201)!.body;
    await (await test.signIn('analyst')).delete(`/api/reports/${made.id}`).expect(204);
    expect((await post('manager', first.id, 'revise')).status).toBe(201);
  });

  it('names a verdict whose recording was read anew since, with the cure', async () => {
    const own = await newJudged(test);
    const first = await newIssued(test, [own.verdict.id]);
    const owner = { projectId: test.project.id, userId: test.people.analyst.id };
    const { id: newer } = await newAnalysis(test.database, own.recordingId, owner);
    await test.database
      .update(schema.analyses)
      .set({ supersededById: newer })
      .where(eq(schema.analyses.id, own.analysisId));
    const { body } = await post('analyst', first.id, 'revise');
    const outdated = reportSchema.parse(body).cautions.find(({ code }) => code === 'verdict-outdated');
    expect(outdated?.message).toMatch(/read or scaled anew.*judge its newest analysis/);
    const submit = await post('analyst', body.id, 'submit', { revisionReason: 'Scaled anew' });
    expect([submit.status, submit.body.code]).toEqual([409, 'verdict-outdated']);
    expect((await read('guest', first.id)).cautions.map(({ code }) => code)).not.toContain(
      'verdict-outdated',
    );
  });
});

describe('content that an earlier version froze', () => {
  it('is read and issued with what it does not know left empty', async () => {
    const report = await newInReview(test, [dimmer.verdict.id]);
    const { content } = report;
    const { customerContact: _c, preparerMayIssue: _p, ...project } = content.project;
    const sections = content.sections.map(({ verdict, recording, analysis, notes }) => {
      const { supply: _s, repeats: _r, repeatability: _y, limitSet, ...earlier } = verdict;
      const { version: _v, ...set } = limitSet;
      return { verdict: { ...earlier, limitSet: set }, recording, analysis, notes };
    });
    await test.database
      .update(schema.reports)
      .set({ content: { project, sections, result: content.result } as never })
      .where(eq(schema.reports.id, report.id));
    const found = await read('manager', report.id);
    expect(found.content).toMatchObject({ laboratory: { name: '' }, revisionReason: null });
    expect(found.content.sections[0]).toMatchObject({ chain: null, equipment: null, conditions: {} });
    expect(found.content.sections[0]!.verdict.limitSet.version).toBe(1);
    expect((await post('manager', report.id, 'issue')).status).toBe(200);
    await (await test.signIn('guest')).get(`/api/reports/${report.id}/pdf`).expect(200);
  });
});
