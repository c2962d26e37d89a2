import { schema } from '@overtally/db';
import { eq } from 'drizzle-orm';
import { createHash } from 'node:crypto';
import supertest from 'supertest';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { startFakeSmtp, type FakeSmtp } from './support/fake-smtp.js';
import { newPerson, PASSWORD } from './support/factories.js';
import { mailsTo, mailTo, tokenIn } from './support/mails.js';
import { startTestApp, type TestApp } from './support/test-app.js';

const { mails, passwordResets, users } = schema;
const password = 'another long password';

let smtp: FakeSmtp;
let test: TestApp;
beforeAll(async () => {
  smtp = await startFakeSmtp();
  // Everybody asks from an address of their own, as behind a proxy, so that one test does not use up the next one's tries.
  test = await startTestApp({
    WORKER: 'embedded',
    SMTP_URL: `smtp://127.0.0.1:${smtp.port}`,
    TRUST_PROXY: 'loopback',
  });
});
afterAll(async () => {
  await test.close();
  await smtp.stop();
});

let lastAddress = 0;
const newAddress = () => `192.0.2.${++lastAddress}`;
const ask = (email: string, address = newAddress()) =>
  supertest(test.http).post('/api/auth/forgot-password').set('X-Forwarded-For', address).send({ email });
const reset = (token: string, chosen = password) =>
  supertest(test.http).post('/api/auth/reset-password').send({ token, password: chosen });
const signIn = (email: string, chosen: string) =>
  supertest(test.http).post('/api/auth/sign-in').send({ email, password: chosen });

/** The secret as the person reads it in the message that arrives next. */
async function askedToken(email: string): Promise<string> {
  const earlier = new Set((await mailsTo(test, email)).map(({ id }) => id));
  await ask(email).expect(202);
  const { id } = await mailTo(test, email, (mail) => !earlier.has(mail.id) && mail.status === 'sent');
  return tokenIn(smtp.received.find(({ parsed }) => parsed.messageId?.startsWith(`<${id}@`))!.parsed.text!);
}

describe('a forgotten password', () => {
  it('is set anew by the link, once; sessions, access keys and other links end, and the person is told', async () => {
    const person = await newPerson(test.database);
    const browser = supertest.agent(test.http);
    await browser.post('/api/auth/sign-in').send({ email: person.email, password: PASSWORD }).expect(200);
    const { secret } = (await browser.post('/api/auth/keys').send({ name: 'Script' }).expect(201)).body;
    const earlier = await askedToken(person.email);
    const token = await askedToken(person.email);
    expect(token).not.toBe(earlier);

    await reset(token).expect(204);
    await signIn(person.email, PASSWORD).expect(401);
    await signIn(person.email, password).expect(200);
    await browser.get('/api/auth/me').expect(401);
    await supertest(test.http).get('/api/auth/me').set('Authorization', `Bearer ${secret}`).expect(401);
    for (const dead of [token, earlier]) {
      expect((await reset(dead, 'yet another password').expect(410)).body.code).toBe('link-dead');
    }
    await mailTo(test, person.email, ({ kind, status }) => kind === 'password-changed' && status === 'sent');
  });

  it('answers the same for every address, and writes only to accounts that may sign in', async () => {
    const disabled = await newPerson(test.database);
    await test.database.update(users).set({ disabledAt: new Date() }).where(eq(users.id, disabled.id));
    const person = await newPerson(test.database);
    const replies = [];
    for (const email of [person.email, disabled.email, 'nobody@example.org']) replies.push(await ask(email));
    const seen = replies.map(({ status, body, headers }) => {
      const { date: _, 'x-request-id': __, ...rest } = headers as Record<string, string>;
      return { status, body, headers: rest };
    });
    expect(seen[0]).toMatchObject({ status: 202, body: { validForMinutes: 60 } });
    expect(seen[1]).toEqual(seen[0]);
    expect(seen[2]).toEqual(seen[0]);
    await mailTo(test, person.email);
    expect(await mailsTo(test, disabled.email)).toEqual([]);
    expect(await mailsTo(test, 'nobody@example.org')).toEqual([]);
  });

  it('is asked for five times an hour from one place, for accounts and others alike', async () => {
    const person = await newPerson(test.database);
    for (const email of [person.email, 'nobody-else@example.org']) {
      const address = newAddress();
      for (let i = 0; i < 5; i++) await ask(email, address).expect(202);
      const refused = await ask(email, address).expect(429);
      expect(Number(refused.headers['retry-after'])).toBeGreaterThan(0);
    }
  });

  it('is not set by a link that has expired after an hour', async () => {
    const person = await newPerson(test.database);
    const token = await askedToken(person.email);
    const [row] = await test.database
      .select()
      .from(passwordResets)
      .where(eq(passwordResets.userId, person.id));
    expect(row!.expiresAt.getTime() - row!.createdAt.getTime()).toBeCloseTo(3_600_000, -3);
    await test.database
      .update(passwordResets)
      .set({ expiresAt: new Date(Date.now() - 1) })
      .where(eq(passwordResets.userId, person.id));
    await reset(token).expect(410);
    await signIn(person.email, PASSWORD).expect(200);
  });

  it('leaves its secret nowhere in the database or, where mail goes out, in the mailbox', async () => {
    const person = await newPerson(test.database);
    const token = await askedToken(person.email);
    const [row] = await test.database
      .select()
      .from(passwordResets)
      .where(eq(passwordResets.userId, person.id));
    expect(row!.tokenSha256).toBe(createHash('sha256').update(token).digest('hex'));
    const messages = await test.database.select().from(mails).where(eq(mails.toAddress, person.email));
    expect(JSON.stringify([row, messages])).not.toContain(token);
    const administrator = await test.signIn('administrator');
    const shown = await administrator.get(`/api/mails/${messages[0]!.id}`).expect(200);
    expect(shown.body.link).toBeNull();
    expect(JSON.stringify(shown.body)).not.toContain(token);
  });
});
