import { Injectable, type CanActivate, type ExecutionContext } from '@nestjs/common';
import { Reflector } from '@nestjs/core';
import { holds, idSchema, permissions, type ProjectRole } from '@overtally/contracts';
import { problem, ProblemException } from '../common/problem.js';
import type { AppRequest, ProjectAccess, SignedInUser } from '../common/request.js';
import { bearerSecret, hashOfSecret } from './access-key.js';
import { AccessRepository } from './access.repository.js';
import { ROUTE_ACCESS, type ResourceKind, type RouteAccess } from './require-permission.decorator.js';

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
      request.access = await this.projectAccess(request, route.resource, route.param, request.user);
    }
    const role = await this.role(route, request);
    if (!holds(route.permission, role, request.user.isAdministrator)) {
      throw problem(403, 'role-too-low', 'Your role does not allow this');
    }
    return true;
  }

  /** The role in the project of the request, or for what the laboratory shares one that is held anywhere in it. */
  private role({ permission }: RouteAccess, { access, user }: AppRequest): Promise<ProjectRole | null> {
    if (permissions[permission].allow !== 'laboratory') return Promise.resolve(access?.role ?? null);
    return this.repository.findLaboratoryRole(user!.id);
  }

  /** The holder of the key that the request carries, else the person of its session. */
  private async signedInUser(request: AppRequest): Promise<SignedInUser> {
    const secret = bearerSecret(request);
    if (secret !== undefined) return this.keyHolder(secret);
    const userId = request.session.userId;
    const user = userId === undefined ? undefined : await this.repository.findSignedInUser(userId);
    if (!user) throw unauthorised('not-signed-in', 'Sign in first', 'Bearer');
    return user;
  }

  private async keyHolder(secret: string): Promise<SignedInUser> {
    const user = await this.repository.findKeyHolder(hashOfSecret(secret));
    if (user) return user;
    const detail = 'The access key is not known or has expired; make a new one on the account page';
    throw unauthorised('invalid-access-key', detail, 'Bearer error="invalid_token"');
  }

  /** Finds the project of the thing in the path, whose id is brought to the form in which ids are stored. */
  private async projectAccess(
    request: AppRequest,
    resource: ResourceKind,
    param: string,
    user: SignedInUser,
  ): Promise<ProjectAccess> {
    const id = idSchema.safeParse(request.params[param]);
    if (id.success) request.params[param] = id.data;
    const access = id.success
      ? await this.repository.findProjectAccess(resource, id.data, user.id)
      : undefined;
    // A stranger gets the same answer whether the thing exists or not.
    if (!access || (access.role === null && !user.isAdministrator)) {
      throw problem(404, 'not-found', `There is no such ${resource.replace('-', ' ')}`);
    }
    return access;
  }
}

/** A 401 names the way to sign a request (RFC 9110, 15.5.2; RFC 6750, 3). */
function unauthorised(code: string, detail: string, challenge: string): ProblemException {
  return new ProblemException(401, code, detail, undefined, { 'WWW-Authenticate': challenge });
}
