import { Inject, Injectable } from '@nestjs/common';
import type { AccessKey, CreateAccessKey, CreatedAccessKey } from '@overtally/contracts';
import type { Database } from '@overtally/db';
import { z } from 'zod';
import { makeSecret } from '../access/access-key.js';
import { decodeCursor, pageOfRows } from '../common/paging.js';
import { problem } from '../common/problem.js';
import { DATABASE } from '../database/database.tokens.js';
import { AccessKeysRepository, type AccessKeyRow } from './access-keys.repository.js';

const placeSchema = z.tuple([z.iso.datetime(), z.uuid()]);
const DAY_MS = 24 * 60 * 60 * 1000;

/** A person's own access keys for scripts. */
@Injectable()
export class AccessKeysService {
  constructor(
    @Inject(DATABASE) private readonly database: Database,
    private readonly repository: AccessKeysRepository,
  ) {}

  /** Keys of a person, the newest first. */
  async list(userId: string, { cursor, limit }: { cursor?: string; limit: number }) {
    const place = decodeCursor(cursor, placeSchema);
    const after = place && { createdAt: place[0], id: place[1] };
    const rows = await this.repository.list(userId, after, limit + 1);
    return pageOfRows(rows, limit, (row) => [row.createdAt.toISOString(), row.id], toAccessKey);
  }

  /** Makes a key; the reply is the only place where its secret ever stands. */
  async create(userId: string, { name, expiresInDays }: CreateAccessKey): Promise<CreatedAccessKey> {
    const { secret, prefix, secretSha256 } = makeSecret();
    const expiresAt = expiresInDays === undefined ? null : new Date(Date.now() + expiresInDays * DAY_MS);
    const row = await this.database.transaction((tx) =>
      this.repository.insert(tx, { userId, name, prefix, secretSha256, expiresAt }),
    );
    return { ...toAccessKey(row), secret };
  }

  /** @throws 404 for a key that the person does not have */
  async delete(userId: string, id: string): Promise<void> {
    const isDeleted = await this.database.transaction((tx) => this.repository.delete(tx, userId, id));
    if (!isDeleted) throw problem(404, 'not-found', 'You have no such access key');
  }
}

function toAccessKey({ id, name, prefix, createdAt, lastUsedAt, expiresAt }: AccessKeyRow): AccessKey {
  return {
    id,
    name,
    prefix,
    createdAt: createdAt.toISOString(),
    lastUsedAt: lastUsedAt?.toISOString() ?? null,
    expiresAt: expiresAt?.toISOString() ?? null,
  };
}
