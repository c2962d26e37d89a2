import { accountSchema, memberPageSchema, projectPageSchema, projectSchema } from '@overtally/contracts';
import type TestAgent from 'supertest/lib/agent.js';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { newPerson, newProject } from './support/factories.js';
import { newLimitSet, newRecording } from './support/project-contents.js';
import { startTestApp, type TestApp } from './support/test-app.js';

let test: TestApp;
let manager: TestAgent;
beforeAll(async () => {
  test = await startTestApp();
  manager = await test.signIn('manager');
});
afterAll(() => test.close());

const names = (reply: { body: unknown }) =>
  projectPageSchema.parse(reply.body).items.map((project) => project.name);

describe('projects', () => {
  it('belong to who makes them, as manager, with settings to start from', async () => {
    const reply = await manager.post('/api/projects').send({ name: ' Choke ', customer: 'Mill' }).expect(201);
    expect(projectSchema.parse(reply.body)).toMatchObject({
      name: 'Choke',
      customer: 'Mill',
      role: 'manager',
      defaultSettings: { profile: 'mains', nominalFrequencyHz: 'auto' },
      counts: { recordings: 0, members: 1, reports: 0 },
      archivedAt: null,
    });
  });

  it('count their recordings and members', async () => {
    const project = await newProject(test.database, { members: { [test.people.guest.id]: 'guest' } });
    const owner = { projectId: project.id, userId: test.people.guest.id };
    await newRecording(test.database, owner);
    await newRecording(test.database, owner);
    const reply = await (await test.signIn('guest')).get(`/api/projects/${project.id}`).expect(200);
    expect(reply.body).toMatchObject({ role: 'guest', counts: { recordings: 2, members: 1, reports: 0 } });
  });

  it('are listed for members alone, and all of them for an administrator', async () => {
    await newProject(test.database, { name: 'Elsewhere' });
    expect(names(await manager.get('/api/projects'))).not.toContain('Elsewhere');
    expect(names(await (await test.signIn('stranger')).get('/api/projects'))).toEqual([]);
    const forAdministrator = await (await test.signIn('administrator')).get('/api/projects');
    expect(names(forAdministrator)).toEqual(expect.arrayContaining(['Elsewhere', 'Rectifier']));
    expect(projectPageSchema.parse(forAdministrator.body).items[0]?.role).toBeNull();
  });

  it('come page by page, the newest first, without gap or repeat', async () => {
    const person = await newPerson(test.database);
    for (const name of ['a', 'b', 'c', 'd', 'e']) {
      await newProject(test.database, {
        name,
        members: { [person.id]: 'manager', [test.people.analyst.id]: 'analyst' },
      });
    }
    const agent = await test.signIn('analyst');
    const seen: string[] = [];
    let cursor: string | null = null;
    do {
      const reply: { body: { nextCursor: string | null } } = await agent
        .get('/api/projects')
        .query({ limit: 2, ...(cursor !== null && { cursor }) })
        .expect(200);
      seen.push(...names(reply));
      cursor = reply.body.nextCursor;
    } while (cursor !== null);
    expect(seen).toEqual(['e', 'd', 'c', 'b', 'a', 'Rectifier']);
  });

  it('are found by words in name or customer, taken literally', async () => {
    await manager.post('/api/projects').send({ name: 'Drive 100%', customer: 'Paper' }).expect(201);
    await manager.post('/api/projects').send({ name: 'Drive 1000', customer: 'Steel' }).expect(201);
    expect(names(await manager.get('/api/projects').query({ q: '100%' }))).toEqual(['Drive 100%']);
    expect(names(await manager.get('/api/projects').query({ q: 'steel' }))).toEqual(['Drive 1000']);
  });

  it('leave the list when archived, and come back', async () => {
    const { body } = await manager.post('/api/projects').send({ name: 'Old work' }).expect(201);
    const address = `/api/projects/${body.id}`;
    const archived = await manager.patch(address).send({ archived: true }).expect(200);
    const again = await manager.patch(address).send({ archived: true, customer: 'Museum' }).expect(200);
    expect(again.body).toMatchObject({ archivedAt: archived.body.archivedAt, customer: 'Museum' });
    expect(names(await manager.get('/api/projects'))).not.toContain('Old work');
    expect(names(await manager.get('/api/projects').query({ archived: 'true' }))).toEqual(['Old work']);
    await manager.patch(address).send({ archived: false }).expect(200);
    expect(names(await manager.get('/api/projects'))).toContain('Old work');
  });

  it('compare with a published limit set or one of their own', async () => {
    const other = await newProject(test.database);
    const userId = test.people.manager.id;
    const own = await newLimitSet(test.database, { projectId: test.project.id, userId });
    const foreign = await newLimitSet(test.database, { projectId: other.id, userId });
    const path = `/api/projects/${test.project.id}`;
    for (const id of ['iec61000-3-2.classA', null, own.id]) {
      const { body } = await manager.patch(path).send({ comparisonLimitSetId: id }).expect(200);
      expect(body.comparisonLimitSetId).toBe(id);
    }
    const upper = { comparisonLimitSetId: own.id.toUpperCase() };
    expect((await manager.patch(path).send(upper)).body.comparisonLimitSetId).toBe(own.id);
    for (const id of ['no-such-set', foreign.id]) {
      const change = { comparisonLimitSetId: id };
      const refused = await manager.patch(path).send(change).expect(422);
      expect(refused.body.errors[0].path).toBe('comparisonLimitSetId');
      await manager
        .post('/api/projects')
        .send({ name: 'New', ...change })
        .expect(422);
    }
  });

  it('keep what a change does not name', async () => {
    const { body } = await manager
      .post('/api/projects')
      .send({ name: 'Kept', description: 'As is' })
      .expect(201);
    const changed = await manager.patch(`/api/projects/${body.id}`).send({ customer: 'C' }).expect(200);
    expect(changed.body).toMatchObject({ name: 'Kept', description: 'As is', customer: 'C' });
    await manager.patch(`/api/projects/${body.id}`).send({}).expect(200);
  });
});

describe('members', () => {
  const address = () => `/api/projects/${test.project.id}/members`;

  it('are listed by name', async () => {
    const reply = await (await test.signIn('guest')).get(address()).expect(200);
    const members = memberPageSchema.parse(reply.body).items;
    expect(members.map((member) => member.name)).toEqual(['Analyst', 'Guest', 'Manager', 'Technician']);
  });

  it('are added by e-mail address, once', async () => {
    const person = await newPerson(test.database, { name: 'Zoe' });
    const input = { email: person.email.toUpperCase(), role: 'technician' };
    const added = await manager.post(address()).send(input).expect(201);
    expect(added.body).toMatchObject({ userId: person.id, role: 'technician' });
    const again = await manager.post(address()).send(input).expect(409);
    expect(again.body.code).toBe('already-member');
  });

  it('need an account first, and the answer says who makes one', async () => {
    const reply = await manager.post(address()).send({ email: 'no@example.com', role: 'guest' }).expect(422);
    expect(reply.body.errors).toEqual([
      { path: 'email', message: expect.stringMatching(/administrator/) as string },
    ]);
  });

  it('take a new role and leave', async () => {
    const person = await newPerson(test.database, { name: 'Yan' });
    await manager.post(address()).send({ email: person.email, role: 'guest' }).expect(201);
    const changed = await manager.patch(`${address()}/${person.id}`).send({ role: 'analyst' }).expect(200);
    expect(changed.body.role).toBe('analyst');
    await manager.delete(`${address()}/${person.id}`).expect(204);
    await manager.delete(`${address()}/${person.id}`).expect(404);
  });

  it('are named by an id, and a malformed one is said to be so', async () => {
    const path = `/api/projects/${test.project.id}/members/someone`;
    for (const request of [manager.patch(path).send({ role: 'guest' }), manager.delete(path)]) {
      const { body } = await request.expect(400);
      expect(body).toMatchObject({ code: 'invalid-request', errors: [{ path: 'userId' }] });
    }
  });

  it('keep one manager: the last can neither step down nor leave', async () => {
    const self = `${address()}/${test.people.manager.id}`;
    expect((await manager.patch(self).send({ role: 'guest' }).expect(409)).body.code).toBe('last-manager');
    expect((await manager.delete(self).expect(409)).body.code).toBe('last-manager');
    await manager.patch(`/api/projects/${test.project.id}`).send({}).expect(200);
  });

  it('keep one manager when two leave at the same moment', async () => {
    const other = await newPerson(test.database);
    const project = await newProject(test.database, {
      members: { [test.people.manager.id]: 'manager', [other.id]: 'manager' },
    });
    const leave = (id: string) => manager.delete(`/api/projects/${project.id}/members/${id}`);
    const replies = await Promise.all([leave(other.id), leave(test.people.manager.id)]);
    expect(replies.filter((reply) => reply.status === 204)).toHaveLength(1);
  });

  it('are looked after by an administrator too, who changes nothing else', async () => {
    const administrator = await test.signIn('administrator');
    const { id: userId } = accountSchema.parse(test.people.guest);
    await administrator.patch(`${address()}/${userId}`).send({ role: 'guest' }).expect(200);
    await administrator.patch(`/api/projects/${test.project.id}`).send({ name: 'Mine' }).expect(403);
  });
});
