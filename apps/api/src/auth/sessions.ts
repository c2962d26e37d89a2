import type { Response } from 'express';
import type { AppRequest } from '../common/request.js';
import { SESSION_COOKIE } from './session.middleware.js';

/** Signs a person in under a new session id, so that an id known before is worth nothing. */
export async function beginSession(request: AppRequest, userId: string): Promise<void> {
  await new Promise<void>((resolve, reject) => {
    request.session.regenerate((error?: Error) => (error ? reject(error) : resolve()));
  });
  request.session.userId = userId;
}

/** Removes the session from the store and the cookie from the browser. */
export async function endSession(request: AppRequest, response: Response): Promise<void> {
  await new Promise<void>((resolve, reject) => {
    request.session.destroy((error?: Error) => (error ? reject(error) : resolve()));
  });
  response.clearCookie(SESSION_COOKIE, { path: '/' });
}
