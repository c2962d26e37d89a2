import { expect, it } from 'vitest';
import { readWhole } from './read-whole.js';

it('asks for less than 2^31 bytes at a time, which is all that one read may', async () => {
  const asked: { offset: number; length: number; position: number }[] = [];
  const file = {
    read: (buffer: Uint8Array, offset: number, length: number, position: number) => {
      asked.push({ offset, length, position });
      return Promise.resolve({ bytesRead: length, buffer });
    },
  };
  // Never written to, so the memory stays unused.
  const bytes = new Uint8Array(2 ** 31 + 8);
  await readWhole(file as unknown as Parameters<typeof readWhole>[0], bytes, 128);
  expect(asked).toEqual([
    { offset: 0, length: 2 ** 30, position: 128 },
    { offset: 2 ** 30, length: 2 ** 30, position: 2 ** 30 + 128 },
    { offset: 2 ** 31, length: 8, position: 2 ** 31 + 128 },
  ]);
});
