import { describe, expect, it } from 'vitest';
import { decodeNpyHeader, encodeNpyHeader } from './npy-header.js';

const latin1 = (text: string) => Uint8Array.from(text, (char) => char.charCodeAt(0));

// The first 128 bytes that NumPy 2.4.6 writes for np.save of three float64, and of a 2 x 3 array of float32.
const NUMPY_VECTOR = latin1(
  `\x93NUMPY\x01\x00v\x00${"{'descr': '<f8', 'fortran_order': False, 'shape': (3,), }".padEnd(117)}\n`,
);
const NUMPY_MATRIX = latin1(
  `\x93NUMPY\x01\x00v\x00${"{'descr': '<f4', 'fortran_order': False, 'shape': (2, 3), }".padEnd(117)}\n`,
);

describe('npy header', () => {
  it('is byte for byte that of NumPy', () => {
    expect(encodeNpyHeader(3)).toEqual(NUMPY_VECTOR);
  });

  it('keeps its length whatever the count, so that it can be rewritten in place', () => {
    for (const count of [0, 1, 123456789, Number.MAX_SAFE_INTEGER]) {
      const header = encodeNpyHeader(count);
      expect(header).toHaveLength(128);
      expect(decodeNpyHeader(header)).toEqual({ dtype: '<f8', shape: [count], dataOffset: 128 });
    }
  });

  it('reads what NumPy wrote', () => {
    expect(decodeNpyHeader(NUMPY_MATRIX)).toEqual({ dtype: '<f4', shape: [2, 3], dataOffset: 128 });
  });

  it('throws on what is no header', () => {
    expect(() => decodeNpyHeader(new Uint8Array(128))).toThrow('magic');
    expect(() => decodeNpyHeader(NUMPY_VECTOR.subarray(0, 100))).toThrow('cut short');
    expect(() => encodeNpyHeader(-1)).toThrow(RangeError);
  });
});
