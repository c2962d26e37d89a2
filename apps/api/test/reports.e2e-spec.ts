import { reportPageSchema, reportSchema } from '@overtally/contracts';
import { schema } from '@overtally/db';
import { eq } from 'drizzle-orm';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { newProject } from './support/factories.js';
import { classAVerdict, newFinishedAnalysis } from './support/finished-analysis.js';
import { newDraft, newInReview, newIssued, newJudged, type Judged } from './support/judged-reports.js';
import { newAnalysis, newNote, newVerdict, type Owner } from './support/project-contents.js';
import { channelWith } from './support/report-example.js';
import { startTestApp, type TestApp } from './support/test-app.js';

let test: TestApp;
let owner: Owner;
let dimmer: Judged;
let quiet: Judged;

beforeAll(async () => {
  test = await startTestApp();
  owner = { projectId: test.project.id, userId: test.people.analyst.id };
  dimmer = await newJudged(test);
  quiet = await newJudged(test, channelWith([1, ...Array.from({ length: 39 }, () => 0.001)]));
});
afterAll(() => test.close());

const reportsPath = (): string => `/api/projects/${test.project.id}/reports`;

describe('a draft', () => {
  it('shows what is stored, one section per verdict in the order asked for, and the worst result', async () => {
    const note = await newNote(test.database, dimmer.analysisId, owner);
    const report = await newDraft(test, [quiet.verdict.id, dimmer.verdict.id]);
    expect(report).toMatchObject({ status: 'draft', number: null, revision: 0, pdfSha256: null });
    expect(report.content.result).toBe('fail');
    expect(report.content.sections.map((section) => section.verdict)).toEqual([
      quiet.verdict,
      dimmer.verdict,
    ]);
    expect(report.content.sections[1]!.notes.map(({ id }) => id)).toEqual([note.id]);
    expect(report.content.sections[1]!.recording).toMatchObject({ id: dimmer.recordingId, durationS: 30 });
    expect(report.preparedBy).toEqual({ id: owner.userId, name: test.people.analyst.name });
  });

  it('can be changed and deleted', async () => {
    const { id } = await newDraft(test, [dimmer.verdict.id], { summary: 'Order 3 is over' });
    const analyst = await test.signIn('analyst');
    const change = { title: 'Second title', verdictIds: [quiet.verdict.id] };
    const { body } = await analyst.patch(`/api/reports/${id}`).send(change).expect(200);
    const changed = reportSchema.parse(body);
    expect(changed).toMatchObject({ ...change, summary: 'Order 3 is over', content: { result: 'pass' } });
    expect(changed.events.map(({ kind }) => kind)).toEqual(['created', 'changed']);
    await analyst.delete(`/api/reports/${id}`).expect(204);
    await analyst.get(`/api/reports/${id}`).expect(404);
  });

  it('takes the ids of verdicts in either case', async () => {
    const { verdictIds } = await newDraft(test, [dimmer.verdict.id.toUpperCase()]);
    expect(verdictIds).toEqual([dimmer.verdict.id]);
  });

  it('refuses verdicts of another project by their place', async () => {
    const project = await newProject(test.database);
    const foreign = { projectId: project.id, userId: owner.userId };
    const { analysisId } = await newFinishedAnalysis(test.database, foreign);
    const { id } = await newVerdict(test.database, analysisId, foreign);
    const analyst = await test.signIn('analyst');
    const body = { title: 'Mixed', verdictIds: [dimmer.verdict.id, id] };
    const made = await analyst.post(reportsPath()).send(body).expect(422);
    expect(made.body.errors).toEqual([{ path: 'verdictIds.1', message: 'The project has no such verdict' }]);
    const draft = await newDraft(test, [dimmer.verdict.id]);
    await analyst
      .patch(`/api/reports/${draft.id}`)
      .send({ verdictIds: [id] })
      .expect(422);
  });
});

describe('the way to an issued report', () => {
  it('goes through review, back for mending, and to issue, with every step on record', async () => {
    const { id } = await newInReview(test, [dimmer.verdict.id]);
    const manager = await test.signIn('manager');
    const analyst = await test.signIn('analyst');
    const mute = await manager.post(`/api/reports/${id}/return`).send({ comment: ' ' }).expect(400);
    expect(mute.body.errors[0].path).toBe('comment');
    const returned = await manager
      .post(`/api/reports/${id}/return`)
      .send({ comment: 'Name the EUT' })
      .expect(200);
    expect(returned.body.status).toBe('draft');
    await analyst.post(`/api/reports/${id}/submit`).send({}).expect(200);
    const { body } = await manager.post(`/api/reports/${id}/issue`).send({}).expect(200);
    const issued = reportSchema.parse(body);
    expect(issued).toMatchObject({ status: 'issued', issuedBy: { id: test.people.manager.id } });
    expect(issued.number).toMatch(/^HR-\d{4}$/);
    expect(issued.events.map(({ kind, by, comment }) => [kind, by.name, comment])).toEqual([
      ['created', 'Analyst', ''],
      ['submitted', 'Analyst', ''],
      ['returned', 'Manager', 'Name the EUT'],
      ['submitted', 'Analyst', ''],
      ['issued', 'Manager', ''],
    ]);
  });

  it('says what is possible when a step does not fit the state', async () => {
    const manager = await test.signIn('manager');
    const draft = await newDraft(test, [dimmer.verdict.id]);
    const early = await manager.post(`/api/reports/${draft.id}/issue`).send({}).expect(409);
    expect(early.body.detail).toContain('submitted for review');
    const review = await newInReview(test, [dimmer.verdict.id]);
    const late = await manager.patch(`/api/reports/${review.id}`).send({ title: 'New' }).expect(409);
    expect(late.body.detail).toContain('return or issue');
    await manager.delete(`/api/reports/${review.id}`).expect(409);
    await manager.post(`/api/reports/${review.id}/submit`).send({}).expect(409);
    const issued = await newIssued(test, [dimmer.verdict.id]);
    for (const step of ['submit', 'return', 'issue']) {
      await manager.post(`/api/reports/${issued.id}/${step}`).send({ comment: 'Again' }).expect(409);
    }
    await manager.patch(`/api/reports/${issued.id}`).send({ title: 'New' }).expect(409);
    await manager.delete(`/api/reports/${issued.id}`).expect(409);
  });

  it('asks for the role that each step needs', async () => {
    const { id } = await newInReview(test, [dimmer.verdict.id]);
    for (const role of ['analyst', 'technician', 'guest', 'administrator'] as const) {
      const person = await test.signIn(role);
      await person.post(`/api/reports/${id}/issue`).send({}).expect(403);
      await person.get(`/api/reports/${id}`).expect(role === 'guest' ? 404 : 200);
    }
    const stranger = await test.signIn('stranger');
    await stranger.post(`/api/reports/${id}/issue`).send({}).expect(404);
    await stranger.get(`/api/reports/${id}/pdf`).expect(404);
    const technician = await test.signIn('technician');
    const body = { title: 'Mine', verdictIds: [dimmer.verdict.id] };
    await technician.post(reportsPath()).send(body).expect(403);
    const after = await (await test.signIn('manager')).get(`/api/reports/${id}`).expect(200);
    expect(after.body.status).toBe('in-review');
  });

  it('hands out numbers without gap or double, also to reports issued at the same moment', async () => {
    const before = await newIssued(test, [dimmer.verdict.id]);
    const waiting = await Promise.all([1, 2, 3, 4].map(() => newInReview(test, [quiet.verdict.id])));
    const manager = await test.signIn('manager');
    const replies = await Promise.all(
      waiting.flatMap(({ id }) => [
        manager.post(`/api/reports/${id}/issue`).send({}),
        manager.post(`/api/reports/${id}/issue`).send({}),
      ]),
    );
    expect(replies.map(({ status }) => status).sort()).toEqual([200, 200, 200, 200, 409, 409, 409, 409]);
    const issued = replies.filter(({ status }) => status === 200);
    const numbers = issued.map(({ body }) => reportSchema.parse(body).number).sort();
    const first = Number(before.number!.slice(3));
    expect(numbers).toEqual([1, 2, 3, 4].map((step) => `HR-${String(first + step).padStart(4, '0')}`));
  });

  it('issues what was reviewed; a return makes it live again', async () => {
    const own = await newJudged(test);
    const { id, content } = await newInReview(test, [own.verdict.id]);
    await newNote(test.database, own.analysisId, owner);
    await test.database
      .update(schema.recordings)
      .set({ eut: 'Another' })
      .where(eq(schema.recordings.id, own.recordingId));
    const manager = await test.signIn('manager');
    const { body: reviewed } = await manager.get(`/api/reports/${id}`).expect(200);
    expect(reviewed.content).toEqual(content);
    const { body: returned } = await manager
      .post(`/api/reports/${id}/return`)
      .send({ comment: 'Say what EUT it was' })
      .expect(200);
    expect(returned.content.sections[0]).toMatchObject({ recording: { eut: 'Another' }, notes: [{}] });
    const analyst = await test.signIn('analyst');
    const { body: again } = await analyst.post(`/api/reports/${id}/submit`).send({}).expect(200);
    const { body: issued } = await manager.post(`/api/reports/${id}/issue`).send({}).expect(200);
    expect(issued.content).toEqual(again.content);
    expect(issued.content).toEqual(returned.content);
  });

  it('freezes what it says, whatever becomes of the recording and its notes', async () => {
    const own = await newJudged(test);
    const issued = await newIssued(test, [own.verdict.id]);
    await newNote(test.database, own.analysisId, owner);
    await test.database
      .update(schema.recordings)
      .set({ name: 'Renamed', eut: 'Another' })
      .where(eq(schema.recordings.id, own.recordingId));
    const guest = await test.signIn('guest');
    const { body } = await guest.get(`/api/reports/${issued.id}`).expect(200);
    expect(body).toEqual(issued);
  });
});

describe('a verdict on a recording that was read or scaled anew', () => {
  /** Puts an analysis of a new reading in the place of the judged one. */
  async function readAnew({ analysisId, recordingId }: Judged): Promise<void> {
    const { id } = await newAnalysis(test.database, recordingId, owner);
    await test.database
      .update(schema.analyses)
      .set({ supersededById: id })
      .where(eq(schema.analyses.id, analysisId));
  }

  it('is neither made nor put into a report, and the report is not submitted', async () => {
    const own = await newJudged(test);
    const draft = await newDraft(test, [quiet.verdict.id, own.verdict.id]);
    await readAnew(own);
    const analyst = await test.signIn('analyst');
    const verdictPath = `/api/analyses/${own.analysisId}/verdicts`;
    const judged = await analyst.post(verdictPath).send(classAVerdict()).expect(409);
    expect(judged.body.code).toBe('analysis-superseded');
    const verdictIds = [quiet.verdict.id, own.verdict.id];
    const refused = [
      analyst.post(reportsPath()).send({ title: 'Late', verdictIds }),
      analyst.patch(`/api/reports/${draft.id}`).send({ verdictIds }),
      analyst.post(`/api/reports/${draft.id}/submit`).send({}),
    ];
    for (const request of refused) {
      const { body } = await request.expect(409);
      expect(body).toMatchObject({ code: 'verdict-outdated', errors: [{ path: 'verdictIds.1' }] });
      expect(body.detail).toContain('newest analysis');
    }
    await analyst
      .patch(`/api/reports/${draft.id}`)
      .send({ verdictIds: [quiet.verdict.id] })
      .expect(200);
    await analyst.post(`/api/reports/${draft.id}/submit`).send({}).expect(200);
  });

  it('is not issued after the review either, and goes back for mending', async () => {
    const own = await newJudged(test);
    const { id } = await newInReview(test, [own.verdict.id]);
    await readAnew(own);
    const manager = await test.signIn('manager');
    const { body } = await manager.post(`/api/reports/${id}/issue`).send({}).expect(409);
    expect(body.code).toBe('verdict-outdated');
    await manager.post(`/api/reports/${id}/return`).send({ comment: 'Judge anew' }).expect(200);
  });

  it('stands when the same samples are only analysed under other settings', async () => {
    const own = await newJudged(test);
    await newAnalysis(test.database, own.recordingId, owner);
    expect((await newIssued(test, [own.verdict.id])).status).toBe('issued');
  });
});

describe('the list of reports', () => {
  it('can be narrowed by status and read page by page, the newest first', async () => {
    const technician = await test.signIn('technician');
    const ids = [await newDraft(test, [quiet.verdict.id]), await newDraft(test, [dimmer.verdict.id])].map(
      ({ id }) => id,
    );
    const first = reportPageSchema.parse((await technician.get(`${reportsPath()}?limit=1`).expect(200)).body);
    expect(first.items[0]).toMatchObject({ id: ids[1], result: 'fail', sections: 1 });
    const next = await technician.get(`${reportsPath()}?limit=1&cursor=${first.nextCursor}`).expect(200);
    expect(next.body.items[0]).toMatchObject({ id: ids[0], result: 'pass' });
    const { body } = await technician.get(`${reportsPath()}?status=issued`).expect(200);
    const statuses = reportPageSchema.parse(body).items.map((item) => item.status);
    expect(new Set(statuses)).toEqual(new Set(['issued']));
  });

  it('hides drafts and reports in review from guests, their PDF too', async () => {
    const hidden = [await newDraft(test, [quiet.verdict.id]), await newInReview(test, [quiet.verdict.id])];
    const issued = await newIssued(test, [quiet.verdict.id]);
    const guest = await test.signIn('guest');
    const { items } = reportPageSchema.parse((await guest.get(reportsPath()).expect(200)).body);
    expect(items.map(({ id }) => id)).toContain(issued.id);
    expect(new Set(items.map(({ status }) => status))).toEqual(new Set(['issued']));
    const { body: drafts } = await guest.get(`${reportsPath()}?status=draft`).expect(200);
    expect(drafts).toEqual({ items: [], nextCursor: null });
    for (const { id } of hidden) {
      await guest.get(`/api/reports/${id}`).expect(404);
      await guest.get(`/api/reports/${id}/pdf`).expect(404);
    }
    await guest.get(`/api/reports/${issued.id}/pdf`).expect(200);
    const administrator = await test.signIn('administrator');
    await administrator.get(`/api/reports/${hidden[0]!.id}/pdf`).expect(200);
  });
});

describe('an issued report in the database', () => {
  it('refuses every change and deletion, of its verdicts and events too', async () => {
    const own = await newJudged(test);
    const { id } = await newIssued(test, [own.verdict.id]);
    const { reports, reportEvents, reportVerdicts, verdicts } = schema;
    const { database } = test;
    const refused = /issued report|is issued/;
    const attempts = [
      () => database.update(reports).set({ title: 'Other' }).where(eq(reports.id, id)),
      () => database.update(reports).set({ number: 99 }).where(eq(reports.id, id)),
      () => database.update(reports).set({ pdfSha256: '0' }).where(eq(reports.id, id)),
      () => database.update(reports).set({ status: 'draft' }).where(eq(reports.id, id)),
      () => database.delete(reports).where(eq(reports.id, id)),
      () => database.update(verdicts).set({ result: 'pass' }).where(eq(verdicts.id, own.verdict.id)),
      () => database.delete(verdicts).where(eq(verdicts.id, own.verdict.id)),
      () => database.delete(reportVerdicts).where(eq(reportVerdicts.reportId, id)),
      () => database.update(reportEvents).set({ comment: '' }).where(eq(reportEvents.reportId, id)),
      () => database.delete(schema.recordings).where(eq(schema.recordings.id, own.recordingId)),
    ];
    for (const attempt of attempts) {
      const error = await attempt().then(
        () => null,
        (thrown: Error) => thrown.cause as Error,
      );
      expect(error?.message).toMatch(refused);
    }
    const [row] = await database.select().from(reports).where(eq(reports.id, id));
    expect(row?.status).toBe('issued');
  });

  it('can be superseded and not come back', async () => {
    const { id } = await newIssued(test, [dimmer.verdict.id]);
    const { reports } = schema;
    await test.database.update(reports).set({ status: 'superseded' }).where(eq(reports.id, id));
    const back = test.database.update(reports).set({ status: 'issued' }).where(eq(reports.id, id));
    await expect(back).rejects.toThrow();
  });
});
