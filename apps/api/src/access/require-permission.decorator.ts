import { applyDecorators, createParamDecorator, SetMetadata, type ExecutionContext } from '@nestjs/common';
import { ApiBearerAuth, ApiCookieAuth, ApiExtension } from '@nestjs/swagger';
import { permissions, type Permission } from '@overtally/contracts';
import type { AppRequest, ProjectAccess as Access } from '../common/request.js';
import { ApiProblem } from '../common/api-problem.decorator.js';

export type { ProjectAccess as ProjectAccessValue } from '../common/request.js';

/** Kinds of things that belong to a project, whose id may stand in a path. */
export type ResourceKind =
  | 'project'
  | 'equipment'
  | 'reading-rule'
  | 'recording'
  | 'analysis'
  | 'note'
  | 'verdict'
  | 'study'
  | 'report'
  | 'limit-set'
  | 'invitation'
  | 'mail';

export interface RouteAccess {
  permission: Permission;
  /** Null for permissions that are not held in a project. */
  resource: ResourceKind | null;
  param: string;
}

export const ROUTE_ACCESS = Symbol('ROUTE_ACCESS');

/**
 * Says who may use a route; a route without it is closed.
 * @param permission entry of the permission table
 * @param target for project permissions: the kind of thing and the name of the path parameter with its id
 */
export function RequirePermission(
  permission: Permission,
  target?: { resource: ResourceKind; param?: string },
): MethodDecorator {
  const inProject = Array.isArray(permissions[permission].allow);
  if (inProject !== (target !== undefined)) {
    throw new Error(`${permission}: a resource belongs to project permissions, and to them alone`);
  }
  const access: RouteAccess = {
    permission,
    resource: target?.resource ?? null,
    param: target?.param ?? 'id',
  };
  return applyDecorators(SetMetadata(ROUTE_ACCESS, access), ...documentation(access));
}

/** The project a route works in and the person's role there. */
export const ProjectAccess = createParamDecorator((_: unknown, context: ExecutionContext): Access => {
  const { access } = context.switchToHttp().getRequest<AppRequest>();
  if (!access) throw new Error('@ProjectAccess() on a route without a project');
  return access;
});

function documentation({ permission, resource }: RouteAccess): MethodDecorator[] {
  const all = [
    ApiExtension('x-permission', permission),
    ApiProblem('default', 'Any other refusal or failure'),
  ];
  const { allow } = permissions[permission];
  if (allow === 'public') return all;
  all.push(ApiCookieAuth('session'), ApiBearerAuth('bearer'), ApiProblem(401, 'Nobody is signed in'));
  if (allow === 'laboratory') all.push(ApiProblem(403, 'Who asks does not work in the laboratory'));
  else if (allow !== 'signed-in') all.push(ApiProblem(403, 'The role of the person who asks is too low'));
  if (resource) all.push(ApiProblem(404, 'No such thing, or not in a project of the person who asks'));
  return all;
}
