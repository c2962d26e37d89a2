import { describe, expect, it, vi } from 'vitest';
import { z } from 'zod';
import { json, mockApi, problem } from '../testing/mock-api.js';
import { ApiProblem } from './api-problem.js';
import { apiUrl, onSignedOut, requestJson } from './http.js';
import { listAll } from './list-all.js';

const thing = z.object({ name: z.string() });

describe('requests', () => {
  it('leave out what is not asked for', () => {
    expect(apiUrl('/projects', { q: '', cursor: null, limit: 50, archived: false })).toBe(
      '/api/projects?limit=50&archived=false',
    );
  });

  it('turn problem details (RFC 9457) into a typed error', async () => {
    const errors = [{ path: 'name', message: 'Name it' }];
    mockApi({ 'POST /things': problem(400, { detail: 'Not valid', code: 'invalid-request', errors }) });
    const failure = requestJson(thing, '/things', { method: 'POST', body: {} });
    await expect(failure).rejects.toMatchObject({ status: 400, detail: 'Not valid', errors });
    await expect(failure).rejects.toBeInstanceOf(ApiProblem);
  });

  it('refuse a reply that does not keep the contract', async () => {
    mockApi({ 'GET /things': json({ name: 7 }) });
    await expect(requestJson(thing, '/things')).rejects.toThrow(/reload the page/);
  });

  it('say that the server cannot be reached', async () => {
    vi.stubGlobal('fetch', () => Promise.reject(new TypeError('fetch failed')));
    await expect(requestJson(thing, '/things')).rejects.toMatchObject({ status: 0, title: 'No connection' });
  });

  it('tell when the session has ended, but not when a sign-in is refused', async () => {
    const listener = vi.fn();
    onSignedOut(listener);
    mockApi({ 'POST /auth/sign-in': problem(401), 'GET /things': problem(401) });
    await expect(requestJson(thing, '/auth/sign-in', { method: 'POST' })).rejects.toThrow();
    expect(listener).not.toHaveBeenCalled();
    await expect(requestJson(thing, '/things')).rejects.toThrow();
    expect(listener).toHaveBeenCalledOnce();
    onSignedOut(() => undefined);
  });
});

it('fetches a list page by page', async () => {
  const seen = mockApi({
    'GET /things': ({ path }) =>
      path.includes('cursor=next')
        ? json({ items: [{ name: 'b' }], nextCursor: null })({ method: 'GET', path, body: undefined })
        : json({ items: [{ name: 'a' }], nextCursor: 'next' })({ method: 'GET', path, body: undefined }),
  });
  const schema = z.object({ items: z.array(thing), nextCursor: z.string().nullable() });
  expect(await listAll(schema, '/things')).toEqual([{ name: 'a' }, { name: 'b' }]);
  expect(seen.map((request) => request.path)).toEqual(['/things?limit=200', '/things?limit=200&cursor=next']);
});
