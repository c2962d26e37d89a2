import type { OpenAPIObject } from '@nestjs/swagger';
import { permissions } from '@overtally/contracts';
import supertest from 'supertest';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { declaredRoutes, type Route } from './support/routes.js';
import { startTestApp, type TestApp } from './support/test-app.js';

let test: TestApp;
let document: OpenAPIObject;
let routes: Route[];
beforeAll(async () => {
  test = await startTestApp();
  document = (await supertest(test.http).get('/api/openapi.json').expect(200)).body;
  routes = declaredRoutes(test.app);
});
afterAll(() => test.close());

interface Operation {
  operationId: string;
  security?: Record<string, string[]>[];
  responses: Record<string, { content?: Record<string, { schema?: object }>; headers?: object }>;
}

const pathOf = (route: Route) => route.path.replace(/:(\w+)/g, '{$1}');
const operations = () =>
  Object.entries(document.paths).flatMap(([path, item]) =>
    Object.entries(item as Record<string, Operation>).map(([method, operation]) => ({
      name: `${method.toUpperCase()} ${path}`,
      operation,
    })),
  );

describe('the OpenAPI document', () => {
  it('lists every route of the application and no other', () => {
    const declared = routes.map((route) => `${route.method} ${pathOf(route)}`);
    expect(
      operations()
        .map(({ name }) => name)
        .sort(),
    ).toEqual(declared.sort());
  });

  it('gives each route a reply with a schema, one that tells all in headers, or one without content', () => {
    const without = operations().filter(({ operation }) => {
      const replies = Object.entries(operation.responses).filter(([status]) => /^2/.test(status));
      const isStated = ([status, { content, headers }]: (typeof replies)[number]) =>
        status === '204' ||
        headers !== undefined ||
        Object.values(content ?? {}).some(({ schema }) => schema !== undefined);
      return !replies.some(isStated);
    });
    expect(without.map(({ name }) => name)).toEqual([]);
  });

  it('gives each route its problem replies', () => {
    const without = operations().filter(
      ({ operation }) =>
        !Object.values(operation.responses).some(({ content }) => content?.['application/problem+json']),
    );
    expect(without.map(({ name }) => name)).toEqual([]);
  });

  it('says which routes need the session cookie or an access key', () => {
    expect(document.components?.securitySchemes).toEqual({
      session: { type: 'apiKey', in: 'cookie', name: 'overtally_session' },
      bearer: { type: 'http', scheme: 'bearer', description: 'Personal access key' },
    });
    const either = [{ session: [] }, { bearer: [] }];
    for (const route of routes) {
      const operation = operations().find(
        ({ name }) => name === `${route.method} ${pathOf(route)}`,
      )?.operation;
      const isPublic = route.access && permissions[route.access.permission].allow === 'public';
      expect(operation?.security, route.path).toEqual(isPublic ? undefined : either);
    }
  });

  it('has one name for each operation and resolves every reference', () => {
    const ids = operations().map(({ operation }) => operation.operationId);
    expect(new Set(ids).size).toBe(ids.length);
    const text = JSON.stringify(document);
    const references = [...text.matchAll(/"\$ref":"#\/components\/schemas\/([^"]+)"/g)].map(
      ([, name]) => name,
    );
    expect(references.filter((name) => !document.components?.schemas?.[name ?? ''])).toEqual([]);
  });
});
