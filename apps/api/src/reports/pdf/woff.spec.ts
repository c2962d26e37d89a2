import { readFileSync } from 'node:fs';
import { createRequire } from 'node:module';
import { describe, expect, it } from 'vitest';
import { unpackWoff } from './woff.js';

const require = createRequire(import.meta.url);
const read = (file: string): Buffer => readFileSync(require.resolve(file));

/** Sum of a table's 32-bit words, as the OpenType specification 1.9.1, "Calculating checksums", defines it. */
function checksumOf(table: Buffer): number {
  const whole = Buffer.concat([table], Math.ceil(table.length / 4) * 4);
  let sum = 0;
  for (let at = 0; at < whole.length; at += 4) sum = (sum + whole.readUInt32BE(at)) >>> 0;
  return sum;
}

describe('a font unpacked from WOFF', () => {
  it.each([
    '@ibm/plex-sans/fonts/complete/woff/IBMPlexSans-Regular.woff',
    '@ibm/plex-mono/fonts/complete/woff/IBMPlexMono-SemiBold.woff',
  ])('has every table of %s whole: the checksums in the file are those of the bytes', (file) => {
    const woff = read(file);
    const font = unpackWoff(woff);
    expect(font.length).toBe(woff.readUInt32BE(16));
    for (let index = 0; index < font.readUInt16BE(4); index += 1) {
      const entry = 12 + index * 16;
      const table = Buffer.from(
        font.subarray(font.readUInt32BE(entry + 8)).subarray(0, font.readUInt32BE(entry + 12)),
      );
      // The head table holds a checksum of the whole file, which its own checksum leaves out.
      if (font.toString('latin1', entry, entry + 4) === 'head') table.writeUInt32BE(0, 8);
      expect(checksumOf(table)).toBe(font.readUInt32BE(entry + 4));
    }
  });

  it('refuses other bytes', () => {
    expect(() => unpackWoff(Buffer.from('OTTO'))).toThrow('WOFF');
  });
});
