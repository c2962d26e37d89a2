import { Injectable } from '@nestjs/common';
import { createHash, createHmac, hkdfSync } from 'node:crypto';
import { AppConfig } from '../config/app-config.js';

/** What a secret link is for; each is good for one thing alone. */
export type SecretPurpose = 'invitation' | 'password-reset';

const pages: Record<SecretPurpose, string> = {
  invitation: '/invitation',
  'password-reset': '/reset-password',
};

/**
 * Secrets of links in messages. A secret is derived from the row it belongs to, by HMAC-SHA-256 (RFC 2104) with a key
 * of the installation, so that it need not be kept: the row has its hash alone, the message the place where it goes.
 */
@Injectable()
export class SecretLinks {
  private readonly key: Buffer;
  private readonly publicUrl: string;

  constructor({ sessionSecret, publicUrl }: AppConfig) {
    // A key of its own from the one secret of the installation (RFC 5869).
    this.key = Buffer.from(hkdfSync('sha256', sessionSecret, '', 'overtally links in messages', 32));
    this.publicUrl = publicUrl;
  }

  /** The secret of a row, 256 bits in base64url. */
  token(purpose: SecretPurpose, rowId: string): string {
    return createHmac('sha256', this.key).update(`${purpose}:${rowId}`).digest('base64url');
  }

  /** Hex SHA-256 of the secret of a row, to be kept with it. */
  tokenSha256(purpose: SecretPurpose, rowId: string): string {
    return hashOfToken(this.token(purpose, rowId));
  }

  /** The address with the secret behind `#`, which browsers do not send, so that no server logs it. */
  link(purpose: SecretPurpose, rowId: string): string {
    return `${this.publicUrl}${pages[purpose]}#${this.token(purpose, rowId)}`;
  }
}

/** Hex SHA-256; the secret has 256 bits, so that there is nothing to guess. */
export function hashOfToken(token: string): string {
  return createHash('sha256').update(token).digest('hex');
}
