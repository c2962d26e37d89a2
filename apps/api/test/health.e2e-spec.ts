import type pg from 'pg';
import supertest from 'supertest';
import { afterAll, beforeAll, describe, expect, it, vi } from 'vitest';
import { POOL } from '../dist/database/database.tokens.js';
import { startTestApp, type TestApp } from './support/test-app.js';

let test: TestApp;
beforeAll(async () => {
  test = await startTestApp();
});
afterAll(() => test.close());

describe('health', () => {
  it('is 200 while the database answers', async () => {
    const reply = await supertest(test.http).get('/api/health').expect(200);
    expect(reply.body.status).toBe('ok');
  });

  it('is a 503 problem while it does not, and says no more than that', async () => {
    const pool = test.app.get<pg.Pool>(POOL);
    const query = vi.spyOn(pool, 'query').mockImplementation(() => {
      throw new Error('host db.internal is away');
    });
    try {
      const reply = await supertest(test.http).get('/api/health').expect(503);
      expect(reply.type).toBe('application/problem+json');
      expect(JSON.stringify(reply.body)).not.toContain('db.internal');
    } finally {
      query.mockRestore();
    }
  });
});
