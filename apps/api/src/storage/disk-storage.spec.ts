import { chmod, mkdtemp, readdir, readFile, rm, stat, utimes, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { Readable } from 'node:stream';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { DiskStorage } from './disk-storage.js';

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

  it('clears what an interrupted process left a day ago, and nothing younger', async () => {
    await writeFile(join(folder, '.part', 'old'), bytes);
    await writeFile(join(folder, '.part', 'young'), bytes);
    const twoDaysAgo = Date.now() / 1000 - 2 * 24 * 3600;
    await utimes(join(folder, '.part', 'old'), twoDaysAgo, twoDaysAgo);
    await storage.prepare();
    expect(await readdir(join(folder, '.part'))).toEqual(['young']);
  });
});
