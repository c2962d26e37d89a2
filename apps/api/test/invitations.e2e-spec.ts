import type { Invitation } from '@overtally/contracts';
import { schema } from '@overtally/db';
import { eq } from 'drizzle-orm';
import { createHash } from 'node:crypto';
import supertest from 'supertest';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { newPerson, PASSWORD } from './support/factories.js';
import { mailTo, tokenIn } from './support/mails.js';
import { startTestApp, type TestApp } from './support/test-app.js';

const { invitations, mails } = schema;
const password = 'a new long password';

let test: TestApp;
beforeAll(async () => {
  test = await startTestApp({ WORKER: 'embedded' });
});
afterAll(() => test.close());

async function invite(email: string, role = 'analyst'): Promise<Invitation> {
  const manager = await test.signIn('manager');
  const path = `/api/projects/${test.project.id}/invitations`;
  return (await manager.post(path).send({ email, role }).expect(201)).body as Invitation;
}

/** The secret as the invited person reads it: from the whole message in the local mailbox. */
async function tokenOf(email: string): Promise<string> {
  const { id } = await mailTo(test, email);
  const administrator = await test.signIn('administrator');
  return tokenIn((await administrator.get(`/api/mails/${id}`).expect(200)).body.text as string);
}

const post = (path: string, body: object) => supertest(test.http).post(`/api/invitations/${path}`).send(body);

describe('an invitation', () => {
  it('makes the account of a newcomer and a member of it, once', async () => {
    await invite('New.Comer@example.org');
    const token = await tokenOf('new.comer@example.org');
    const offered = await post('look', { token }).expect(200);
    expect(offered.body).toMatchObject({
      projectName: 'Rectifier',
      role: 'analyst',
      email: 'new.comer@example.org',
      invitedBy: 'Manager',
      hasAccount: false,
    });
    const bare = await post('accept', { token }).expect(400);
    expect(bare.body.errors.map(({ path }: { path: string }) => path)).toEqual(['name', 'password']);

    const browser = supertest.agent(test.http);
    const accepted = await browser
      .post('/api/invitations/accept')
      .send({ token, name: 'Nell Comer', password })
      .expect(200);
    expect(accepted.body).toMatchObject({
      projectId: test.project.id,
      account: { email: 'new.comer@example.org', isAdministrator: false },
    });
    expect((await browser.get(`/api/projects/${test.project.id}`).expect(200)).body.role).toBe('analyst');
    await supertest(test.http)
      .post('/api/auth/sign-in')
      .send({ email: 'new.comer@example.org', password })
      .expect(200);

    expect((await post('accept', { token, name: 'Again', password }).expect(410)).body.code).toBe(
      'link-dead',
    );
    await post('look', { token }).expect(410);
  });

  it('asks who has an account to be signed in: the link alone opens no account', async () => {
    const person = await newPerson(test.database);
    await invite(person.email, 'technician');
    const token = await tokenOf(person.email);
    expect((await post('look', { token }).expect(200)).body.hasAccount).toBe(true);
    await post('accept', { token, name: 'Thief', password }).expect(409);
    const other = await test.signIn('stranger');
    await other.post('/api/invitations/accept').send({ token }).expect(409);

    const own = supertest.agent(test.http);
    await own.post('/api/auth/sign-in').send({ email: person.email, password: PASSWORD }).expect(200);
    await own.post('/api/invitations/accept').send({ token }).expect(200);
    expect((await own.get(`/api/projects/${test.project.id}`).expect(200)).body.role).toBe('technician');
  });

  it('is dead once taken back, replaced or expired', async () => {
    const revoked = await invite('revoked@example.org');
    const revokedToken = await tokenOf('revoked@example.org');
    const manager = await test.signIn('manager');
    await manager.delete(`/api/invitations/${revoked.id}`).expect(204);
    await post('accept', { token: revokedToken, name: 'R', password }).expect(410);

    const first = await invite('replaced@example.org');
    const firstToken = await tokenOf('replaced@example.org');
    await invite('replaced@example.org', 'guest');
    await post('look', { token: firstToken }).expect(410);
    const { body } = await manager.get(`/api/projects/${test.project.id}/invitations`).expect(200);
    const states = (body.items as Invitation[]).filter(({ email }) => email === 'replaced@example.org');
    expect(states.map(({ state, role }) => [state, role])).toEqual([
      ['open', 'guest'],
      ['revoked', 'analyst'],
    ]);
    expect(states[1]!.id).toBe(first.id);

    const expired = await invite('late@example.org');
    const days = (Date.parse(expired.expiresAt) - Date.parse(expired.createdAt)) / 86_400_000;
    expect(days).toBeCloseTo(14, 3);
    const lateToken = await tokenOf('late@example.org');
    await test.database
      .update(invitations)
      .set({ expiresAt: new Date(Date.now() - 1) })
      .where(eq(invitations.id, expired.id));
    await post('accept', { token: lateToken, name: 'L', password }).expect(410);
  });

  it('is accepted by one of two who try at the same time', async () => {
    await invite('race@example.org');
    const token = await tokenOf('race@example.org');
    const replies = await Promise.all(
      ['One', 'Two'].map((name) => post('accept', { token, name, password })),
    );
    expect(replies.map(({ status }) => status).sort()).not.toEqual([200, 200]);
    expect(replies.filter(({ status }) => status === 200)).toHaveLength(1);
  });

  it('goes to nobody who is a member', async () => {
    const manager = await test.signIn('manager');
    const path = `/api/projects/${test.project.id}/invitations`;
    const reply = await manager.post(path).send({ email: 'GUEST@example.com', role: 'analyst' }).expect(409);
    expect(reply.body.code).toBe('already-member');
  });

  it('leaves its secret nowhere in the database: 256 bits, kept as SHA-256 alone', async () => {
    const { id } = await invite('secret@example.org');
    const token = await tokenOf('secret@example.org');
    expect(Buffer.from(token, 'base64url')).toHaveLength(32);
    const rows = await test.database.select().from(invitations).where(eq(invitations.id, id));
    const messages = await test.database.select().from(mails).where(eq(mails.invitationId, id));
    expect(rows[0]?.tokenSha256).toBe(createHash('sha256').update(token).digest('hex'));
    expect(JSON.stringify([rows, messages])).not.toContain(token);
  });

  it.each(['', 'no token', 'x'.repeat(201), 'unknown'])('says nothing to the secret "%s"', async (token) => {
    const { status } = await post('look', { token });
    expect([400, 410]).toContain(status);
  });
});
