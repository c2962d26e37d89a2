import { reportSchema, verdictSchema, type Report, type Verdict } from '@overtally/contracts';
import type { ChannelAnalysis } from '@overtally/contracts';
import { classAVerdict, newFinishedAnalysis, type Judgeable } from './finished-analysis.js';
import { dimmerChannel } from './report-example.js';
import type { TestApp } from './test-app.js';

export interface Judged extends Judgeable {
  verdict: Verdict;
}

/** A finished analysis with a verdict by class A, made through the API by the analyst. */
export async function newJudged(
  test: TestApp,
  channel: ChannelAnalysis = dimmerChannel(),
  recording: Parameters<typeof newFinishedAnalysis>[3] = {},
): Promise<Judged> {
  const owner = { projectId: test.project.id, userId: test.people.analyst.id };
  const made = await newFinishedAnalysis(test.database, owner, [channel], recording);
  const analyst = await test.signIn('analyst');
  const body = classAVerdict({ channel: channel.index });
  const reply = await analyst.post(`/api/analyses/${made.analysisId}/verdicts`).send(body).expect(201);
  return { ...made, verdict: verdictSchema.parse(reply.body) };
}

/** A draft over the verdicts, made by the analyst. */
export async function newDraft(test: TestApp, verdictIds: string[], given: object = {}): Promise<Report> {
  const analyst = await test.signIn('analyst');
  const body = { title: 'Harmonic current of dimmer DM-4', verdictIds, ...given };
  const reply = await analyst.post(`/api/projects/${test.project.id}/reports`).send(body).expect(201);
  return reportSchema.parse(reply.body);
}

/** A report that waits for the manager. */
export async function newInReview(test: TestApp, verdictIds: string[], given: object = {}): Promise<Report> {
  const { id } = await newDraft(test, verdictIds, given);
  const analyst = await test.signIn('analyst');
  const reply = await analyst.post(`/api/reports/${id}/submit`).send({}).expect(200);
  return reportSchema.parse(reply.body);
}

/** A report that the manager has issued. */
export async function newIssued(test: TestApp, verdictIds: string[], given: object = {}): Promise<Report> {
  const { id } = await newInReview(test, verdictIds, given);
  const manager = await test.signIn('manager');
  const reply = await manager.post(`/api/reports/${id}/issue`).send({ comment: 'Checked' }).expect(200);
  return reportSchema.parse(reply.body);
}
