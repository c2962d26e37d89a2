import {
  accessKeyPageSchema,
  createdAccessKeySchema,
  type AccessKey,
  type CreatedAccessKey,
} from '@overtally/contracts';
import { schema } from '@overtally/db';
import { eq } from 'drizzle-orm';
import { createHash } from 'node:crypto';
import supertest from 'supertest';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { newPerson, PASSWORD } from './support/factories.js';
import type { Role } from './support/people.js';
import { sessionCookie } from './support/sessions.js';
import { startTestApp, type TestApp } from './support/test-app.js';

const path = '/api/auth/keys';
const { accessKeys, users } = schema;

let test: TestApp;
beforeAll(async () => {
  test = await startTestApp();
});
afterAll(() => test.close());

async function newKey(role: Role, given: object = {}): Promise<CreatedAccessKey> {
  const person = await test.signIn(role);
  const reply = await person
    .post(path)
    .send({ name: 'Bench script', ...given })
    .expect(201);
  return createdAccessKeySchema.parse(reply.body);
}

/** A script that has the key and no cookie. */
const script = (secret: string) => supertest.agent(test.http).set('Authorization', `Bearer ${secret}`);

async function stored(id: string) {
  const [row] = await test.database.select().from(accessKeys).where(eq(accessKeys.id, id));
  return row;
}

async function listed(role: Role): Promise<AccessKey[]> {
  const reply = await (await test.signIn(role)).get(path).expect(200);
  return accessKeyPageSchema.parse(reply.body).items;
}

describe('a personal access key', () => {
  it('reads and writes as its owner', async () => {
    const { secret } = await newKey('manager');
    const { body: me } = await script(secret).get('/api/auth/me').expect(200);
    expect(me.id).toBe(test.people.manager.id);
    await script(secret).post('/api/projects').send({ name: 'From a script' }).expect(201);
    const { secret: guestSecret } = await newKey('guest');
    const project = `/api/projects/${test.project.id}`;
    await script(guestSecret).patch(project).send({ name: 'Mine' }).expect(403);
    const { secret: strangerSecret } = await newKey('stranger');
    await script(strangerSecret).get(project).expect(404);
  });

  it('carries 256 random bits, which are shown once and stored as a hash', async () => {
    const key = await newKey('technician', { name: ' Bench 2 ', expiresInDays: 30 });
    expect(key.secret).toMatch(/^ovt_[\w-]{43}$/);
    expect(key.secret.startsWith(key.prefix)).toBe(true);
    const { secret, ...shown } = key;
    expect(shown).toMatchObject({ name: 'Bench 2', prefix: expect.stringMatching(/^ovt_.{6}$/) });
    const days = (Date.parse(shown.expiresAt!) - Date.parse(shown.createdAt)) / 86_400_000;
    expect(days).toBeCloseTo(30, 3);
    expect(await listed('technician')).toEqual([shown]);
    const row = await stored(key.id);
    expect(row?.secretSha256).toBe(createHash('sha256').update(secret).digest('hex'));
    expect(JSON.stringify(row)).not.toContain(secret);
  });

  it('is listed to its owner alone, the newest first, page by page', async () => {
    const first = await newKey('analyst');
    const second = await newKey('analyst');
    expect((await listed('analyst')).map(({ id }) => id)).toEqual([second.id, first.id]);
    const analyst = await test.signIn('analyst');
    const { body } = await analyst.get(path).query({ limit: 1 }).expect(200);
    const next = await analyst.get(path).query({ limit: 1, cursor: body.nextCursor }).expect(200);
    expect(next.body).toMatchObject({ items: [{ id: first.id }], nextCursor: null });
  });

  it('is worth nothing once removed', async () => {
    const { id, secret } = await newKey('guest');
    await script(secret).get('/api/auth/me').expect(200);
    await (await test.signIn('guest')).delete(`${path}/${id}`).expect(204);
    const reply = await script(secret).get('/api/auth/me').expect(401);
    expect(reply.body.code).toBe('invalid-access-key');
    expect(reply.headers['www-authenticate']).toBe('Bearer error="invalid_token"');
  });

  it('of another person cannot be removed', async () => {
    const { id, secret } = await newKey('guest');
    for (const role of ['manager', 'administrator'] as const) {
      await (await test.signIn(role)).delete(`${path}/${id}`).expect(404);
    }
    await script(secret).get('/api/auth/me').expect(200);
  });

  it('ends on its day', async () => {
    const { id, secret } = await newKey('guest', { expiresInDays: 1 });
    await script(secret).get('/api/auth/me').expect(200);
    await test.database
      .update(accessKeys)
      .set({ expiresAt: new Date(Date.now() - 1000) })
      .where(eq(accessKeys.id, id));
    await script(secret).get('/api/auth/me').expect(401);
  });

  it('stays with a new password and is refused while its owner is disabled', async () => {
    const person = await newPerson(test.database);
    const agent = supertest.agent(test.http).set('Cookie', await sessionCookie(test.database, person.id));
    const { secret } = (await agent.post(path).send({ name: 'Nightly' }).expect(201)).body;
    await agent
      .post('/api/auth/change-password')
      .send({ currentPassword: PASSWORD, newPassword: 'another long password' })
      .expect(204);
    await script(secret).get('/api/auth/me').expect(200);
    const disable = (disabledAt: Date | null) =>
      test.database.update(users).set({ disabledAt }).where(eq(users.id, person.id));
    await disable(new Date());
    await script(secret).get('/api/auth/me').expect(401);
    await disable(null);
    await script(secret).get('/api/auth/me').expect(200);
  });

  it('tells to the minute when it was last used', async () => {
    const { id, secret } = await newKey('guest');
    expect((await stored(id))?.lastUsedAt).toBeNull();
    await script(secret).get('/api/auth/me').expect(200);
    const first = (await stored(id))?.lastUsedAt;
    expect(Date.now() - first!.getTime()).toBeLessThan(30_000);
    await script(secret).get('/api/auth/me').expect(200);
    expect((await stored(id))?.lastUsedAt).toEqual(first);
    const earlier = new Date(Date.now() - 61_000);
    await test.database.update(accessKeys).set({ lastUsedAt: earlier }).where(eq(accessKeys.id, id));
    await script(secret).get('/api/auth/me').expect(200);
    expect((await stored(id))!.lastUsedAt!.getTime()).toBeGreaterThan(earlier.getTime());
  });

  it('cannot make another key', async () => {
    const { secret } = await newKey('manager');
    const reply = await script(secret).post(path).send({ name: 'Child' }).expect(403);
    expect(reply.body.code).toBe('session-needed');
  });

  it.each(['', ' ', ' ovt_', ' nonsense', ` ovt_${'x'.repeat(43)}`])(
    'that nobody has is refused, beside a session too: Bearer%s',
    async (rest) => {
      const person = await test.signIn('guest');
      await person.get('/api/auth/me').set('Authorization', `Bearer${rest}`).expect(401);
    },
  );

  it('is asked for nothing where another scheme is used, as of a proxy with passwords of its own', async () => {
    const person = await test.signIn('guest');
    await person.get('/api/auth/me').set('Authorization', 'Basic Z3Vlc3Q6Z3Vlc3Q=').expect(200);
  });
});

/** Fetch Metadata (W3C): a browser marks what another site makes it send. */
describe('a request from another site', () => {
  const foreign = { 'Sec-Fetch-Site': 'cross-site', Origin: 'https://elsewhere.example' };

  it('passes by a key alone, and not with a session cookie beside it', async () => {
    const { secret } = await newKey('manager');
    const body = { name: 'From another page' };
    await script(secret).post('/api/projects').set(foreign).send(body).expect(201);
    const both = (await test.signIn('manager')).post('/api/projects').set(foreign);
    await both.set('Authorization', `Bearer ${secret}`).send(body).expect(403);
  });
});
