import { kernelBinary } from './kernel-binary.js';

/** Functions of assembly/index.ts; addresses are in bytes. */
export interface KernelFunctions {
  parseRows: (plan: number, from: number, end: number, filled: number, limit: number) => number;
  decode8: DecodeCodes;
  decode16: DecodeCodes;
  decode24: DecodeCodes;
  decode32: DecodeCodes;
}

type DecodeCodes = (from: number, stride: number, count: number, to: number) => void;

/** An instance of the compiled kernels with a memory of its own, which never grows: views of it stay valid. */
export interface Kernel {
  readonly functions: KernelFunctions;
  readonly buffer: ArrayBuffer;
  /** Takes room for `bytes` bytes, zeroed, 16-byte aligned; returns its address. */
  allocate(bytes: number): number;
}

interface Instance {
  exports: KernelFunctions & { memory: { buffer: ArrayBuffer; grow(pages: number): number } };
}

/** The part of the WebAssembly JavaScript interface that is used here. */
declare const WebAssembly:
  | {
      validate(bytes: Uint8Array): boolean;
      Module: new (bytes: Uint8Array) => object;
      Instance: new (module: object) => Instance;
    }
  | undefined;

const PAGE_BYTES = 65_536;

let compiled: object | null | undefined;

/**
 * A fresh instance with room for `rooms` of so many bytes each; null where WebAssembly or its SIMD is missing or
 * forbidden.
 */
export function createKernel(rooms: number[]): Kernel | null {
  compiled = compiled === undefined ? compile() : compiled;
  if (compiled === null || typeof WebAssembly === 'undefined') return null;
  const { exports: functions } = new WebAssembly.Instance(compiled);
  // The first page holds the tables of the kernels.
  let end = PAGE_BYTES;
  const needed = rooms.reduce((sum, bytes) => sum + aligned(bytes), end);
  functions.memory.grow(Math.ceil((needed - functions.memory.buffer.byteLength) / PAGE_BYTES));
  return {
    functions,
    buffer: functions.memory.buffer,
    allocate(bytes) {
      const address = end;
      end += aligned(bytes);
      return address;
    },
  };
}

const aligned = (bytes: number) => 16 * Math.ceil(bytes / 16);

function compile(): object | null {
  if (typeof WebAssembly === 'undefined') return null;
  const bytes = Uint8Array.from(atob(kernelBinary), (letter) => letter.charCodeAt(0));
  if (!WebAssembly.validate(bytes)) return null;
  try {
    return new WebAssembly.Module(bytes);
  } catch {
    // A content security policy without 'wasm-unsafe-eval' refuses it; the plain path serves then.
    return null;
  }
}
