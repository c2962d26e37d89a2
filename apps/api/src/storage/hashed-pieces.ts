import { createHash } from 'node:crypto';
import type { ByteInput } from './storage.js';

const pieceBytes = 2 ** 20;

/** Bytes on their way, with their count and SHA-256 so far. */
export class HashedPieces {
  private readonly hash = createHash('sha256');
  private count = 0;

  constructor(private readonly source: ByteInput) {}

  /** The bytes in pieces of at most 1 MiB, each a copy: the source may write to its own memory again. */
  async *pieces(): AsyncGenerator<Buffer> {
    for await (const chunk of this.source instanceof Uint8Array ? [this.source] : this.source) {
      for (let start = 0; start < chunk.length; start += pieceBytes) {
        const piece = Buffer.from(chunk.subarray(start, start + pieceBytes));
        this.hash.update(piece);
        this.count += piece.length;
        yield piece;
      }
    }
  }

  /** Of what has passed; to be called once. */
  result(): { size: number; sha256: string } {
    return { size: this.count, sha256: this.hash.digest('hex') };
  }
}
