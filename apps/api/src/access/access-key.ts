import { createHash, randomBytes } from 'node:crypto';
import type { Request } from 'express';

/** Marks the text as a key of this application wherever it turns up. */
const MARK = 'ovt_';

/** The mark and six characters of 43: enough to tell keys apart, of no use for guessing the rest. */
const SHOWN_CHARACTERS = MARK.length + 6;

/** A new secret with 256 random bits, of which the hash is stored and the prefix shown. */
export function makeSecret(): { secret: string; prefix: string; secretSha256: string } {
  const secret = MARK + randomBytes(32).toString('base64url');
  return { secret, prefix: secret.slice(0, SHOWN_CHARACTERS), secretSha256: hashOfSecret(secret) };
}

/** Hex SHA-256; a slow hash is for passwords, which can be guessed. */
export function hashOfSecret(secret: string): string {
  return createHash('sha256').update(secret).digest('hex');
}

/** The text after `Bearer` in the Authorization header (RFC 6750, 2.1); undefined for any other header. */
export function bearerSecret({ headers }: Pick<Request, 'headers'>): string | undefined {
  const match = /^Bearer(?: +(.*))?$/i.exec(headers.authorization ?? '');
  return match ? (match[1] ?? '') : undefined;
}
