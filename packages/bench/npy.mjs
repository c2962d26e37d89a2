/** Reads one-dimensional NumPy files of float64. */
import { closeSync, fstatSync, openSync, readSync } from 'node:fs';

const PREFIX_BYTES = 10;
const MOST_BYTES_AT_ONCE = 2 ** 28;

/**
 * @param {string} path
 * @returns {Float64Array} in shared memory, so that threads can read it
 */
export function readShared(path) {
  const file = openSync(path, 'r');
  try {
    const prefix = new DataView(new ArrayBuffer(PREFIX_BYTES));
    readSync(file, prefix, 0, PREFIX_BYTES, 0);
    const headerEnd = PREFIX_BYTES + prefix.getUint16(8, true);
    const bytes = new Uint8Array(new SharedArrayBuffer(fstatSync(file).size - headerEnd));
    for (let at = 0; at < bytes.length;) {
      at += readSync(file, bytes, at, Math.min(MOST_BYTES_AT_ONCE, bytes.length - at), headerEnd + at);
    }
    return new Float64Array(bytes.buffer);
  } finally {
    closeSync(file);
  }
}
