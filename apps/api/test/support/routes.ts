import { RequestMethod } from '@nestjs/common';
import { ModulesContainer } from '@nestjs/core';
import type { NestExpressApplication } from '@nestjs/platform-express';
import { ROUTE_ACCESS, type RouteAccess } from '../../dist/access/require-permission.decorator.js';

export interface Route {
  method: string;
  /** With parameters as `:name`. */
  path: string;
  /** Undefined when the route names no permission. */
  access: RouteAccess | undefined;
}

/** Every route that the controllers of the application declare. */
export function declaredRoutes(app: NestExpressApplication): Route[] {
  const modules = [...app.get(ModulesContainer, { strict: false }).values()];
  const controllers = modules.flatMap((module) => [...module.controllers.values()]);
  return controllers.flatMap(({ metatype }) => (metatype ? routesOf(metatype) : []));
}

/** Every route that the server answers, read from its router: `METHOD path`. Middleware answers all methods. */
export function servedRoutes(app: NestExpressApplication): string[] {
  const { router } = app.getHttpAdapter().getInstance() as { router: { stack: Layer[] } };
  return router.stack.flatMap(({ route }) => {
    const methods = Object.keys(route?.methods ?? {});
    return route && methods.length === 1 ? [`${methods[0]?.toUpperCase()} ${route.path}`] : [];
  });
}

interface Layer {
  route?: { path: string; methods: Record<string, boolean> };
}

function routesOf(controller: object & { prototype: object }): Route[] {
  const prefix = Reflect.getMetadata('path', controller) as string;
  const prototype = controller.prototype as Record<string, unknown>;
  return Object.getOwnPropertyNames(prototype).flatMap((name) => {
    const handler = prototype[name];
    const method = typeof handler === 'function' ? Reflect.getMetadata('method', handler) : undefined;
    if (method === undefined) return [];
    const path = Reflect.getMetadata('path', handler as object) as string;
    return [
      {
        method: RequestMethod[method as number] ?? String(method),
        path: `/api/${prefix}/${path}`.replace(/\/+/g, '/').replace(/(?<=.)\/$/, ''),
        access: Reflect.getMetadata(ROUTE_ACCESS, handler as object) as RouteAccess | undefined,
      },
    ];
  });
}
