/**
 * Memory of the typed arrays in plain data, each once, so that it can be handed to another thread instead of copied. An
 * array that is a part of a larger memory, or lies in memory that threads share, is left to be copied.
 */
export function arrayMemory(value: unknown, found = new Set<ArrayBuffer>()): ArrayBuffer[] {
  if (ArrayBuffer.isView(value)) {
    const { buffer, byteLength } = value;
    if (buffer instanceof ArrayBuffer && buffer.byteLength === byteLength) found.add(buffer);
  } else if (typeof value === 'object' && value !== null) {
    for (const part of Object.values(value)) arrayMemory(part, found);
  }
  return [...found];
}
