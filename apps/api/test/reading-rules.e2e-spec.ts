import type { ReadingRule, Recording } from '@overtally/contracts';
import type TestAgent from 'supertest/lib/agent.js';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { csvOf, squareWave } from './support/captures.js';
import { newProject } from './support/factories.js';
import { settled, upload } from './support/recordings.js';
import { startTestApp, type TestApp } from './support/test-app.js';

const rateHz = 10_000;
const capture = csvOf(squareWave(rateHz, 5_000), rateHz);
const tenfold = { channels: [{ column: 1, name: 'U1', unit: 'V', gain: 10 }] };

let test: TestApp;
let technician: TestAgent;

beforeAll(async () => {
  test = await startTestApp({ WORKER: 'embedded' });
  technician = await test.signIn('technician');
});
afterAll(() => test.close());

/** A project of the technician alone, so that no rule of another test fits. */
async function ownProject(): Promise<string> {
  const { id } = await newProject(test.database, { members: { [test.people.technician.id]: 'technician' } });
  return id;
}

const rulesPath = (projectId: string) => `/api/projects/${projectId}/reading-rules`;

async function newRule(projectId: string, rule: object): Promise<ReadingRule> {
  const stated = { name: 'Bench', fileNamePattern: '*.csv', options: tenfold, ...rule };
  return (await technician.post(rulesPath(projectId)).send(stated).expect(201)).body as ReadingRule;
}

describe('reading rules of a project', () => {
  it('are listed in the order they are tried', async () => {
    const projectId = await ownProject();
    const any = await newRule(projectId, { name: 'Any', fileNamePattern: '*' });
    const columns = await newRule(projectId, { name: 'Columns', columnNames: ['time', 'u'] });
    const long = await newRule(projectId, { name: 'Long', fileNamePattern: 'bench-*.csv' });
    const { body } = await technician.get(rulesPath(projectId)).expect(200);
    expect(body).toEqual({ items: [columns, long, any], nextCursor: null });
    expect(any).toMatchObject({ projectId, columnNames: null, recordingCount: 0, options: tenfold });
    expect(any.createdBy).toEqual({ id: test.people.technician.id, name: 'Technician' });
  });

  it('have names of their own; the refusal says which is taken', async () => {
    const projectId = await ownProject();
    const first = await newRule(projectId, { name: 'Bench 1' });
    const second = await newRule(projectId, { name: 'Bench 2' });
    const again = { name: 'Bench 1', fileNamePattern: '*', options: {} };
    const refusals = [
      await technician.post(rulesPath(projectId)).send(again).expect(409),
      await technician.patch(`/api/reading-rules/${second.id}`).send({ name: 'Bench 1' }).expect(409),
    ];
    for (const { body } of refusals) {
      expect(body).toMatchObject({ code: 'name-taken', errors: [{ path: 'name' }] });
      expect(body.detail).toContain('Bench 1');
    }
    await technician.patch(`/api/reading-rules/${first.id}`).send({ name: 'Bench 1' }).expect(200);
    await newRule(await ownProject(), { name: 'Bench 1' });
  });

  it('are changed and deleted; recordings keep the name', async () => {
    const projectId = await ownProject();
    const rule = await newRule(projectId, {});
    const { id } = await upload(technician, projectId, capture, 'kept.csv');
    const change = { fileNamePattern: '*.txt', columnNames: ['a'] };
    const changed = await technician.patch(`/api/reading-rules/${rule.id}`).send(change).expect(200);
    expect(changed.body).toMatchObject({ ...change, name: 'Bench', options: tenfold, recordingCount: 1 });
    await technician.delete(`/api/reading-rules/${rule.id}`).expect(204);
    await technician.patch(`/api/reading-rules/${rule.id}`).send({}).expect(404);
    expect(await settled(technician, id)).toMatchObject({
      status: 'ready',
      readingRule: { id: null, name: 'Bench' },
    });
  });

  it('are unknown outside their project', async () => {
    const { id } = await newRule(test.project.id, { fileNamePattern: 'nothing' });
    const stranger = await test.signIn('stranger');
    await stranger.patch(`/api/reading-rules/${id}`).send({ name: 'Mine' }).expect(404);
    await stranger.delete(`/api/reading-rules/${id}`).expect(404);
  });
});

describe('a file that a rule fits', () => {
  it('is read by it, and the recording says so', async () => {
    const projectId = await ownProject();
    const { id, name } = await newRule(projectId, { columnNames: ['time', 'u'] });
    const received = await upload(technician, projectId, capture, 'Motor.CSV', { import: '{}' });
    expect(received).toMatchObject({ import: tenfold, readingRule: { id, name } });
    expect(await settled(technician, received.id)).toMatchObject({
      ...{ status: 'ready', import: tenfold, readingRule: { id, name } },
      channels: [{ name: 'U1', gain: 10 }],
    });
    const { body } = await technician.get(rulesPath(projectId)).expect(200);
    expect(body.items[0].recordingCount).toBe(1);
  });

  it('is told by its columns as they are under the options of the rule', async () => {
    const projectId = await ownProject();
    await newRule(projectId, { name: 'Other', columnNames: ['time', 'i'] });
    const options = { delimiter: ';', decimal: ',' };
    await newRule(projectId, { name: 'Comma', columnNames: ['time', 'u'], options });
    const samples = squareWave(rateHz, 500);
    const semicolons = csvOf(samples, rateHz, { header: 'time (s);u (V)', delimiter: ';', decimal: ',' });
    const one = await upload(technician, projectId, semicolons, 'a.csv');
    expect(one.readingRule?.name).toBe('Comma');
    const header = 'time (s),p (W)';
    const other = await upload(technician, projectId, csvOf(samples, rateHz, { header }), 'b.csv');
    expect(other).toMatchObject({ import: {}, readingRule: null });
  });

  it('is read by what is stated instead, or by no rule where none is wanted', async () => {
    const projectId = await ownProject();
    const rule = await newRule(projectId, {});
    const stated = { channels: [{ column: 1, name: 'By hand' }] };
    const ref = { id: rule.id, name: rule.name };
    const asked: [Record<string, string>, Partial<Recording>][] = [
      [{ import: JSON.stringify(stated) }, { import: stated, readingRule: null }],
      [{ readingRuleId: 'null' }, { import: {}, readingRule: null }],
      [{ readingRuleId: '' }, { import: tenfold, readingRule: ref }],
      [{ readingRuleId: rule.id }, { import: tenfold, readingRule: ref }],
      [
        { readingRuleId: rule.id, import: JSON.stringify(stated) },
        { import: stated, readingRule: ref },
      ],
    ];
    for (const [fields, wanted] of asked) {
      expect(await upload(technician, projectId, capture, 'x.csv', fields)).toMatchObject(wanted);
    }
  });

  it('refuses a rule of another project', async () => {
    const { id } = await newRule(await ownProject(), {});
    const { body } = await technician
      .post(`/api/projects/${await ownProject()}/recordings`)
      .attach('file', capture, 'x.csv')
      .field('readingRuleId', id)
      .expect(400);
    expect(body.errors).toMatchObject([{ path: 'readingRuleId' }]);
  });

  it('fails under a rule that does not suit it with words that name the rule', async () => {
    const projectId = await ownProject();
    await newRule(projectId, { name: 'Three columns', options: { channels: [{ column: 'u3' }] } });
    const { id } = await upload(technician, projectId, capture, 'x.csv');
    const { status, problem } = await settled(technician, id);
    expect({ status, code: problem?.code }).toEqual({ status: 'failed', code: 'unknown-column' });
    expect(problem?.message).toContain('“Three columns”');
    expect(problem?.cure).toContain('without it');

    await technician.post(`/api/recordings/${id}/read`).send({ readingRuleId: null }).expect(202);
    const read = await settled(technician, id);
    expect(read).toMatchObject({ status: 'ready', import: {}, readingRule: null });
  });

  it('is read again by the rule as it is now', async () => {
    const projectId = await ownProject();
    const { id } = await upload(technician, projectId, capture, 'x.csv');
    await settled(technician, id);
    const rule = await newRule(projectId, {});
    await technician.post(`/api/recordings/${id}/read`).send({ readingRuleId: rule.id }).expect(202);
    expect(await settled(technician, id)).toMatchObject({
      ...{ status: 'ready', import: tenfold, readingRule: { id: rule.id } },
      channels: [{ gain: 10 }],
    });
  });
});
