import type { Project, Recording, Report, ReportListItem } from '@overtally/contracts';
import { demoPeople, demoProjects } from '@overtally/fixtures';
import { createHash } from 'node:crypto';
import { readFile } from 'node:fs/promises';
import { demoCapturePath } from '@overtally/fixtures';
import supertest from 'supertest';
import type TestAgent from 'supertest/lib/agent.js';
import { afterAll, beforeAll, expect, it } from 'vitest';
import { DemoAccounts } from '../dist/demo/demo-accounts.js';
import { DemoJudgements } from '../dist/demo/demo-judgements.js';
import { eventually } from './support/recordings.js';
import { startTestApp, type TestApp } from './support/test-app.js';

let test: TestApp;
let analyst: TestAgent;

beforeAll(async () => {
  test = await startTestApp({ WORKER: 'embedded', DEMO: 'on' });
  analyst = supertest.agent(test.http);
  const person = demoPeople.find(({ role }) => role === 'analyst')!;
  await analyst
    .post('/api/auth/sign-in')
    .send({ email: person.email, password: person.password })
    .expect(200);
});
afterAll(() => test.close());

it(
  'a new installation shows projects whose captures went the way of any upload',
  { timeout: 180_000 },
  async () => {
    const { body } = await analyst.get('/api/projects').expect(200);
    const projects = body.items as Project[];
    expect(projects.map(({ name }) => name).sort()).toEqual(demoProjects.map(({ name }) => name).sort());
    for (const { name, captures } of demoProjects) {
      const { id } = projects.find((project) => project.name === name)!;
      const { items } = await eventually<{ items: Recording[] }>(
        analyst,
        `/api/projects/${id}/recordings?sort=number`,
        ({ items: rows }) =>
          rows.length === captures.length &&
          rows.every(({ status }) => status === 'ready' || status === 'failed'),
        120_000,
      );
      expect(items.map(({ name: title, status, problem }) => ({ title, status, problem }))).toEqual(
        captures.map((capture) => ({ title: capture.name, status: 'ready', problem: null })),
      );
      const first = await readFile(demoCapturePath(captures[0]!.fileName));
      expect(items[0]!.file.sha256).toBe(createHash('sha256').update(first).digest('hex'));
    }
  },
);

it('the analyst has judged currents, noted a cause and begun a report', { timeout: 60_000 }, async () => {
  const { body } = await analyst.get('/api/projects').expect(200);
  const { id } = (body.items as Project[]).find(({ name }) => name === demoProjects[0]!.name)!;
  const { items: drafts } = await eventually<{ items: ReportListItem[] }>(
    analyst,
    `/api/projects/${id}/reports`,
    ({ items }) => items.length > 0,
    50_000,
  );
  expect(drafts).toMatchObject([{ status: 'draft' }]);
  const report = (await analyst.get(`/api/reports/${drafts[0]!.id}`).expect(200)).body as Report;
  const sections = report.content.sections;
  expect(sections.map(({ verdict }) => verdict.limitSetId)).toEqual(Array(2).fill('iec61000-3-2.classA'));
  expect(sections.map(({ analysis }) => analysis.channel.quantity)).toEqual(['current', 'current']);
  // A sine of 6.15 A peak that conducts from 90 degrees has 6.15 / (7 pi sqrt 2) = 0.198 A of order 15 (Fourier
  // integral); class A of IEC 61000-3-2 allows 0.15 A (table 1).
  const { verdict } = sections[1]!;
  expect(verdict.result).toBe('fail');
  const order15 = verdict.orders.find(({ order }) => order === 15)!;
  expect(order15.mean).toBeCloseTo(0.198, 3);
  expect(order15.limit).toBeCloseTo(0.15, 10);
  expect(sections[1]!.notes).toHaveLength(1);
});

it('makes nothing twice', async () => {
  const projectId = (await analyst.get('/api/projects').expect(200)).body.items.map(
    ({ id }: Project) => id,
  ) as string[];
  const counts = async () =>
    Promise.all(
      projectId.map(
        async (id) => (await analyst.get(`/api/projects/${id}/verdicts`).expect(200)).body.items.length,
      ),
    );
  const before = await counts();
  expect(await test.app.get(DemoJudgements).make()).toBe(true);
  expect(await counts()).toEqual(before);
  const accounts = test.app.get(DemoAccounts);
  expect(await accounts.make()).toBe(false);
  expect(await accounts.pending()).toEqual([]);
});
