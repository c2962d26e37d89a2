import { createHash } from 'node:crypto';
import { chmod, mkdtemp, readdir, readFile, rm, stat, utimes, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { Readable } from 'node:stream';
import { buffer } from 'node:stream/consumers';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { DiskStorage } from './disk-storage.js';
import { StorageObjectMissing } from './storage.js';

const bytes = Buffer.from('0123456789');
let folder: string;
let storage: DiskStorage;

beforeEach(async () => {
  folder = await mkdtemp(join(tmpdir(), 'storage-'));
  storage = new DiskStorage(folder);
  await storage.prepare();
});
afterEach(() => rm(folder, { recursive: true }));

function pieces(failure?: Error): Readable {
  function* generate() {
    yield bytes.subarray(0, 4);
    if (failure) throw failure;
    yield bytes.subarray(4);
  }
  return Readable.from(generate());
}

describe('disk storage', () => {
  it('keeps other accounts of the machine out, of a folder that was open before too', async () => {
    await chmod(folder, 0o755);
    await storage.prepare();
    expect((await stat(folder)).mode & 0o777).toBe(0o700);
  });

  it('keeps bytes and tells their size and SHA-256', async () => {
    const stored = await storage.put('a/b.bin', pieces());
    expect(stored).toEqual({ size: 10, sha256: createHash('sha256').update(bytes).digest('hex') });
    expect(await buffer(await storage.read('a/b.bin'))).toEqual(bytes);
    expect(await buffer(await storage.read('a/b.bin', { start: 2, end: 4 }))).toEqual(Buffer.from('234'));
    expect(Buffer.from(await storage.readBytes('a/b.bin', { start: 8, end: 99 }))).toEqual(Buffer.from('89'));
    expect(await storage.size('a/b.bin')).toBe(10);
  });

  it('leaves nothing of a source that fails', async () => {
    await expect(storage.put('a/b.bin', pieces(new Error('gone')))).rejects.toThrow('gone');
    expect(await storage.exists('a/b.bin')).toBe(false);
    expect(await readdir(join(folder, '.part'))).toEqual([]);
  });

  it('drops staged bytes unless they were given a key', async () => {
    const kept = await storage.stage(pieces());
    const dropped = await storage.stage(bytes);
    await kept.commit('kept.bin');
    await kept.discard();
    await dropped.discard();
    expect(await storage.exists('kept.bin')).toBe(true);
    expect(await readdir(join(folder, '.part'))).toEqual([]);
  });

  it('takes over a local file', async () => {
    const local = join(folder, '.part', 'local');
    await writeFile(local, bytes);
    await storage.putFile('c.bin', local);
    expect(await readFile(join(folder, 'c.bin'))).toEqual(bytes);
  });

  it('deletes one object, or all below a prefix', async () => {
    for (const key of ['a/1', 'a/2', 'b/1']) await storage.put(key, bytes);
    await storage.delete('b/1');
    await storage.delete('b/1');
    await storage.deleteAll('a/');
    for (const key of ['a/1', 'a/2', 'b/1']) expect(await storage.exists(key)).toBe(false);
    await expect(storage.deleteAll('a')).rejects.toThrow(RangeError);
  });

  it('names an object that is missing', async () => {
    await expect(storage.read('none')).rejects.toThrow(StorageObjectMissing);
    await expect(storage.size('none')).rejects.toThrow('none is missing');
  });

  it.each(['../x', 'a/../x', '/etc/passwd', '.part/x', 'a//b', '', 'a\\..\\b', 'a/.hidden', 'nul\0'])(
    'refuses the key %j',
    async (key) => {
      await expect(storage.put(key, bytes)).rejects.toThrow(RangeError);
      await expect(storage.read(key)).rejects.toThrow(RangeError);
      await expect(storage.delete(key)).rejects.toThrow(RangeError);
    },
  );

  it('clears what an interrupted process left a day ago, and nothing younger', async () => {
    await writeFile(join(folder, '.part', 'old'), bytes);
    await writeFile(join(folder, '.part', 'young'), bytes);
    const twoDaysAgo = Date.now() / 1000 - 2 * 24 * 3600;
    await utimes(join(folder, '.part', 'old'), twoDaysAgo, twoDaysAgo);
    await storage.prepare();
    expect(await readdir(join(folder, '.part'))).toEqual(['young']);
  });
});
