import { createHash } from 'node:crypto';
import { createReadStream } from 'node:fs';

/**
 * Reads a local file once.
 * @returns its bytes and their SHA-256, 64 lower-case hexadecimal digits
 */
export async function hashFile(path: string): Promise<{ size: number; sha256: string }> {
  const hash = createHash('sha256');
  let size = 0;
  for await (const chunk of createReadStream(path, { highWaterMark: 2 ** 20 }) as AsyncIterable<Buffer>) {
    hash.update(chunk);
    size += chunk.length;
  }
  return { size, sha256: hash.digest('hex') };
}
