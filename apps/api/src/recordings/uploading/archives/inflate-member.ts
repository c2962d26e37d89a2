import type { ZipFile } from 'yauzl';
import { crc32 } from 'node:zlib';
import { bytesInWords } from '../bytes-in-words.js';
import { maxRatio, ratioCountsFromBytes } from './archive-bounds.js';
import type { Member } from './archive-members.js';
import { MemberRefused } from './member-refused.js';

/** What an archive may still unpack to; shared by its files. */
export class UnpackBudget {
  private spent = 0;

  constructor(readonly limit: number) {}

  /** @throws MemberRefused when so many bytes more are too many */
  demand(bytes: number): void {
    if (this.spent + bytes <= this.limit) return;
    const before = this.spent === 0 ? '' : `${bytesInWords(this.spent)} were unpacked before, and `;
    throw new MemberRefused(
      `${before}it has ${bytesInWords(bytes)} or more; an archive may unpack to ${bytesInWords(this.limit)} in all. Send it on its own or divide the archive`,
    );
  }

  spend(bytes: number): void {
    this.demand(bytes);
    this.spent += bytes;
  }
}

/**
 * Refuses by what the directory tells, before anything is unpacked.
 * @throws MemberRefused
 */
export function demandModest({ entry }: Member, budget: UnpackBudget): void {
  demandRatio(entry.uncompressedSize, entry.compressedSize);
  budget.demand(entry.uncompressedSize);
}

/**
 * The bytes of a file in an archive, inflated as they are taken. What the headers tell is not believed: bytes are counted
 * as they come, and compared with the checksum at the end.
 * @throws MemberRefused for bytes that are too many, broken, or others than the archive tells
 */
export async function* inflated(
  zip: ZipFile,
  { entry }: Member,
  budget: UnpackBudget,
  signal: AbortSignal,
): AsyncGenerator<Uint8Array> {
  let count = 0;
  let checksum = 0;
  const stream = await asRefusal(zip.openReadStreamPromise(entry));
  try {
    const chunks = (stream as AsyncIterable<Buffer>)[Symbol.asyncIterator]();
    for (;;) {
      const next: IteratorResult<Buffer, unknown> = await asRefusal(chunks.next());
      signal.throwIfAborted();
      if (next.done) break;
      const chunk = next.value;
      count += chunk.length;
      checksum = crc32(chunk, checksum);
      budget.spend(chunk.length);
      demandRatio(count, entry.compressedSize);
      yield chunk;
    }
  } finally {
    stream.destroy();
  }
  if (checksum !== entry.crc32)
    throw new MemberRefused('Its bytes do not have the CRC-32 that the archive tells. Pack it anew');
}

/** Faults of a stream from an archive are faults of the archive. */
async function asRefusal<T>(work: Promise<T>): Promise<T> {
  try {
    return await work;
  } catch (error) {
    const why = error instanceof Error ? error.message : String(error);
    throw new MemberRefused(`It cannot be unpacked: ${why}. Pack it anew`);
  }
}

function demandRatio(unpacked: number, packed: number): void {
  if (unpacked <= ratioCountsFromBytes || unpacked <= packed * maxRatio) return;
  throw new MemberRefused(
    `It unpacks to ${bytesInWords(unpacked)} or more from ${bytesInWords(packed)}, over ${maxRatio} times as much: no capture packs so well. Send it unpacked if it is one`,
  );
}
