import {
  studyPageSchema,
  studySchema,
  type Project,
  type Recording,
  type Report,
  type ReportListItem,
} from '@overtally/contracts';
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

it('a study shows a filter that makes the failing current pass', async () => {
  const { body } = await analyst.get('/api/projects').expect(200);
  const { id } = (body.items as Project[]).find(({ name }) => name === demoProjects[0]!.name)!;
  const { items } = studyPageSchema.parse(
    (await analyst.get(`/api/projects/${id}/studies`).expect(200)).body,
  );
  expect(items).toMatchObject([{ stability: 'stable', resultBefore: 'fail', resultAfter: 'pass' }]);
  // C with Rd and L in parallel, beside Ls and Rs: Zf/(Zf + Zs) at order 15, by arithmetic of impedances.
  const study = studySchema.parse((await analyst.get(`/api/studies/${items[0]!.id}`).expect(200)).body);
  const order15 = study.result.orders.find(({ order }) => order === 15)!;
  const omega = 2 * Math.PI * order15.frequencyHz;
  const [x, r] = [omega * 50e-3, 22];
  // (0.1 + jx) beside r.
  const size = (0.1 + r) ** 2 + x ** 2;
  const beside = { re: (r * (0.1 * (0.1 + r) + x ** 2)) / size, im: (r * r * x) / size };
  const filter = { re: beside.re, im: beside.im - 1 / (omega * 22e-6) };
  const whole = { re: filter.re + 0.3, im: filter.im + omega * 10e-3 };
  const gain = Math.hypot(filter.re, filter.im) / Math.hypot(whole.re, whole.im);
  expect(order15.gain).toBeCloseTo(gain, 10);
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
