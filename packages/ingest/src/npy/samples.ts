import type { CodeRange } from '../types.js';
import type { NpyType } from './header.js';

type ReadOne = (view: DataView, offset: number) => number;

function reader({ kind, bytes, littleEndian }: NpyType): ReadOne {
  if (kind === 'f') {
    return bytes === 4
      ? (view, p) => view.getFloat32(p, littleEndian)
      : (view, p) => view.getFloat64(p, littleEndian);
  }
  if (bytes === 8) return (view, p) => Number(view.getBigInt64(p, littleEndian));
  const signed = kind === 'i';
  if (bytes === 1) return signed ? (view, p) => view.getInt8(p) : (view, p) => view.getUint8(p);
  if (bytes === 2) {
    return signed
      ? (view, p) => view.getInt16(p, littleEndian)
      : (view, p) => view.getUint16(p, littleEndian);
  }
  return signed ? (view, p) => view.getInt32(p, littleEndian) : (view, p) => view.getUint32(p, littleEndian);
}

/** Decodes `frames` numbers of a type that begin at `from` and lie `stride` bytes apart. */
export type Decoder = (
  bytes: Uint8Array,
  from: number,
  stride: number,
  frames: number,
  out: Float64Array,
) => void;

/** Decoder of a type. Numbers stay as they are; integers of 64 bits beyond 2^53 are rounded to the nearest double. */
export function decoderOf(type: NpyType): Decoder {
  const readOne = reader(type);
  return (bytes, from, stride, frames, out) => {
    const view = new DataView(bytes.buffer, bytes.byteOffset, bytes.byteLength);
    for (let i = 0, p = from; i < frames; i += 1, p += stride) out[i] = readOne(view, p);
  };
}

/** Lowest and highest number of an integer type of up to 32 bits, null for the others. */
export function codeRange({ kind, bytes }: NpyType): CodeRange | null {
  if (kind === 'f' || bytes === 8) return null;
  const codes = 2 ** (8 * bytes);
  return kind === 'u' ? { lowest: 0, highest: codes - 1 } : { lowest: -codes / 2, highest: codes / 2 - 1 };
}
