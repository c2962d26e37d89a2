import { holds, permissions, projectRoleSchema, type Permission } from '@overtally/contracts';
import supertest from 'supertest';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { recordingPrefix } from '../dist/recordings/recording-keys.js';
import { Storage } from '../dist/storage/storage.js';
import { makeExamples, makeOtherParameters, type Examples } from './support/examples.js';
import { newIssued, newJudged } from './support/judged-reports.js';
import { ROLES, type Role } from './support/people.js';
import { newRecording } from './support/project-contents.js';
import { declaredRoutes, servedRoutes, type Route } from './support/routes.js';
import { startTestApp, type TestApp } from './support/test-app.js';

let test: TestApp;
let routes: Route[];
beforeAll(async () => {
  test = await startTestApp();
  routes = declaredRoutes(test.app);
});
afterAll(() => test.close());

type Expected = 401 | 403 | 404 | 'allowed';
const EVERYONE: readonly (Role | null)[] = [null, ...ROLES];

/** What the permission table says of a person on a route; null is nobody signed in. */
function expected({ access }: Route, who: Role | null): Expected {
  if (!access) return 403;
  const { allow } = permissions[access.permission];
  if (allow === 'public') return 'allowed';
  if (who === null) return 401;
  if (access.resource && who === 'stranger') return 404;
  const member = projectRoleSchema.safeParse(who);
  return holds(access.permission, member.data ?? null, who === 'administrator') ? 'allowed' : 403;
}

/** What the server did; a body is not sent, so an allowed request may still be refused for its form. */
function outcome({ access, method }: Route, reply: { status: number; body: { detail?: string } }): Expected {
  if (reply.status === 401 || reply.status === 403) return reply.status;
  // A reply to HEAD has no body; the routes that answer it refuse requests without a version of their protocol first.
  const isGuard =
    method === 'HEAD' || reply.body.detail === `There is no such ${access?.resource?.replace('-', ' ')}`;
  return reply.status === 404 && isGuard ? 404 : 'allowed';
}

/** One request without a body; `examples` fill the path. */
async function ask(route: Route, who: Role | null, examples: Examples): Promise<Expected> {
  const { resource, param = 'id' } = route.access ?? {};
  const values = { ...(await makeOtherParameters(test)), ...(resource && { [param]: examples[resource] }) };
  const path = route.path.replace(/:(\w+)/g, (_, name: string) => values[name] ?? `no-example-of-${name}`);
  const agent = who === null ? supertest(test.http) : await test.signIn(who);
  const method = route.method.toLowerCase() as
    'get' | 'post' | 'patch' | 'put' | 'delete' | 'head' | 'options';
  return outcome(route, await agent[method](path));
}

/** Asks as everyone; an allowed request may change things, so it gets things of the person's own. */
async function walk(route: Route, shared: Examples): Promise<Record<string, Expected>> {
  const outcomes: Record<string, Expected> = {};
  for (const who of EVERYONE) {
    const mayChange = who !== null && route.method !== 'GET' && expected(route, who) === 'allowed';
    const examples =
      mayChange && route.access?.resource ? await makeExamples(test, test.people[who].id) : shared;
    outcomes[who ?? 'nobody'] = await ask(route, who, examples);
  }
  return outcomes;
}

describe('access to every route', () => {
  it('is declared: each route names its permission, and nothing else is served', () => {
    expect(routes.filter((route) => !route.access)).toEqual([]);
    const declared = routes.map((route) => `${route.method} ${route.path}`);
    expect(servedRoutes(test.app).sort()).toEqual(declared.sort());
  });

  it('uses every permission of the table', () => {
    const used = new Set(routes.map((route) => route.access?.permission));
    const unused = (Object.keys(permissions) as Permission[]).filter((permission) => !used.has(permission));
    expect(unused).toEqual([]);
  });

  it('follows the permission table for everyone', { timeout: 180_000 }, async () => {
    const found: Record<string, Record<string, Expected>> = {};
    const wanted: Record<string, Record<string, Expected>> = {};
    const { verdict } = await newJudged(test);
    // Guests read a report once it is issued.
    const { id: report } = await newIssued(test, [verdict.id]);
    const shared = { ...(await makeExamples(test, test.people.analyst.id)), report };
    for (const route of routes) {
      const name = `${route.method} ${route.path}`;
      found[name] = await walk(route, shared);
      wanted[name] = Object.fromEntries(EVERYONE.map((who) => [who ?? 'nobody', expected(route, who)]));
    }
    expect(found).toEqual(wanted);
  });

  // RFC 9562, 4: a UUID is the same in either case.
  it('takes an id in upper case for the same thing, down to its files', async () => {
    const owner = { projectId: test.project.id, userId: test.people.analyst.id };
    const { id } = await newRecording(test.database, owner);
    const storage = test.app.get(Storage, { strict: false });
    const key = `${recordingPrefix(id)}samples.npy`;
    await storage.put(key, new Uint8Array(8));
    const analyst = await test.signIn('analyst');
    await analyst.delete(`/api/recordings/${id.toUpperCase()}`).expect(204);
    expect(await storage.exists(key)).toBe(false);
  });

  it('answers a stranger the same for a thing of others, a thing that is not, and a malformed id', async () => {
    const stranger = await test.signIn('stranger');
    const ids = [test.project.id, '00000000-0000-4000-8000-000000000000', 'not-an-id'];
    const bodies = [];
    for (const id of ids) {
      const { instance: _, ...body } = (await stranger.get(`/api/projects/${id}`).expect(404)).body;
      bodies.push(body);
    }
    expect(new Set(bodies.map((body) => JSON.stringify(body))).size).toBe(1);
  });
});
