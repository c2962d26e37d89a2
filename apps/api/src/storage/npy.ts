import { decodeNpyHeader, encodeNpyHeader } from '@overtally/ingest';
import { Readable } from 'node:stream';
import type { Storage } from './storage.js';

/** Bytes before the first value; the header that is written always has this length. */
export const headerBytes = 128;
const valueBytes = 8;

/** Stores `values` as a one-dimensional .npy file of little-endian float64. */
export async function putNpy(storage: Storage, key: string, values: Float64Array): Promise<void> {
  await storage.put(key, Readable.from([encodeNpyHeader(values.length), asBytes(values)]));
}

/** Reads values `from` up to but not including `to` of an array that `putNpy` or the reader stored. */
export async function readNpy(
  storage: Storage,
  key: string,
  from: number,
  to: number,
): Promise<Float64Array> {
  if (to <= from) return new Float64Array(0);
  const start = headerBytes + from * valueBytes;
  const bytes = await storage.readBytes(key, { start, end: headerBytes + to * valueBytes - 1 });
  if (bytes.length !== (to - from) * valueBytes) throw new Error(`The stored array ${key} ends early`);
  return new Float64Array(bytes.buffer, bytes.byteOffset, to - from);
}

/** Count of values in the array at `key`. */
export async function npyCount(storage: Storage, key: string): Promise<number> {
  const { shape } = decodeNpyHeader(await storage.readBytes(key, { start: 0, end: headerBytes - 1 }));
  return shape[0] ?? 0;
}

/** The memory of `values` as bytes, without copying. */
export function asBytes(values: Float64Array): Uint8Array {
  return new Uint8Array(values.buffer, values.byteOffset, values.byteLength);
}
