import { Upload, type KvStore } from '@tus/server';
import { randomUUID } from 'node:crypto';
import { open, readdir, readFile, rename, rm } from 'node:fs/promises';
import { join } from 'node:path';

/** What is known of an upload; it lies beside the bytes that arrived. */
export interface SpoolRecord {
  upload: Upload;
  /** Of the bytes once they are whole, written before they leave the spool. */
  sha256?: string;
  /** What the upload became; given again to who asks again. */
  outcome?: SpoolOutcome;
}

export interface SpoolOutcome {
  recordingIds: string[];
  leftOut: { path: string; reason: string }[];
}

const suffix = '.json';

/** The records of a spool folder, one file each, which is replaced as a whole. */
export class SpoolRecords implements KvStore<Upload> {
  constructor(private readonly folder: string) {}

  async find(id: string): Promise<SpoolRecord | undefined> {
    try {
      return JSON.parse(await readFile(this.path(id), 'utf8')) as SpoolRecord;
    } catch (error) {
      if (isAbsent(error)) return undefined;
      throw error;
    }
  }

  async write(id: string, record: SpoolRecord): Promise<void> {
    const half = join(this.folder, `${randomUUID()}.half`);
    const handle = await open(half, 'wx');
    try {
      await handle.writeFile(JSON.stringify(record));
      await handle.sync();
    } finally {
      await handle.close();
    }
    await rename(half, this.path(id));
  }

  async get(id: string): Promise<Upload | undefined> {
    const record = await this.find(id);
    return record && new Upload(record.upload);
  }

  async set(id: string, upload: Upload): Promise<void> {
    await this.write(id, { ...(await this.find(id)), upload });
  }

  async delete(id: string): Promise<void> {
    await rm(this.path(id), { force: true });
  }

  async list(): Promise<string[]> {
    const names = await readdir(this.folder);
    return names.filter((name) => name.endsWith(suffix)).map((name) => name.slice(0, -suffix.length));
  }

  private path(id: string): string {
    return join(this.folder, `${id}${suffix}`);
  }
}

/** Whether an error says that a file is not there. */
export function isAbsent(error: unknown): boolean {
  return error instanceof Error && 'code' in error && error.code === 'ENOENT';
}
