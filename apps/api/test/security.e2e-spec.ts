import { schema } from '@overtally/db';
import { sql } from 'drizzle-orm';
import supertest from 'supertest';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { newPerson, PASSWORD } from './support/factories.js';
import { startTestApp, type TestApp } from './support/test-app.js';

let test: TestApp;
beforeAll(async () => {
  test = await startTestApp({ PUBLIC_URL: 'https://lab.example' });
});
afterAll(() => test.close());

/** A browser behind the TLS proxy of the installation; `cookie` is what it has been given. */
const overTls = (cookie = '') =>
  supertest.agent(test.http).set({ 'X-Forwarded-Proto': 'https', Cookie: cookie });
const setCookieOf = (reply: supertest.Response) => (reply.get('Set-Cookie') ?? [])[0] ?? '';
const cookieOf = (reply: supertest.Response) => setCookieOf(reply).split(';')[0] ?? '';
const signIn = (email: string, password = PASSWORD, agent = overTls()) =>
  agent.post('/api/auth/sign-in').send({ email, password });
const cookieFor = async (email: string) => cookieOf(await signIn(email).expect(200));

describe('replies', () => {
  it('carry a content security policy that runs no script but our own', async () => {
    const { headers } = await supertest(test.http).get('/api/health').expect(200);
    const policy = headers['content-security-policy'] ?? '';
    expect(policy.split(';')).toEqual(
      expect.arrayContaining(["script-src 'self'", "object-src 'none'", "frame-ancestors 'self'"]),
    );
    expect(policy).not.toMatch(/unsafe-eval|script-src[^;]*unsafe-inline/);
    expect(headers).toMatchObject({ 'x-content-type-options': 'nosniff', 'x-frame-options': 'SAMEORIGIN' });
    expect(headers['strict-transport-security']).toMatch(/max-age=\d{8}/);
    expect(headers).not.toHaveProperty('x-powered-by');
  });

  it('carry the request id that a problem repeats', async () => {
    const reply = await supertest(test.http).get('/api/auth/me').expect(401);
    expect(reply.body.instance).toBe(reply.headers['x-request-id']);
  });

  it('tell nothing of what went wrong inside', async () => {
    await test.database.execute(sql`alter table users rename to users_away`);
    try {
      const reply = await signIn('guest@example.com').expect(500);
      expect(reply.type).toBe('application/problem+json');
      expect(JSON.stringify(reply.body)).not.toMatch(/users|relation|select/i);
    } finally {
      await test.database.execute(sql`alter table users_away rename to users`);
    }
  });
});

describe('the session cookie', () => {
  it('is HttpOnly, SameSite=Lax and, over TLS, Secure', async () => {
    const cookie = setCookieOf(await signIn('guest@example.com').expect(200));
    expect(cookie).toMatch(/^overtally_session=.+; Path=\/;.*HttpOnly; Secure; SameSite=Lax$/);
  });

  it('lasts 14 days from the latest request', async () => {
    const cookie = await cookieFor('guest@example.com');
    const reply = await overTls(cookie).get('/api/auth/me').expect(200);
    const expires = /Expires=([^;]+)/.exec(setCookieOf(reply))?.[1];
    const days = (new Date(expires ?? '').getTime() - Date.now()) / 86_400_000;
    expect(days).toBeCloseTo(14, 2);
  });

  it('is not handed to who is not signed in', async () => {
    expect(setCookieOf(await overTls().get('/api/health'))).toBe('');
  });

  it('changes at sign-in, and the one known before is worth nothing', async () => {
    const before = await cookieFor('guest@example.com');
    const after = cookieOf(await signIn('manager@example.com', PASSWORD, overTls(before)).expect(200));
    expect(after).not.toBe(before);
    await overTls(before).get('/api/auth/me').expect(401);
    await overTls(after).get('/api/auth/me').expect(200);
  });

  it('is not taken when its signature is not ours', async () => {
    const cookie = await cookieFor('guest@example.com');
    await overTls(cookie.replace(/\.[^.]+$/, '.forged'))
      .get('/api/auth/me')
      .expect(401);
  });
});

describe('sessions end', () => {
  it('everywhere when the person changes the password, who goes on under a new id', async () => {
    const { email } = await newPerson(test.database);
    const [here, elsewhere] = [await cookieFor(email), await cookieFor(email)];
    const change = { currentPassword: PASSWORD, newPassword: 'a new and long one' };
    const reply = await overTls(here).post('/api/auth/change-password').send(change).expect(204);
    await overTls(cookieOf(reply)).get('/api/auth/me').expect(200);
    await overTls(here).get('/api/auth/me').expect(401);
    await overTls(elsewhere).get('/api/auth/me').expect(401);
  });

  it.each([{ disabled: true }, { password: 'set by the administrator' }])(
    'when an administrator sends %j',
    async (change) => {
      const { id, email } = await newPerson(test.database);
      const cookie = await cookieFor(email);
      await overTls(cookie).get('/api/auth/me').expect(200);
      await (await test.signIn('administrator')).patch(`/api/users/${id}`).send(change).expect(200);
      await overTls(cookie).get('/api/auth/me').expect(401);
    },
  );

  it('at once for a disabled person, even while a session is still stored', async () => {
    const { id, email } = await newPerson(test.database);
    const cookie = await cookieFor(email);
    await test.database
      .update(schema.users)
      .set({ disabledAt: new Date() })
      .where(sql`id = ${id}`);
    await overTls(cookie).get('/api/auth/me').expect(401);
  });
});

describe('requests from other sites', () => {
  const change = async (headers: Record<string, string>) =>
    (await test.signIn('guest')).patch('/api/auth/me').set(headers).send({ name: 'Guest' });

  it.each([
    ['cross-site fetch', { 'Sec-Fetch-Site': 'cross-site', Origin: 'https://evil.example' }],
    ['same-site fetch', { 'Sec-Fetch-Site': 'same-site', Origin: 'https://other.lab.example' }],
    ['foreign origin without fetch metadata', { Origin: 'https://evil.example' }],
    ['opaque origin', { Origin: 'null' }],
  ])('are refused: %s', async (_, headers) => {
    expect((await change(headers)).status).toBe(403);
  });

  it.each([
    ['the application itself', { 'Sec-Fetch-Site': 'same-origin', Origin: 'https://lab.example' }],
    ['its public address without fetch metadata', { Origin: 'https://lab.example' }],
    ['a script', {}],
  ])('pass from %s', async (_, headers: Record<string, string>) => {
    expect((await change(headers)).status).toBe(200);
  });

  it('cannot send a form: bodies that are not JSON are refused', async () => {
    for (const type of ['text/plain', 'application/x-www-form-urlencoded']) {
      const reply = await overTls()
        .post('/api/auth/sign-in')
        .set('Content-Type', type)
        .send('{"email":"guest@example.com","password":"x"}');
      expect(reply.status).toBe(415);
    }
  });
});

describe('guessing passwords', () => {
  const from = (address: string) => overTls().set('X-Forwarded-For', address);
  const guess = (email: string, address: string) => signIn(email, 'a wrong guess', from(address));

  it('is stopped after ten failures for the account and address, not for others', async () => {
    const { email } = await newPerson(test.database);
    for (let attempt = 0; attempt < 10; attempt += 1) await guess(email, '203.0.113.1').expect(401);
    const refused = await signIn(email, PASSWORD, from('203.0.113.1')).expect(429);
    expect(refused.type).toBe('application/problem+json');
    expect(Number(refused.headers['retry-after'])).toBeGreaterThan(0);
    expect(Number(refused.headers['retry-after'])).toBeLessThanOrEqual(900);
    await signIn(email, PASSWORD, from('203.0.113.2')).expect(200);
    await signIn('guest@example.com', PASSWORD, from('203.0.113.1')).expect(200);
  });

  it('is not helped by a forged chain of addresses from the own network', async () => {
    const { email } = await newPerson(test.database);
    const forged = (attempt: number) => `203.0.113.${100 + attempt}, 192.168.1.5`;
    for (let attempt = 0; attempt < 10; attempt += 1) await guess(email, forged(attempt)).expect(401);
    await guess(email, forged(10)).expect(429);
  });

  it('counts failures alone: a success clears them', async () => {
    const { email } = await newPerson(test.database);
    for (let round = 0; round < 2; round += 1) {
      for (let attempt = 0; attempt < 9; attempt += 1) await guess(email, '203.0.113.3').expect(401);
      await signIn(email, PASSWORD, from('203.0.113.3')).expect(200);
    }
  });

  it('does not get further with many guesses at once', async () => {
    const { email } = await newPerson(test.database);
    const replies = await Promise.all(Array.from({ length: 14 }, () => guess(email, '203.0.113.4')));
    expect(replies.filter((reply) => reply.status === 401)).toHaveLength(10);
    expect(replies.filter((reply) => reply.status === 429)).toHaveLength(4);
  });
});
