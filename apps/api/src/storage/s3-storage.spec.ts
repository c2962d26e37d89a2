import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { startFakeS3 } from '../../test/support/fake-s3.js';
import { S3Storage } from './s3-storage.js';

let fake: Awaited<ReturnType<typeof startFakeS3>>;
beforeEach(async () => {
  fake = await startFakeS3();
});
afterEach(() => fake.stop());

describe('storage in a bucket', () => {
  it('says at start that the bucket is not there', async () => {
    const storage = new S3Storage({ ...fake.settings, bucket: 'elsewhere' });
    await expect(storage.prepare()).rejects.toThrow(
      `The bucket elsewhere at ${fake.settings.endpoint} cannot be used: it does not exist`,
    );
  });

  it('says at start that the store cannot be reached', async () => {
    // Port 9 (discard) of the own machine: nobody listens there.
    const storage = new S3Storage({ ...fake.settings, endpoint: 'http://127.0.0.1:9' });
    await expect(storage.prepare()).rejects.toThrow(
      /^The bucket captures at http:\/\/127\.0\.0\.1:9 cannot be used: .*ECONNREFUSED.*S3_ENDPOINT$/,
    );
  });

  it('stages under a name that no key can have, and leaves the copy alone after commit', async () => {
    const storage = new S3Storage(fake.settings);
    const staged = await storage.stage(Buffer.from('bytes'));
    expect(await fake.keys()).toEqual([expect.stringMatching(/^\.staging\/[0-9a-f-]{36}$/)]);
    await staged.commit('kept.bin');
    expect(await fake.keys()).toEqual(['kept.bin']);
  });

  it('clears what an interrupted process staged a day ago, and nothing younger or named', async () => {
    const storage = new S3Storage(fake.settings);
    await storage.put('kept.bin', Buffer.from('bytes'));
    await storage.stage(Buffer.from('bytes'));
    const dayMs = 24 * 3600 * 1000;
    await storage.prepare(Date.now() + dayMs - 60_000);
    expect(await fake.keys()).toHaveLength(2);
    await storage.prepare(Date.now() + dayMs + 60_000);
    expect(await fake.keys()).toEqual(['kept.bin']);
  });
});
