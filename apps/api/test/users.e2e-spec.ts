import { userPageSchema } from '@overtally/contracts';
import supertest from 'supertest';
import type TestAgent from 'supertest/lib/agent.js';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { newPerson, PASSWORD } from './support/factories.js';
import { startTestApp, type TestApp } from './support/test-app.js';

let test: TestApp;
let administrator: TestAgent;
beforeAll(async () => {
  test = await startTestApp({ ADMIN_EMAIL: 'First@example.com', ADMIN_PASSWORD: 'first of the house' });
  administrator = await test.signIn('administrator');
});
afterAll(() => test.close());

const people = (reply: { body: unknown }) => userPageSchema.parse(reply.body).items;
const emails = (reply: { body: unknown }) => people(reply).map((user) => user.email);

describe('people', () => {
  it('begin with the administrator named in the environment', async () => {
    const agent = supertest.agent(test.http);
    const reply = await agent
      .post('/api/auth/sign-in')
      .send({ email: 'first@example.com', password: 'first of the house' })
      .expect(200);
    expect(reply.body.isAdministrator).toBe(true);
    await administrator.patch(`/api/users/${reply.body.id}`).send({ isAdministrator: false }).expect(200);
  });

  it('are made by an administrator and can sign in at once', async () => {
    const person = { email: 'New.Person@example.com', name: 'New Person', password: PASSWORD };
    const made = await administrator.post('/api/users').send(person).expect(201);
    expect(made.body).toMatchObject({
      email: 'new.person@example.com',
      isAdministrator: false,
      disabledAt: null,
    });
    expect(made.body).not.toHaveProperty('passwordHash');
    await supertest(test.http)
      .post('/api/auth/sign-in')
      .send({ email: person.email, password: PASSWORD })
      .expect(200);
  });

  it('have one account for an e-mail address', async () => {
    const again = { email: 'GUEST@example.com', name: 'Guest again', password: PASSWORD };
    const reply = await administrator.post('/api/users').send(again).expect(409);
    expect(reply.body).toMatchObject({ code: 'email-taken', errors: [{ path: 'email' }] });
  });

  it('need a password of at least 12 characters', async () => {
    const reply = await administrator
      .post('/api/users')
      .send({ email: 'short@example.com', name: 'S', password: 'elevenchars' })
      .expect(400);
    expect(reply.body.errors).toEqual([{ path: 'password', message: 'Use at least 12 characters' }]);
  });

  it('are listed page by page without gap or repeat, and found by part of a name', async () => {
    for (const name of ['Ann_Lee', 'AnnXLee', 'Berta']) await newPerson(test.database, { name });
    const seen: string[] = [];
    let cursor: string | null = '';
    while (cursor !== null) {
      const page = await administrator.get('/api/users').query({ limit: 3, ...(cursor && { cursor }) });
      expect(page.status).toBe(200);
      seen.push(...emails(page));
      cursor = userPageSchema.parse(page.body).nextCursor;
    }
    const all = await administrator.get('/api/users').query({ limit: 200 });
    expect(seen).toEqual(emails(all));
    expect(new Set(seen).size).toBe(seen.length);

    const found = await administrator.get('/api/users').query({ q: 'ann_' });
    expect(people(found).map((user) => user.name)).toEqual(['Ann_Lee']);
  });

  it('refuse a cursor of something else', async () => {
    const reply = await administrator.get('/api/users').query({ cursor: 'nonsense' }).expect(400);
    expect(reply.body.errors[0].path).toBe('cursor');
  });

  it('can be disabled and enabled again', async () => {
    const { id, email } = await newPerson(test.database);
    const disabled = await administrator.patch(`/api/users/${id}`).send({ disabled: true }).expect(200);
    expect(disabled.body.disabledAt).not.toBeNull();
    const credentials = { email, password: PASSWORD };
    await supertest(test.http).post('/api/auth/sign-in').send(credentials).expect(401);
    await administrator.patch(`/api/users/${id}`).send({ disabled: false }).expect(200);
    await supertest(test.http).post('/api/auth/sign-in').send(credentials).expect(200);
  });

  it.each([{ disabled: true }, { isAdministrator: false }])(
    'keep one administrator in office: %j is refused for the last one',
    async (change) => {
      const { id } = test.people.administrator;
      const reply = await administrator.patch(`/api/users/${id}`).send(change).expect(409);
      expect(reply.body.code).toBe('last-administrator');
      await administrator.get('/api/users').expect(200);
    },
  );

  it('answer 404 for a person who does not exist', async () => {
    const nobody = '00000000-0000-4000-8000-000000000000';
    await administrator.patch(`/api/users/${nobody}`).send({ name: 'N' }).expect(404);
  });
});
