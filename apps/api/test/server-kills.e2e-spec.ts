import type { ChildProcess } from 'node:child_process';
import { createHash, randomBytes } from 'node:crypto';
import { stat } from 'node:fs/promises';
import { request as httpRequest } from 'node:http';
import { createServer, type AddressInfo } from 'node:net';
import { join } from 'node:path';
import { afterAll, beforeAll, expect, it } from 'vitest';
import { AppConfig } from '../dist/config/app-config.js';
import { sessionCookie } from './support/sessions.js';
import { startTestApp, type TestApp } from './support/test-app.js';
import { sendByTus } from './support/tus.js';
import { kill, spawnServer } from './support/workers.js';

const MiB = 2 ** 20;
const sha256 = (bytes: Uint8Array) => createHash('sha256').update(bytes).digest('hex');

let test: TestApp;
let server: ChildProcess;
let port: number;

beforeAll(async () => {
  test = await startTestApp();
  port = await freePort();
  server = await spawnServer(test, port);
});
afterAll(async () => {
  await kill(server);
  await test.close();
});

function freePort(): Promise<number> {
  return new Promise((resolve) => {
    const probe = createServer().listen(0, '127.0.0.1', () => {
      const { port: free } = probe.address() as AddressInfo;
      probe.close(() => resolve(free));
    });
  });
}

it('an upload goes on after the server was killed while it received', { timeout: 120_000 }, async () => {
  const cookie = await sessionCookie(test.database, test.people.technician.id);
  const base = `http://127.0.0.1:${port}`;
  const endpoint = `${base}/api/projects/${test.project.id}/uploads`;
  const version = { cookie, 'Tus-Resumable': '1.0.0' };
  const bytes = randomBytes(12 * MiB);
  const metadata = `filename ${Buffer.from('killed.csv').toString('base64')}`;
  const headers = { ...version, 'Upload-Length': String(bytes.length), 'Upload-Metadata': metadata };
  const begun = await fetch(endpoint, { method: 'POST', headers });
  expect(begun.status).toBe(201);
  const address = new URL(begun.headers.get('location')!, endpoint).href;

  const patch = httpRequest(address, {
    method: 'PATCH',
    headers: {
      ...version,
      'Upload-Offset': '0',
      'Content-Type': 'application/offset+octet-stream',
      'Content-Length': bytes.length,
    },
  });
  const broken = new Promise<Error>((resolve) => patch.once('error', resolve));
  patch.write(bytes.subarray(0, 6 * MiB));
  const spooled = join(test.app.get(AppConfig).spoolFolder, address.split('/').at(-1)!);
  await expect.poll(async () => (await stat(spooled)).size, { timeout: 20_000 }).toBeGreaterThan(2 * MiB);
  await kill(server);
  await broken;

  server = await spawnServer(test, port);
  const told = await fetch(address, { method: 'HEAD', headers: version });
  expect(told.status).toBe(200);
  const offset = Number(told.headers.get('upload-offset'));
  expect(offset).toBeGreaterThan(2 * MiB);
  expect(offset).toBeLessThanOrEqual(6 * MiB);

  await sendByTus(bytes, { endpoint, cookie, fileName: 'killed.csv', uploadUrl: address });
  const finished = await fetch(`${address}/recordings`, {
    method: 'POST',
    headers: { cookie, 'content-type': 'application/json' },
    body: JSON.stringify({ sha256: sha256(bytes) }),
  });
  expect(finished.status).toBe(202);
  const { items } = (await finished.json()) as { items: { id: string; file: object }[] };
  expect(items[0]!.file).toEqual({ name: 'killed.csv', size: bytes.length, sha256: sha256(bytes) });
  const source = await fetch(`${base}/api/recordings/${items[0]!.id}/source`, { headers: { cookie } });
  expect(sha256(new Uint8Array(await source.arrayBuffer()))).toBe(sha256(bytes));
});
