import { schema } from '@overtally/db';
import argon2 from 'argon2';
import { eq } from 'drizzle-orm';
import supertest from 'supertest';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { newPerson, PASSWORD } from './support/factories.js';
import { startTestApp, type TestApp } from './support/test-app.js';

let test: TestApp;
beforeAll(async () => {
  test = await startTestApp();
});
afterAll(() => test.close());

const signInAs = (email: string, password = PASSWORD) =>
  supertest(test.http).post('/api/auth/sign-in').send({ email, password });

describe('signing in', () => {
  it('answers with the account and nothing more, whatever the case of the e-mail address', async () => {
    const reply = await signInAs('Analyst@Example.COM').expect(200);
    const { id, email, name } = test.people.analyst;
    expect(reply.body).toEqual({ id, email, name, isAdministrator: false, worksInLaboratory: true });
  });

  it('keeps a person signed in until they sign out', async () => {
    const agent = supertest.agent(test.http);
    await agent
      .post('/api/auth/sign-in')
      .send({ email: 'guest@example.com', password: PASSWORD })
      .expect(200);
    expect((await agent.get('/api/auth/me').expect(200)).body.email).toBe('guest@example.com');
    await agent.post('/api/auth/sign-out').expect(204);
    await agent.get('/api/auth/me').expect(401);
  });

  it('says the same of a wrong password, an unknown address and a disabled account', async () => {
    const disabled = await newPerson(test.database);
    await test.database
      .update(schema.users)
      .set({ disabledAt: new Date() })
      .where(eq(schema.users.id, disabled.id));
    const replies = await Promise.all([
      signInAs('guest@example.com', 'not the password'),
      signInAs('nobody@example.com'),
      signInAs(disabled.email),
    ]);
    for (const reply of replies) {
      expect(reply.status).toBe(401);
      expect(reply.type).toBe('application/problem+json');
      expect(reply.body).toMatchObject({ code: 'wrong-credentials', detail: 'E-mail or password is wrong' });
    }
  });

  it('names each field that is missing or malformed', async () => {
    const reply = await supertest(test.http).post('/api/auth/sign-in').send({ email: 'guest' }).expect(400);
    expect(reply.body).toMatchObject({
      errors: [{ path: 'email' }, { path: 'password', message: 'This is missing' }],
    });
  });
});

describe('one’s own account', () => {
  it('takes a new name', async () => {
    const agent = await test.signIn('technician');
    await agent.patch('/api/auth/me').send({ name: ' Tess Bench ' }).expect(200);
    expect((await agent.get('/api/auth/me')).body.name).toBe('Tess Bench');
  });

  it('takes a new password, which then signs in, and the old one no more', async () => {
    const person = await newPerson(test.database);
    const agent = supertest.agent(test.http);
    await agent.post('/api/auth/sign-in').send({ email: person.email, password: PASSWORD }).expect(200);
    const newPassword = 'another long password';
    await agent
      .post('/api/auth/change-password')
      .send({ currentPassword: PASSWORD, newPassword })
      .expect(204);
    await agent.get('/api/auth/me').expect(200);
    await signInAs(person.email).expect(401);
    await signInAs(person.email, newPassword).expect(200);
  });

  it('renews a stored hash that was made with other parameters', async () => {
    const passwordHash = await argon2.hash(PASSWORD, { memoryCost: 1024, timeCost: 2, parallelism: 1 });
    const { id, email } = await newPerson(test.database);
    const stored = () => test.database.select().from(schema.users).where(eq(schema.users.id, id));
    await test.database.update(schema.users).set({ passwordHash }).where(eq(schema.users.id, id));
    await signInAs(email).expect(200);
    expect((await stored())[0]?.passwordHash).not.toBe(passwordHash);
    await signInAs(email).expect(200);
  });

  it('does not take a new password without the current one', async () => {
    const agent = await test.signIn('analyst');
    const reply = await agent
      .post('/api/auth/change-password')
      .send({ currentPassword: 'not the password', newPassword: 'another long password' })
      .expect(422);
    expect(reply.body.errors[0].path).toBe('currentPassword');
    await signInAs('analyst@example.com').expect(200);
  });

  // OWASP Password Storage Cheat Sheet, Argon2id: at least 19 MiB, 2 iterations, 1 lane.
  it('stores passwords as Argon2id, at least as costly as OWASP recommends', async () => {
    const agent = await test.signIn('administrator');
    const email = 'hashed@example.com';
    await agent.post('/api/users').send({ email, name: 'H', password: PASSWORD }).expect(201);
    const [row] = await test.database.select().from(schema.users).where(eq(schema.users.email, email));
    expect(row?.passwordHash).toMatch(/^\$argon2id\$v=19\$m=19456,t=2,p=1\$/);
  });
});
