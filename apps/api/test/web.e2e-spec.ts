import { mkdir, mkdtemp, rm, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import supertest from 'supertest';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { startTestApp, type TestApp } from './support/test-app.js';

const PAGE = '<!doctype html><title>Overtally</title>';
const SCRIPT = 'export const answer = 42;'.repeat(200);

let webDist: string;
let test: TestApp;
beforeAll(async () => {
  webDist = await mkdtemp(join(tmpdir(), 'overtally-web-'));
  await mkdir(join(webDist, 'assets'));
  await writeFile(join(webDist, 'index.html'), PAGE);
  await writeFile(join(webDist, 'assets', 'index-abc123.js'), SCRIPT);
  test = await startTestApp({ WEB_DIST: webDist });
});
afterAll(async () => {
  await test.close();
  await rm(webDist, { recursive: true, force: true });
});

describe('the web application', () => {
  it.each(['/', '/projects/4c2f/recordings', '/sign-in?then=/projects'])(
    'is the page at %s',
    async (address) => {
      const reply = await supertest(test.http).get(address).set('Accept', 'text/html').expect(200);
      expect(reply.text).toBe(PAGE);
      expect(reply.headers['cache-control']).toBe('no-cache');
      expect(reply.headers['content-security-policy']).toContain("script-src 'self'");
    },
  );

  it('keeps hashed assets for good, sends them compressed, and a missing one is missing', async () => {
    const reply = await supertest(test.http).get('/assets/index-abc123.js').expect(200);
    expect(reply.headers['cache-control']).toBe('public, max-age=31536000, immutable');
    expect(reply.headers['content-encoding']).toBe('gzip');
    expect(reply.text).toBe(SCRIPT);
    await supertest(test.http).get('/assets/index-gone.js').set('Accept', 'text/html').expect(404);
  });

  it('does not stand in for addresses of the API', async () => {
    const reply = await supertest(test.http).get('/api/nothing').set('Accept', 'text/html').expect(404);
    expect(reply.type).toBe('application/problem+json');
  });

  it('does not leave its folder', async () => {
    const reply = await supertest(test.http).get('/..%2f..%2f..%2fetc%2fpasswd');
    expect(reply.text ?? '').not.toContain('root:');
  });
});
