import { createParamDecorator, type ExecutionContext } from '@nestjs/common';
import type { AppRequest, SignedInUser } from './request.js';

export type { SignedInUser } from './request.js';

/** The signed-in person; for routes whose permission needs a sign-in. */
export const CurrentUser = createParamDecorator((_: unknown, context: ExecutionContext): SignedInUser => {
  const { user } = context.switchToHttp().getRequest<AppRequest>();
  if (!user) throw new Error('@CurrentUser() on a route that needs no sign-in');
  return user;
});
