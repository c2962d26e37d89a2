import { createHash } from 'node:crypto';
import { access, mkdtemp, readdir, readFile, rm, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { Readable } from 'node:stream';
import { buffer } from 'node:stream/consumers';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { startFakeS3 } from '../../test/support/fake-s3.js';
import { DiskStorage } from './disk-storage.js';
import { S3Storage } from './s3-storage.js';
import { StorageObjectMissing, type Storage, type StoredObject } from './storage.js';

interface Store {
  storage: Storage;
  /** Fails when anything is left: an object, or bytes of one that never came to be. */
  expectNothing(): Promise<void>;
  close(): Promise<void>;
}

const stores: Record<string, () => Promise<Store>> = {
  disk: async () => {
    const folder = await mkdtemp(join(tmpdir(), 'storage-'));
    const files = async () =>
      (await readdir(folder, { recursive: true, withFileTypes: true })).filter((entry) => entry.isFile());
    return {
      storage: new DiskStorage(folder),
      expectNothing: async () => expect(await files()).toEqual([]),
      close: () => rm(folder, { recursive: true }),
    };
  },
  s3: async () => {
    const fake = await startFakeS3();
    return {
      storage: new S3Storage(fake.settings),
      expectNothing: () => fake.expectNothing(),
      close: () => fake.stop(),
    };
  },
};

const bytes = Buffer.from('0123456789');
/** 17 MiB, three parts of an upload, no two MiB alike. */
const long = Buffer.alloc(17 * 2 ** 20, 'seventeen mebibytes');
for (let mebibyte = 0; mebibyte < 17; mebibyte++) long.writeUInt32LE(mebibyte, mebibyte * 2 ** 20);

const sha256 = (content: Uint8Array) => createHash('sha256').update(content).digest('hex');

function pieces(content: Buffer, pieceBytes: number, failure?: Error): Readable {
  function* generate() {
    for (let start = 0; start < content.length; start += pieceBytes)
      yield content.subarray(start, start + pieceBytes);
    if (failure) throw failure;
  }
  return Readable.from(generate());
}

async function listed(storage: Storage, prefix: string): Promise<StoredObject[]> {
  const objects: StoredObject[] = [];
  for await (const object of storage.list(prefix)) objects.push(object);
  return objects.sort((a, b) => (a.key < b.key ? -1 : 1));
}

describe.each(Object.entries(stores))('storage on %s', (_kind, open) => {
  let store: Store;
  let storage: Storage;

  beforeAll(async () => {
    store = await open();
    storage = store.storage;
    await storage.prepare();
  });
  afterAll(() => store.close());

  it('keeps bytes and tells their size and SHA-256', async () => {
    const stored = await storage.put('a/b.bin', pieces(bytes, 4));
    expect(stored).toEqual({ size: 10, sha256: sha256(bytes) });
    expect(await buffer(await storage.read('a/b.bin'))).toEqual(bytes);
    expect(await storage.size('a/b.bin')).toBe(10);
    expect(await storage.exists('a/b.bin')).toBe(true);
  });

  it('reads ranges, cut at the end of the object', async () => {
    await storage.put('a/b.bin', bytes);
    expect(await buffer(await storage.read('a/b.bin', { start: 2, end: 4 }))).toEqual(Buffer.from('234'));
    expect(await buffer(await storage.read('a/b.bin', { start: 10, end: 12 }))).toEqual(Buffer.alloc(0));
    const part = async (start: number, end: number) =>
      Buffer.from(await storage.readBytes('a/b.bin', { start, end })).toString();
    expect(await part(0, 0)).toBe('0');
    expect(await part(8, 99)).toBe('89');
    expect(await part(10, 12)).toBe('');
    expect(await part(5, 4)).toBe('');
    const whole = await storage.readBytes('a/b.bin');
    expect(Buffer.from(whole)).toEqual(bytes);
    expect(whole.byteOffset).toBe(0);
  });

  it('keeps an object of no bytes', async () => {
    expect(await storage.put('empty', Readable.from([]))).toEqual({
      size: 0,
      sha256: sha256(Buffer.alloc(0)),
    });
    expect(await storage.size('empty')).toBe(0);
    expect(await buffer(await storage.read('empty'))).toEqual(Buffer.alloc(0));
    expect(await storage.readBytes('empty')).toHaveLength(0);
  });

  it.each([100_003, 17 * 2 ** 20])('keeps 17 MiB that come in pieces of %i', async (pieceBytes) => {
    expect(await storage.put('long.bin', pieces(long, pieceBytes))).toEqual({
      size: long.length,
      sha256: sha256(long),
    });
    expect(sha256(await buffer(await storage.read('long.bin')))).toBe(sha256(long));
    const range = { start: 8 * 2 ** 20 - 3, end: 8 * 2 ** 20 + 4 };
    const across = Buffer.from(await storage.readBytes('long.bin', range));
    expect(across).toEqual(long.subarray(range.start, range.end + 1));
  });

  it('does not mind a source that writes to its memory again', async () => {
    async function* reusing() {
      const memory = Buffer.alloc(4);
      for (const text of ['0123', '4567']) {
        memory.write(text);
        yield memory;
        await Promise.resolve();
      }
    }
    await storage.put('reused', reusing());
    expect((await buffer(await storage.read('reused'))).toString()).toBe('01234567');
  });

  it('replaces an object', async () => {
    await storage.put('again', bytes);
    await storage.put('again', Buffer.from('new'));
    expect((await buffer(await storage.read('again'))).toString()).toBe('new');
    const staged = await storage.stage(bytes);
    await staged.commit('again');
    expect(await buffer(await storage.read('again'))).toEqual(bytes);
  });

  it('stages without a name, then keeps or drops', async () => {
    const kept = await storage.stage(pieces(long, 2 ** 20));
    expect(kept).toMatchObject({ size: long.length, sha256: sha256(long) });
    const dropped = await storage.stage(bytes);
    expect(await storage.exists('kept/long.bin')).toBe(false);
    await kept.commit('kept/long.bin');
    await kept.discard();
    await dropped.discard();
    expect(sha256(await storage.readBytes('kept/long.bin'))).toBe(sha256(long));
  });

  it('takes over a local file', async () => {
    const folder = await mkdtemp(join(tmpdir(), 'local-'));
    const local = join(folder, 'file');
    await writeFile(local, bytes);
    await storage.putFile('taken/file.bin', local);
    expect(await buffer(await storage.read('taken/file.bin'))).toEqual(bytes);
    await expect(access(local)).rejects.toThrow('ENOENT');
    await rm(folder, { recursive: true });
  });

  it('stages a local file without touching it, then takes it over', async () => {
    const folder = await mkdtemp(join(tmpdir(), 'local-'));
    const local = join(folder, 'file');
    await writeFile(local, long);
    const dropped = await storage.stageFile(local);
    expect(dropped).toMatchObject({ size: long.length, sha256: sha256(long) });
    await dropped.discard();
    expect(sha256(await readFile(local))).toBe(sha256(long));
    const kept = await storage.stageFile(local);
    expect(await storage.exists('taken/long.bin')).toBe(false);
    await kept.commit('taken/long.bin');
    await kept.discard();
    expect(sha256(await storage.readBytes('taken/long.bin'))).toBe(sha256(long));
    expect(await readdir(folder)).toEqual([]);
    await expect(storage.stageFile(local)).rejects.toThrow('ENOENT');
    await rm(folder, { recursive: true });
  });

  it('lists what lies below a prefix, with the time of writing', async () => {
    const before = Date.now();
    for (const key of ['list/a/1', 'list/a/b/2', 'list/c', 'listed/d']) await storage.put(key, bytes);
    const objects = await listed(storage, 'list/');
    expect(objects.map(({ key }) => key)).toEqual(['list/a/1', 'list/a/b/2', 'list/c']);
    for (const { writtenAt } of objects) expect(Math.abs(writtenAt - before)).toBeLessThan(60_000);
    expect(await listed(storage, 'nowhere/')).toEqual([]);
    await expect(listed(storage, 'list')).rejects.toThrow(RangeError);
  });

  it('deletes one object, or all below a prefix, be they more than a thousand', async () => {
    const many = Array.from({ length: 1003 }, (_, index) => `many/${index % 7}/${index}`);
    for (let start = 0; start < many.length; start += 50)
      await Promise.all(many.slice(start, start + 50).map((key) => storage.put(key, bytes)));
    await storage.put('many-more', bytes);
    await storage.delete('many/0/0');
    await storage.delete('many/0/0');
    expect(await listed(storage, 'many/')).toHaveLength(1002);
    await storage.deleteAll('many/');
    expect(await listed(storage, 'many/')).toEqual([]);
    expect(await storage.exists('many-more')).toBe(true);
    await storage.deleteAll('many/');
    await expect(storage.deleteAll('many')).rejects.toThrow(RangeError);
  }, 60_000);

  it('names an object that is missing', async () => {
    await expect(storage.read('none')).rejects.toThrow(StorageObjectMissing);
    await expect(storage.read('none', { start: 0, end: 1 })).rejects.toThrow(StorageObjectMissing);
    await expect(storage.readBytes('none')).rejects.toThrow(StorageObjectMissing);
    await expect(storage.size('none')).rejects.toThrow('none is missing');
    expect(await storage.exists('none')).toBe(false);
  });

  it.each([
    '../x',
    'a/../x',
    '/etc/passwd',
    '.part/x',
    '.staging/x',
    'a//b',
    '',
    'a\\..\\b',
    'a/.hidden',
    'nul\0',
  ])('refuses the key %j', async (key) => {
    await expect(storage.put(key, bytes)).rejects.toThrow(RangeError);
    await expect(storage.read(key)).rejects.toThrow(RangeError);
    await expect(storage.delete(key)).rejects.toThrow(RangeError);
    await expect(storage.deleteAll(`${key}/`)).rejects.toThrow(RangeError);
  });

  it.each([
    ['at once', bytes],
    ['after two parts of an upload', long],
  ])('leaves nothing of a source that fails %s', async (_when, content) => {
    const fresh = await open();
    await fresh.storage.prepare();
    const failing = () => pieces(content, 2 ** 20, new Error('gone'));
    await expect(fresh.storage.put('a/b.bin', failing())).rejects.toThrow('gone');
    await expect(fresh.storage.stage(failing())).rejects.toThrow('gone');
    await fresh.expectNothing();
    const staged = await fresh.storage.stage(content);
    await staged.discard();
    await fresh.expectNothing();
    await fresh.close();
  });
});
