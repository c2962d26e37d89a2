/**
 * Takes the beginning of bytes on their way.
 * @returns the first `headBytes` or a little more, fewer where there are no more; and all bytes from the first on
 */
export async function peeked(
  source: AsyncGenerator<Uint8Array>,
  headBytes: number,
): Promise<{ head: Uint8Array; whole: AsyncGenerator<Uint8Array> }> {
  const chunks: Uint8Array[] = [];
  let count = 0;
  while (count < headBytes) {
    const next: IteratorResult<Uint8Array, unknown> = await source.next();
    if (next.done) break;
    chunks.push(Buffer.from(next.value));
    count += next.value.length;
  }
  async function* whole() {
    try {
      yield* chunks;
      yield* source;
    } finally {
      await source.return(undefined);
    }
  }
  return { head: Buffer.concat(chunks), whole: whole() };
}
