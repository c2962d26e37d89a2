import { Injectable, type OnModuleInit } from '@nestjs/common';
import argon2 from 'argon2';
import { randomBytes } from 'node:crypto';

/**
 * Argon2id (RFC 9106) with 19 MiB, two passes, one lane: the setting that the OWASP Password Storage Cheat
 * Sheet recommends. A hash with other parameters is renewed when its owner signs in.
 */
const PARAMETERS = { type: argon2.argon2id, timeCost: 2, parallelism: 1, memoryCost: 19 * 1024 } as const;

@Injectable()
export class PasswordHasher implements OnModuleInit {
  private nobodysHash = '';

  async onModuleInit(): Promise<void> {
    this.nobodysHash = await this.hash(randomBytes(32).toString('base64'));
  }

  hash(password: string): Promise<string> {
    return argon2.hash(password, PARAMETERS);
  }

  /**
   * Compares a password with a stored hash. Without one the same work is done against a hash that nothing
   * matches, so that the time taken does not tell whether an account exists.
   */
  async verify(hash: string | undefined, password: string): Promise<boolean> {
    const matches = await argon2.verify(hash ?? this.nobodysHash, password);
    return hash !== undefined && matches;
  }

  /** True when a hash was made with other parameters than today's. */
  isOutdated(hash: string): boolean {
    return argon2.needsRehash(hash, PARAMETERS);
  }
}
