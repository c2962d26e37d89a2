import { schema, type Database } from '@overtally/db';
import { createHmac, randomUUID } from 'node:crypto';
import { SESSION_COOKIE } from '../../dist/auth/session.middleware.js';

export const SESSION_SECRET = 'a secret of the tests, long enough to be taken';

const HOUR_MS = 60 * 60 * 1000;

/**
 * Puts a session of a person into the store, as signing in does, without the cost of the password hash.
 * @returns the Cookie header to send
 */
export async function sessionCookie(database: Database, userId: string): Promise<string> {
  const sid = randomUUID();
  const expire = new Date(Date.now() + HOUR_MS);
  const cookie = {
    originalMaxAge: HOUR_MS,
    expires: expire.toISOString(),
    httpOnly: true,
    path: '/',
    sameSite: 'lax',
  };
  await database.insert(schema.sessions).values({ sid, sess: { cookie, userId }, expire });
  // The form that express-session signs: s:<id>.<HMAC-SHA256 of the id, base64 without padding>.
  const signature = createHmac('sha256', SESSION_SECRET).update(sid).digest('base64').replace(/=+$/, '');
  return `${SESSION_COOKIE}=${encodeURIComponent(`s:${sid}.${signature}`)}`;
}
