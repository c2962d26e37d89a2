import { createHash } from 'node:crypto';
import { expect, it } from 'vitest';
import { digestBlob } from './file-digest.js';

it('gives the SHA-256 of FIPS 180-4, also over several slices', async () => {
  expect(await digestBlob(new Blob([]))).toBe(
    'e3b0c44298fc1c149afbf4c8996fb92427ae41e4649b934ca495991b7852b855',
  );
  const long = new Uint8Array(2_500_000).map((_, i) => i * 31);
  expect(await digestBlob(new Blob([long]))).toBe(createHash('sha256').update(long).digest('hex'));
});
