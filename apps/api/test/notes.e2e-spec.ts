import type { Note } from '@overtally/contracts';
import type TestAgent from 'supertest/lib/agent.js';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { csvOf, squareWave } from './support/captures.js';
import type { Role } from './support/people.js';
import { settled, upload } from './support/recordings.js';
import { startTestApp, type TestApp } from './support/test-app.js';

let test: TestApp;
let agents: Record<Role, TestAgent>;
let path: string;

beforeAll(async () => {
  test = await startTestApp({ WORKER: 'embedded' });
  const roles = ['technician', 'analyst', 'manager', 'guest'] as const;
  const entries = await Promise.all(roles.map(async (role) => [role, await test.signIn(role)]));
  agents = Object.fromEntries(entries) as Record<Role, TestAgent>;
  const bytes = csvOf(squareWave(10_000, 5_000), 10_000);
  const { id } = await upload(agents.technician, test.project.id, bytes, 'square.csv');
  path = `/api/analyses/${(await settled(agents.technician, id)).latestAnalysisId}/notes`;
});
afterAll(() => test.close());

const targets = [
  { kind: 'order', order: 5 },
  { kind: 'line', frequencyHz: 1234.5 },
  { kind: 'span', fromS: 0.1, toS: 0.2 },
];

describe('notes', () => {
  it.each(targets)('stand on an order, a line or a span: $kind', async (target) => {
    const { body } = await agents.technician
      .post(path)
      .send({ channel: 0, target, text: ' Six-pulse bridge ', cause: 'Drive' })
      .expect(201);
    expect(body).toMatchObject({ channel: 0, target, text: 'Six-pulse bridge', cause: 'Drive' });
    expect(body.author).toEqual({ id: test.people.technician.id, name: 'Technician' });
  });

  it('are listed to every member in the order they were written, page by page', async () => {
    const { body: first } = await agents.guest.get(path).query({ limit: 2 }).expect(200);
    const { body: second } = await agents.guest.get(path).query({ cursor: first.nextCursor }).expect(200);
    const notes = [...first.items, ...second.items] as Note[];
    expect(notes.map(({ target }) => target)).toEqual(targets);
    expect(second.nextCursor).toBeNull();
  });

  it('are changed by their author or a manager, and by nobody else', async () => {
    const { body: note } = await agents.technician
      .post(path)
      .send({ channel: 0, target: targets[0], text: 'First' })
      .expect(201);
    const one = `/api/notes/${note.id}`;
    await agents.analyst.patch(one).send({ text: 'Second' }).expect(403);
    await agents.analyst.delete(one).expect(403);
    await agents.guest.patch(one).send({ text: 'Second' }).expect(403);
    await agents.technician.patch(one).send({ text: 'Second', cause: 'Drive' }).expect(200);
    const { body: kept } = await agents.technician.patch(one).send({ text: 'Second' }).expect(200);
    expect(kept.cause).toBe('Drive');
    const { body: changed } = await agents.manager.patch(one).send({ cause: 'Line' }).expect(200);
    expect(changed).toMatchObject({
      text: 'Second',
      cause: 'Line',
      author: { id: test.people.technician.id },
    });
    await agents.manager.delete(one).expect(204);
    await agents.manager.patch(one).send({ text: 'Third' }).expect(404);
  });

  it('are refused where the analysis has no such channel, or the span ends before it begins', async () => {
    const unknown = { channel: 3, target: targets[0], text: 'x' };
    const { body } = await agents.technician.post(path).send(unknown).expect(400);
    expect(body.errors[0].path).toBe('channel');
    const backwards = { channel: 0, target: { kind: 'span', fromS: 1, toS: 0.5 }, text: 'x' };
    await agents.technician.post(path).send(backwards).expect(400);
    await agents.technician.post(path).send({ channel: 0, target: targets[0], text: ' ' }).expect(400);
  });
});
