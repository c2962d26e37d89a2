const HEADER_BYTES = 128;
const MAGIC = [0x93, 0x4e, 0x55, 0x4d, 0x50, 0x59];

/**
 * Header of a one-dimensional little-endian float64 array file of `count` values.
 * Always 128 bytes, so that the count can be rewritten in place once it is known.
 * Format: NumPy enhancement proposal 1 ("A Simple File Format for NumPy Arrays"), version 1.0.
 * @throws RangeError when `count` is not a whole number from 0 to 2^53 - 1
 */
export function encodeNpyHeader(count: number): Uint8Array {
  if (!Number.isSafeInteger(count) || count < 0) throw new RangeError(`not a count of values: ${count}`);
  const text = `{'descr': '<f8', 'fortran_order': False, 'shape': (${count},), }`;
  const header = new Uint8Array(HEADER_BYTES).fill(0x20);
  header.set(MAGIC, 0);
  header.set([1, 0, HEADER_BYTES - 10, 0], 6);
  header.set(new TextEncoder().encode(text), 10);
  header[HEADER_BYTES - 1] = 0x0a;
  return header;
}

/**
 * Reads the header of an .npy file, versions 1.0 to 3.0 of the format.
 * @returns the type string (such as `<f8`), the shape, and the offset of the first value in bytes
 * @throws RangeError when the bytes are no such header or end before it does
 */
export function decodeNpyHeader(bytes: Uint8Array): { dtype: string; shape: number[]; dataOffset: number } {
  if (bytes.length < 12 || MAGIC.some((byte, i) => bytes[i] !== byte)) {
    throw new RangeError('not an .npy header: the magic string is missing');
  }
  const view = new DataView(bytes.buffer, bytes.byteOffset, bytes.byteLength);
  const version = view.getUint8(6);
  if (version < 1 || version > 3) throw new RangeError(`.npy format version ${version} is not known`);
  const textOffset = version === 1 ? 10 : 12;
  const dataOffset = textOffset + (version === 1 ? view.getUint16(8, true) : view.getUint32(8, true));
  if (dataOffset > bytes.length) throw new RangeError('the .npy header is cut short');
  const text = new TextDecoder().decode(bytes.subarray(textOffset, dataOffset));
  const dtype = /'descr'\s*:\s*'([^']+)'/.exec(text)?.[1];
  const shape = /'shape'\s*:\s*\(([^)]*)\)/.exec(text)?.[1];
  if (dtype === undefined || shape === undefined)
    throw new RangeError('the .npy header names no type or shape');
  const sizes = shape.split(',').filter((part) => part.trim() !== '');
  return { dtype, shape: sizes.map(Number), dataOffset };
}
