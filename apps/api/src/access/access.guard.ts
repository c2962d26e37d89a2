import { Injectable, type CanActivate, type ExecutionContext } from '@nestjs/common';
import { Reflector } from '@nestjs/core';
import { holds, permissions } from '@overtally/contracts';
import { z } from 'zod';
import { problem } from '../common/problem.js';
import type { AppRequest, ProjectAccess, SignedInUser } from '../common/request.js';
import { AccessRepository } from './access.repository.js';
import { ROUTE_ACCESS, type ResourceKind, type RouteAccess } from './require-permission.decorator.js';

const uuid = z.uuid();

/** Decides on every route by the permission table; a route that names no permission stays closed. */
@Injectable()
export class AccessGuard implements CanActivate {
  constructor(
    private readonly reflector: Reflector,
    private readonly repository: AccessRepository,
  ) {}

  async canActivate(context: ExecutionContext): Promise<boolean> {
    const route = this.reflector.get<RouteAccess | undefined>(ROUTE_ACCESS, context.getHandler());
    if (!route) throw problem(403, 'closed-route', 'Nobody may use this route');
    if (permissions[route.permission].allow === 'public') return true;

    const request = context.switchToHttp().getRequest<AppRequest>();
    request.user = await this.signedInUser(request);
    if (route.resource) {
      request.access = await this.projectAccess(route.resource, request.params[route.param], request.user);
    }
    if (!holds(route.permission, request.access?.role ?? null, request.user.isAdministrator)) {
      throw problem(403, 'role-too-low', 'Your role does not allow this');
    }
    return true;
  }

  private async signedInUser(request: AppRequest): Promise<SignedInUser> {
    const userId = request.session.userId;
    const user = userId === undefined ? undefined : await this.repository.findSignedInUser(userId);
    if (!user) throw problem(401, 'not-signed-in', 'Sign in first');
    return user;
  }

  private async projectAccess(
    resource: ResourceKind,
    id: unknown,
    user: SignedInUser,
  ): Promise<ProjectAccess> {
    const known = uuid.safeParse(id);
    const access = known.success
      ? await this.repository.findProjectAccess(resource, known.data, user.id)
      : undefined;
    // A stranger gets the same answer whether the thing exists or not.
    if (!access || (access.role === null && !user.isAdministrator)) {
      throw problem(404, 'not-found', `There is no such ${resource.replace('-', ' ')}`);
    }
    return access;
  }
}
