import type { Recording } from '@overtally/contracts';
import { schema } from '@overtally/db';
import { createHash, randomBytes, randomUUID } from 'node:crypto';
import { readdir, utimes, writeFile } from 'node:fs/promises';
import type { AddressInfo } from 'node:net';
import { join } from 'node:path';
import supertest from 'supertest';
import type TestAgent from 'supertest/lib/agent.js';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { AppConfig } from '../dist/config/app-config.js';
import { uploadExpiryMs, UploadSpool } from '../dist/recordings/uploading/upload-spool.js';
import { newProject } from './support/factories.js';
import type { Role } from './support/people.js';
import { upload } from './support/recordings.js';
import { sessionCookie } from './support/sessions.js';
import { stores, type Store } from './support/stores.js';
import { startTestApp, type TestApp } from './support/test-app.js';
import { sendByTus } from './support/tus.js';

const MiB = 2 ** 20;
const sha256 = (bytes: Buffer) => createHash('sha256').update(bytes).digest('hex');
const version = { 'Tus-Resumable': '1.0.0' };

describe.each(stores)('uploads that go on where they stopped, on %s', (kind, start) => {
  let store: Store;
  let test: TestApp;
  let technician: TestAgent;
  let cookie: string;
  let endpoint: string;

  beforeAll(async () => {
    store = await start();
    test = await startTestApp({ ...store.environment, MAX_UPLOAD_MB: '64', PROJECT_QUOTA_MB: '96' });
    technician = await test.signIn('technician');
    cookie = await cookieOf('technician');
    const { port } = test.http.address() as AddressInfo;
    endpoint = `http://127.0.0.1:${port}/api/projects/${test.project.id}/uploads`;
  });
  afterAll(async () => {
    await test.close();
    await store.stop();
  });

  const cookieOf = (role: Role) => sessionCookie(test.database, test.people[role].id);
  const pathOf = (address: string) => new URL(address).pathname;
  const spooled = async () => (await readdir(test.app.get(AppConfig).spoolFolder)).sort();
  const send = (bytes: Buffer, more: Partial<Parameters<typeof sendByTus>[1]> = {}) =>
    sendByTus(bytes, { endpoint, cookie, fileName: 'capture.csv', ...more });
  const finish = (address: string, body = {}) => technician.post(`${pathOf(address)}/recordings`).send(body);

  /** A project of the technician with nothing in it, and where its uploads go. */
  async function emptyProject() {
    const { id } = await newProject(test.database, {
      members: { [test.people.technician.id]: 'technician' },
    });
    return { id, path: `/api/projects/${id}/uploads` };
  }

  it('begin, break off, go on and become a recording with the same bytes', { timeout: 60_000 }, async () => {
    const bytes = randomBytes(24 * MiB);
    const address = await send(bytes, { cutAtBytes: 6 * MiB });
    const { headers } = await technician.head(pathOf(address)).set(version).expect(200);
    const arrived = Number(headers['upload-offset']);
    expect(arrived).toBeGreaterThan(0);
    expect(arrived).toBeLessThan(bytes.length);
    expect(headers).not.toHaveProperty('access-control-allow-origin');
    const [listed] = (await technician.get(pathOf(endpoint)).expect(200)).body.items;
    expect(listed).toMatchObject({
      fileName: 'capture.csv',
      sizeBytes: bytes.length,
      receivedBytes: arrived,
    });
    expect(Date.parse(listed.expiresAt) - Date.parse(listed.createdAt)).toBe(uploadExpiryMs);

    const early = await finish(address).expect(409);
    expect(early.body).toMatchObject({ code: 'upload-incomplete' });
    expect(early.body.detail).toContain(`${arrived} of ${bytes.length} bytes`);

    expect(await send(bytes, { uploadUrl: address })).toBe(address);
    const body = { sha256: sha256(bytes), remark: 'cut once', import: { sampleRateHz: 1000 } };
    const outcome = (await finish(address, body).expect(202)).body;
    expect(outcome).toMatchObject({ leftOut: [] });
    const [recording] = outcome.items as Recording[];
    expect(recording).toMatchObject({
      name: 'capture',
      remark: 'cut once',
      import: { sampleRateHz: 1000 },
      file: { name: 'capture.csv', size: bytes.length, sha256: sha256(bytes) },
    });
    const source = await technician.get(`/api/recordings/${recording!.id}/source`).buffer(true).expect(200);
    expect(sha256(source.body)).toBe(sha256(bytes));
    expect((await technician.get(pathOf(endpoint)).expect(200)).body.items).toEqual([]);
    // What it became is told for a while; the bytes are in storage alone.
    expect(await spooled()).toEqual([`${pathOf(address).split('/').at(-1)}.json`]);
    await technician.head(pathOf(address)).set(version).expect(410);
  });

  it('become the same recording however often and at how many places they are finished', async () => {
    const address = await send(randomBytes(2 * MiB));
    const replies = await Promise.all([1, 2, 3, 4].map(() => finish(address).expect(202)));
    const again = await finish(address).expect(202);
    const ids = [...replies, again].map(({ body }) => body.items.map(({ id }: Recording) => id));
    expect(new Set(ids.map(String)).size).toBe(1);
    expect(ids[0]).toHaveLength(1);
    await technician.delete(`/api/recordings/${ids[0]![0]}`).expect(204);
    expect((await finish(address).expect(202)).body).toEqual({ items: [], leftOut: [] });
  });

  it('are made good when the server ended after it stored the bytes, before the recording was there', async () => {
    const bytes = randomBytes(MiB);
    const address = await send(bytes);
    await test.database.execute('alter table recordings add constraint refuse_all check (false) not valid');
    await finish(address).expect(500);
    await test.database.execute('alter table recordings drop constraint refuse_all');
    // The bytes have left the spool.
    expect(await spooled()).not.toContain(pathOf(address).split('/').at(-1));
    const { body } = await finish(address).expect(202);
    expect(body.items[0].file).toMatchObject({ sha256: sha256(bytes), size: bytes.length });
    const source = await technician
      .get(`/api/recordings/${body.items[0].id}/source`)
      .buffer(true)
      .expect(200);
    expect(sha256(source.body)).toBe(sha256(bytes));
  });

  it('are dropped with both checksums named when the bytes have changed', async () => {
    const bytes = randomBytes(1000);
    const address = await send(bytes);
    const wanted = sha256(Buffer.from('other'));
    const { body } = await finish(address, { sha256: wanted }).expect(422);
    expect(body).toMatchObject({ code: 'checksum-mismatch' });
    expect(body.detail).toContain(sha256(bytes));
    expect(body.detail).toContain(wanted);
    await finish(address).expect(404);
  });

  it('belong to who began them', async () => {
    const address = await send(randomBytes(1000));
    const other = await newProject(test.database, {
      members: { [test.people.technician.id]: 'technician', [test.people.analyst.id]: 'analyst' },
    });
    const analyst = await test.signIn('analyst');
    const elsewhere = pathOf(address).replace(test.project.id, other.id);
    for (const [agent, path] of [
      [analyst, pathOf(address)],
      [technician, elsewhere],
    ] as const) {
      await agent.head(path).set(version).expect(404);
      await agent.delete(path).set(version).expect(404);
      const patch = { ...version, 'Upload-Offset': '0', 'Content-Type': 'application/offset+octet-stream' };
      await agent.patch(path).set(patch).send(Buffer.from('x')).expect(404);
      await agent.post(`${path}/recordings`).send({}).expect(404);
      const list = await agent.get(path.replace(/\/[^/]+$/, '')).expect(200);
      expect(list.body.items).toEqual([]);
    }
    const guest = await test.signIn('guest');
    await guest.head(pathOf(address)).set(version).expect(403);
    await guest
      .post(pathOf(endpoint))
      .set({ ...version, 'Upload-Length': '1' })
      .expect(403);
    await supertest(test.http).head(pathOf(address)).set(version).expect(401);
    await technician.delete(pathOf(address)).set(version).expect(204);
    await technician.head(pathOf(address)).set(version).expect(404);
  });

  it('take nothing a client says of paths, owners and projects', async () => {
    const metadata = { filename: '../../etc/passwd', userId: randomUUID(), projectId: randomUUID() };
    const address = await send(Buffer.from('t,u\n0,1\n'), { metadata });
    const { body } = await finish(address).expect(202);
    expect(body.items[0]).toMatchObject({ name: 'passwd', file: { name: 'passwd' } });
    await technician
      .head(`${pathOf(endpoint)}/%00`)
      .set(version)
      .expect(400);
    for (const id of ['..%2F..%2Fetc%2Fpasswd', 'x'.repeat(300), randomUUID()]) {
      await technician
        .head(`${pathOf(endpoint)}/${id}`)
        .set(version)
        .expect(404);
      await technician
        .post(`${pathOf(endpoint)}/${id}/recordings`)
        .send({})
        .expect(404);
    }
  });

  it('tell where they are relative to the address asked, and what the protocol is', async () => {
    const begun = await technician
      .post(pathOf(endpoint))
      .set({ ...version, 'Upload-Length': '5' })
      .expect(201);
    // RFC 3986, 5.2.2: merged with the path of the request, under whatever prefix a proxy gave it.
    const seen = new URL(begun.headers.location!, 'https://lab.example/bench/api/projects/1/uploads')
      .pathname;
    expect(seen).toMatch(/^\/bench\/api\/projects\/1\/uploads\/[0-9a-f-]{36}$/);
    const { headers } = await technician.options(pathOf(endpoint)).expect(204);
    expect(headers).toMatchObject({
      'tus-version': '1.0.0',
      'tus-extension': 'creation,creation-with-upload,termination,expiration',
      'tus-max-size': String(64 * MiB),
    });
    const without = await technician.post(pathOf(endpoint)).set('Upload-Length', '5').expect(412);
    expect(without.headers['content-type']).toMatch('application/problem+json');
    await technician
      .post(pathOf(endpoint))
      .set({ ...version, 'Upload-Defer-Length': '1' })
      .expect(501);
  });

  it('pass with the media type of the protocol where it belongs, and nowhere else', async () => {
    const type = { 'Content-Type': 'application/offset+octet-stream' };
    await technician.post(`/api/projects`).set(type).send(Buffer.from('{}')).expect(415);
    await technician
      .post(`${pathOf(endpoint)}/${randomUUID()}/recordings`)
      .set(type)
      .send(Buffer.from('{}'))
      .expect(415);
    const path = `${pathOf(endpoint)}/${randomUUID()}`;
    const foreign = {
      ...version,
      ...type,
      'Upload-Offset': '0',
      Origin: 'https://evil.example',
      'Sec-Fetch-Site': 'cross-site',
    };
    await technician.patch(path).set(foreign).send(Buffer.from('x')).expect(403);
  });

  it('are held to the limit of a file and the quota of a project, with the figures', async () => {
    const { id, path } = await emptyProject();
    const limits = () => technician.get(`/api/projects/${id}/upload-limits`).expect(200);
    expect((await limits()).body).toEqual({ maxFileBytes: 64 * MiB, quotaBytes: 96 * MiB, usedBytes: 0 });
    const begin = (bytes: number) =>
      technician.post(path).set({ ...version, 'Upload-Length': String(bytes) });
    const large = await begin(64 * MiB + 1).expect(413);
    expect(large.body).toMatchObject({ code: 'file-too-large' });
    expect(large.body.detail).toContain(`${64 * MiB} bytes`);
    expect(large.body.detail).toContain(`${64 * MiB + 1} bytes`);

    const bytes = randomBytes(8 * MiB);
    const { port } = test.http.address() as AddressInfo;
    const own = { endpoint: `http://127.0.0.1:${port}${path}` };
    const first = await send(bytes, own);
    // Begun while there was room for both.
    const second = await send(randomBytes(MiB), own);
    await finish(first).expect(202);
    // The same bytes once more are kept once.
    await upload(technician, id, bytes, 'again.csv');
    expect((await limits()).body.usedBytes).toBe(8 * MiB);
    await test.database.insert(schema.recordings).values({
      projectId: id,
      number: 100,
      name: 'large',
      fileName: 'large.wav',
      fileSize: 87.5 * MiB,
      fileSha256: '0'.repeat(64),
      sourceKey: `projects/${id}/sources/${'0'.repeat(64)}`,
      uploadedById: test.people.technician.id,
    });
    for (const refused of [
      await begin(MiB).expect(413),
      await finish(second).expect(413),
      await technician
        .post(`/api/projects/${id}/recordings`)
        .attach('file', randomBytes(MiB), 'a.csv')
        .expect(413),
      await technician
        .post(`/api/projects/${id}/archives`)
        .attach('file', randomBytes(MiB), 'a.zip')
        .expect(413),
    ]) {
      expect(refused.body).toMatchObject({ code: 'quota-exceeded' });
      for (const figure of [95.5 * MiB, 96 * MiB]) expect(refused.body.detail).toContain(`${figure} bytes`);
    }
    await begin(MiB / 2).expect(201);
    // Nothing of what was refused is kept, and an upload that finds room later is still there.
    await test.database.execute(`delete from recordings where number = 100 and project_id = '${id}'`);
    await finish(second).expect(202);
    expect((await limits()).body.usedBytes).toBe(9 * MiB);
  });

  it('are refused with the figures where the disk has no room', async () => {
    const spool = test.app.get(UploadSpool, { strict: false });
    const { freeBytes } = spool;
    spool.freeBytes = () => Promise.resolve(520 * MiB);
    const begin = (bytes: number) =>
      technician.post(pathOf(endpoint)).set({ ...version, 'Upload-Length': String(bytes) });
    try {
      await begin(5 * MiB).expect(201);
      // 520 MiB free, 512 in reserve, 5 promised: 3 are left.
      const { body } = await begin(4 * MiB).expect(507);
      expect(body).toMatchObject({ code: 'no-room' });
      for (const figure of ['520 MiB are free', '512 MiB are kept', '4 MiB'])
        expect(body.detail).toContain(figure);
    } finally {
      spool.freeBytes = freeBytes;
    }
  });

  it.runIf(kind === 'disk')('expire, and what belongs to none is cleared', async () => {
    const spool = test.app.get(UploadSpool, { strict: false });
    const address = await send(randomBytes(100));
    const folder = test.app.get(AppConfig).spoolFolder;
    expect(await spool.sweep(Date.now() + uploadExpiryMs - 60_000)).toBe(0);
    await technician.head(pathOf(address)).set(version).expect(200);
    const stray = join(folder, spool.strayName());
    await writeFile(stray, 'left by a process that ended');
    const twoDaysAgo = Date.now() / 1000 - 2 * 24 * 3600;
    await utimes(stray, twoDaysAgo, twoDaysAgo);
    expect(await spool.sweep()).toBe(1);
    await technician.head(pathOf(address)).set(version).expect(200);
    await spool.sweep(Date.now() + uploadExpiryMs + 60_000);
    expect(await spooled()).toEqual([]);
    await technician.head(pathOf(address)).set(version).expect(404);
  });
});
