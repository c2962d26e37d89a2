import type { Project, Recording } from '@overtally/contracts';
import { demoPeople, demoProjects } from '@overtally/fixtures';
import { createHash } from 'node:crypto';
import { readFile } from 'node:fs/promises';
import { demoCapturePath } from '@overtally/fixtures';
import supertest from 'supertest';
import type TestAgent from 'supertest/lib/agent.js';
import { afterAll, beforeAll, expect, it } from 'vitest';
import { DemoAccounts } from '../dist/demo/demo-accounts.js';
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

it('makes nothing twice', async () => {
  const accounts = test.app.get(DemoAccounts);
  expect(await accounts.make()).toBe(false);
  expect(await accounts.pending()).toEqual([]);
});
