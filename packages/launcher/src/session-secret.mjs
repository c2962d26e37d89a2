/** The key that signs session cookies: SESSION_SECRET, or one made once and kept in the data folder. */
import { randomBytes } from 'node:crypto';
import { existsSync, readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';

/**
 * @param {string} dataDirectory
 * @returns {string}
 */
export function sessionSecret(dataDirectory) {
  if (process.env.SESSION_SECRET) return process.env.SESSION_SECRET;
  const file = join(dataDirectory, 'session-secret');
  if (!existsSync(file)) writeFileSync(file, randomBytes(32).toString('hex'), { mode: 0o600 });
  return readFileSync(file, 'utf8').trim();
}
