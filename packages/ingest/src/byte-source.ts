/** Pulls bytes from an async iterable with look-ahead; holds no more than what was asked for and one chunk. */
export class ByteSource {
  private readonly iterator: AsyncIterator<Uint8Array>;
  private buffer = new Uint8Array(1 << 17);
  private start = 0;
  private end = 0;
  private pulled = 0;
  private exhausted = false;

  constructor(
    source: AsyncIterable<Uint8Array>,
    private readonly onProgress?: (bytesRead: number) => void,
    private readonly signal?: AbortSignal,
  ) {
    this.iterator = source[Symbol.asyncIterator]();
  }

  /** True when the source has ended and nothing is buffered. */
  get done(): boolean {
    return this.exhausted && this.start === this.end;
  }

  /** True when the source has ended and `bytes` buffered bytes are all that is left. */
  isLast(bytes: number): boolean {
    return this.exhausted && this.end - this.start === bytes;
  }

  /**
   * Returns the next `count` bytes, or fewer at the end of the source, without consuming them. The view is valid
   * until the next call.
   */
  async peek(count: number): Promise<Uint8Array> {
    while (this.end - this.start < count && !this.exhausted) await this.pull();
    return this.buffer.subarray(this.start, Math.min(this.end, this.start + count));
  }

  /** Consumes `count` bytes that were peeked before. */
  consume(count: number): void {
    if (count > this.end - this.start) throw new RangeError('more bytes consumed than peeked');
    this.start += count;
  }

  /** Lets the source go before its end. */
  async close(): Promise<void> {
    if (!this.exhausted) await this.iterator.return?.();
  }

  private async pull(): Promise<void> {
    this.signal?.throwIfAborted();
    const next = await this.iterator.next();
    this.signal?.throwIfAborted();
    if (next.done === true) {
      this.exhausted = true;
      return;
    }
    this.append(next.value);
    this.pulled += next.value.length;
    this.onProgress?.(this.pulled);
  }

  private append(chunk: Uint8Array): void {
    if (this.end + chunk.length > this.buffer.length) {
      const held = this.buffer.subarray(this.start, this.end);
      const needed = held.length + chunk.length;
      // Growing to twice the need keeps one-byte chunks from moving the held bytes each time.
      const target = needed > this.buffer.length / 2 ? new Uint8Array(needed * 2) : this.buffer;
      target.set(held, 0);
      this.buffer = target;
      this.start = 0;
      this.end = held.length;
    }
    this.buffer.set(chunk, this.end);
    this.end += chunk.length;
  }
}
