import { FileStore } from '@tus/file-store';
import { Injectable, Logger, type OnModuleDestroy, type OnModuleInit } from '@nestjs/common';
import { idSchema, type UnfinishedUpload } from '@overtally/contracts';
import { randomUUID } from 'node:crypto';
import { readdir, rm, stat, statfs } from 'node:fs/promises';
import { join } from 'node:path';
import { problem } from '../../common/problem.js';
import { AppConfig } from '../../config/app-config.js';
import { makePrivateFolder } from '../../storage/private-folder.js';
import { modifiedAt } from '../../storage/stale-files.js';
import { bytesInWords } from './bytes-in-words.js';
import { isAbsent, SpoolRecords, type SpoolOutcome, type SpoolRecord } from './spool-records.js';
import { UploadLocks } from './upload-locks.js';

const hourMs = 3600 * 1000;
/** An upload that is not whole by then is dropped; what became of a whole one is told for as long. */
export const uploadExpiryMs = 7 * 24 * hourMs;
/** A file without a record is of an archive being received, or was left by a process that ended. */
const strayAfterMs = 24 * hourMs;
/** Stays free for the database and for what is computed. */
const reserveBytes = 512 * 2 ** 20;

/** Whose an upload is. The server sets it; what a client says of it counts for nothing. */
export interface UploadOwner {
  projectId: string;
  userId: string;
}

/**
 * Uploads on their way: a folder on the disk of this server with the bytes that arrived and a record for each upload.
 * Names of files are ids that the server gave; the name that a client gave is only ever told.
 */
@Injectable()
export class UploadSpool implements OnModuleInit, OnModuleDestroy {
  readonly records: SpoolRecords;
  readonly locks = new UploadLocks();
  /** Absolute path. */
  readonly folder: string;
  private readonly logger = new Logger('Uploads');
  private sweeping?: NodeJS.Timeout;

  constructor(config: AppConfig) {
    this.folder = config.spoolFolder;
    this.records = new SpoolRecords(this.folder);
  }

  async onModuleInit(): Promise<void> {
    await makePrivateFolder(this.folder);
    await this.sweep();
    this.sweeping = setInterval(() => {
      this.sweep().catch((error: unknown) => this.logger.error({ err: error }, 'The spool was not cleared'));
    }, hourMs).unref();
  }

  onModuleDestroy(): void {
    clearInterval(this.sweeping);
  }

  /** The store of the resumable protocol. The length of an upload must be known from the start, for the limits. */
  store(): FileStore {
    const store = new FileStore({
      directory: this.folder,
      configstore: this.records,
      expirationPeriodInMilliseconds: uploadExpiryMs,
    });
    store.extensions = ['creation', 'creation-with-upload', 'termination', 'expiration'];
    return store;
  }

  /** The record of an upload of this person in this project; undefined for those of others and for what is not one. */
  async find(id: string, owner: UploadOwner): Promise<SpoolRecord | undefined> {
    const known = idSchema.safeParse(id);
    const record = known.success && known.data === id ? await this.records.find(id) : undefined;
    return record && isOwner(record, owner) ? record : undefined;
  }

  path(id: string): string {
    return join(this.folder, id);
  }

  /** A name for bytes that belong to no upload; they go when they are old. */
  strayName(): string {
    return randomUUID();
  }

  /** Bytes that have arrived; undefined once they have left the spool. */
  async receivedBytes(id: string): Promise<number | undefined> {
    try {
      return (await stat(this.path(id))).size;
    } catch (error) {
      if (isAbsent(error)) return undefined;
      throw error;
    }
  }

  /** Uploads of a person in a project that have not become recordings, the newest first. */
  async unfinished(owner: UploadOwner): Promise<UnfinishedUpload[]> {
    const found: UnfinishedUpload[] = [];
    for (const { id, record } of await this.all()) {
      if (!isOwner(record, owner) || record.outcome !== undefined) continue;
      const { upload } = record;
      const createdAt = createdAtOf(record);
      found.push({
        id,
        fileName: fileNameOf(record),
        sizeBytes: upload.size ?? 0,
        receivedBytes: (await this.receivedBytes(id)) ?? upload.size ?? 0,
        createdAt: new Date(createdAt).toISOString(),
        expiresAt: new Date(createdAt + uploadExpiryMs).toISOString(),
      });
    }
    return found.sort((a, b) => b.createdAt.localeCompare(a.createdAt));
  }

  /** Writes down what an upload became and drops its bytes where they are still here. */
  async settle(id: string, record: SpoolRecord, outcome: SpoolOutcome): Promise<void> {
    await this.records.write(id, { ...record, outcome });
    await rm(this.path(id), { force: true });
  }

  /** Drops an upload with all that arrived of it. */
  async drop(id: string): Promise<void> {
    await rm(this.path(id), { force: true });
    await this.records.delete(id);
  }

  /**
   * Refuses bytes for which the disk has no room, the rest of all uploads under way and a reserve counted in.
   * @throws ProblemException 507 `no-room` with the figures
   */
  async demandRoom(sizeBytes: number): Promise<void> {
    const free = await this.freeBytes();
    const expected = await this.expectedBytes();
    if (free - expected - sizeBytes >= reserveBytes) return;
    const promised = `${bytesInWords(expected)} of them are promised to uploads under way and ${bytesInWords(reserveBytes)} are kept in reserve`;
    throw problem(
      507,
      'no-room',
      `The disk of the server has no room for ${bytesInWords(sizeBytes)} (${sizeBytes} bytes): ${bytesInWords(free)} are free, ${promised}. Tell who runs it, or send less`,
    );
  }

  /** Free bytes of the disk below the spool. */
  async freeBytes(): Promise<number> {
    const { bavail, bsize } = await statfs(this.folder);
    return bavail * bsize;
  }

  /**
   * Removes uploads that have expired at `now` and files that belong to none.
   * @returns how many files were removed
   */
  async sweep(now = Date.now()): Promise<number> {
    let removed = 0;
    const kept = new Set<string>();
    for (const { id, record } of await this.all()) {
      if (now < createdAtOf(record) + uploadExpiryMs) kept.add(id).add(`${id}.json`);
      else {
        await this.drop(id);
        removed++;
      }
    }
    for (const name of await readdir(this.folder)) {
      const writtenAt = kept.has(name) ? undefined : await modifiedAt(join(this.folder, name));
      if (writtenAt === undefined || now - writtenAt < strayAfterMs) continue;
      await rm(join(this.folder, name), { recursive: true, force: true });
      removed++;
    }
    if (removed > 0) this.logger.log({ files: removed }, 'Uploads that expired were removed');
    return removed;
  }

  private async expectedBytes(): Promise<number> {
    let bytes = 0;
    for (const { id, record } of await this.all()) {
      const received = record.outcome === undefined ? await this.receivedBytes(id) : undefined;
      if (received !== undefined) bytes += Math.max(0, (record.upload.size ?? 0) - received);
    }
    return bytes;
  }

  private async all(): Promise<{ id: string; record: SpoolRecord }[]> {
    const found: { id: string; record: SpoolRecord }[] = [];
    for (const id of await this.records.list()) {
      const record = await this.records.find(id);
      if (record !== undefined) found.push({ id, record });
    }
    return found;
  }
}

/** The name that the client gave, without folders. */
export function fileNameOf({ upload }: SpoolRecord): string {
  const name = (upload.metadata?.filename ?? '').replace(/^.*[/\\]/, '').replace(/[\p{Cc}\p{Cs}]/gu, '');
  return name === '' ? 'Unnamed' : name.slice(0, 255);
}

function isOwner({ upload }: SpoolRecord, { projectId, userId }: UploadOwner): boolean {
  return upload.metadata?.projectId === projectId && upload.metadata.userId === userId;
}

function createdAtOf({ upload }: SpoolRecord): number {
  const moment = Date.parse(upload.creation_date ?? '');
  return Number.isNaN(moment) ? 0 : moment;
}
