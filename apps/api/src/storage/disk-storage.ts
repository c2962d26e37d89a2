import { createHash, randomUUID } from 'node:crypto';
import { createReadStream, type Dirent } from 'node:fs';
import { mkdir, open, readdir, rename, rm, stat } from 'node:fs/promises';
import { dirname, join } from 'node:path';
import type { Readable } from 'node:stream';
import { hashFile } from './hash-file.js';
import { makePrivateFolder } from './private-folder.js';
import { readWhole } from './read-whole.js';
import { modifiedAt, removeStale } from './stale-files.js';
import { checkedKey, checkedPrefix } from './storage-key.js';
import {
  Storage,
  StorageObjectMissing,
  type ByteInput,
  type ByteRange,
  type StagedObject,
  type StoredObject,
} from './storage.js';

const staleAfterMs = 24 * 3600 * 1000;

/** Objects as files below one folder. Bytes arrive in `.part`, are synced to disk and then renamed into place. */
export class DiskStorage extends Storage {
  private readonly partFolder: string;

  constructor(private readonly root: string) {
    super();
    this.partFolder = join(root, '.part');
  }

  /** Makes the folders and removes what an interrupted process left in `.part` a day or more ago. */
  async prepare(now = Date.now()): Promise<void> {
    await makePrivateFolder(this.root);
    await mkdir(this.partFolder, { recursive: true });
    await removeStale(this.partFolder, staleAfterMs, now);
  }

  async stage(source: ByteInput): Promise<StagedObject> {
    await mkdir(this.partFolder, { recursive: true });
    const partPath = join(this.partFolder, randomUUID());
    try {
      const { size, sha256 } = await writeSynced(partPath, source);
      return {
        size,
        sha256,
        commit: (key) => this.place(partPath, checkedKey(key)),
        discard: () => rm(partPath, { force: true }),
      };
    } catch (error) {
      await rm(partPath, { force: true });
      throw error;
    }
  }

  async stageFile(localPath: string): Promise<StagedObject> {
    return {
      ...(await hashFile(localPath)),
      commit: (key) => this.putFile(key, localPath),
      discard: () => Promise.resolve(),
    };
  }

  async put(key: string, source: ByteInput): Promise<{ size: number; sha256: string }> {
    checkedKey(key);
    const staged = await this.stage(source);
    await staged.commit(key);
    return { size: staged.size, sha256: staged.sha256 };
  }

  async putFile(key: string, localPath: string): Promise<void> {
    await syncPath(localPath);
    await this.place(localPath, checkedKey(key));
  }

  async read(key: string, range?: ByteRange): Promise<Readable> {
    const handle = await orMissing(key, open(this.path(key), 'r'));
    return createReadStream('', { fd: handle, ...range, highWaterMark: 256 * 1024 });
  }

  async readBytes(key: string, range?: ByteRange): Promise<Uint8Array> {
    const handle = await orMissing(key, open(this.path(key), 'r'));
    try {
      const { size } = await handle.stat();
      const start = range?.start ?? 0;
      const bytes = new Uint8Array(Math.max(0, Math.min(range?.end ?? size - 1, size - 1) + 1 - start));
      await readWhole(handle, bytes, start);
      return bytes;
    } finally {
      await handle.close();
    }
  }

  async size(key: string): Promise<number> {
    return (await orMissing(key, stat(this.path(key)))).size;
  }

  async delete(key: string): Promise<void> {
    await rm(this.path(key), { force: true });
  }

  async deleteAll(prefix: string): Promise<void> {
    await rm(join(this.root, checkedPrefix(prefix)), { recursive: true, force: true });
  }

  async *list(prefix: string): AsyncIterable<StoredObject> {
    for (const entry of await entriesOf(join(this.root, checkedPrefix(prefix)))) {
      const key = `${prefix}${entry.name}`;
      if (entry.isDirectory()) yield* this.list(`${key}/`);
      else {
        const writtenAt = await modifiedAt(this.path(key));
        if (writtenAt !== undefined) yield { key, writtenAt };
      }
    }
  }

  private path(key: string): string {
    return join(this.root, checkedKey(key));
  }

  private async place(partPath: string, key: string): Promise<void> {
    const target = this.path(key);
    await mkdir(dirname(target), { recursive: true });
    await rename(partPath, target);
    await syncPath(dirname(target));
  }
}

async function writeSynced(path: string, source: ByteInput): Promise<{ size: number; sha256: string }> {
  const hash = createHash('sha256');
  let size = 0;
  const handle = await open(path, 'wx');
  try {
    for await (const chunk of source instanceof Uint8Array ? [source] : source) {
      hash.update(chunk);
      size += chunk.length;
      await handle.writeFile(chunk);
    }
    await handle.sync();
  } finally {
    await handle.close();
  }
  return { size, sha256: hash.digest('hex') };
}

/** A rename survives a power cut only once its folder is on disk as well. */
async function syncPath(path: string): Promise<void> {
  const handle = await open(path, 'r');
  try {
    await handle.sync();
  } finally {
    await handle.close();
  }
}

/** What lies in a folder; nothing where it is gone or was never made. */
async function entriesOf(folder: string): Promise<Dirent[]> {
  try {
    return await readdir(folder, { withFileTypes: true });
  } catch (error) {
    if (error instanceof Error && 'code' in error && error.code === 'ENOENT') return [];
    throw error;
  }
}

async function orMissing<T>(key: string, work: Promise<T>): Promise<T> {
  try {
    return await work;
  } catch (error) {
    if (error instanceof Error && 'code' in error && error.code === 'ENOENT')
      throw new StorageObjectMissing(key);
    throw error;
  }
}
