import { decodeBase64 } from './base64.js';
import { kernelBinary } from './kernel-binary.js';

/** Functions of assembly/index.ts; addresses are in bytes. */
export interface KernelFunctions {
  transform: (plan: number, source: number) => number;
  chirpTransform: (plan: number, source: number) => number;
  unpackEven: (z: number, n: number, turns: number, re: number, im: number) => void;
  unpackOdd: (z: number, n: number, turns: number, re: number, im: number) => void;
  separate: (z: number, count: number, re: number, im: number) => void;
  addPowerEven: (z: number, length: number, sum: number) => void;
  addPowerOdd: (z: number, length: number, sum: number) => void;
  pairSegments: (
    a: number,
    b: number,
    window: number,
    length: number,
    meanA: number,
    meanB: number,
    to: number,
  ) => void;
  mean: (from: number, length: number) => number;
  sumBlock: (x: number, count: number, shift: number, out: number) => void;
  demodulate: (x: number, cosine: number, sine: number, count: number, out: number) => void;
  calmSamples: (x: number, count: number, top: number, bottom: number, jump: number) => number;
  weigh: (x: number, weights: number, count: number, out: number) => void;
  decimate: (
    x: number,
    factor: number,
    taps: number,
    tapCount: number,
    weights: number,
    count: number,
    out: number,
  ) => void;
  lineRms: (cosine: number, sine: number, count: number, rms: number) => void;
  meanSquare: (x: number, count: number) => number;
  mirror: (re: number, im: number, count: number, step: number) => void;
  gatherLines: (
    re: number,
    im: number,
    starts: number,
    weights: number,
    taps: number,
    factors: number,
    count: number,
    cosine: number,
    sine: number,
  ) => void;
  fitOrders: (
    lines: number,
    cycles: number,
    orders: number,
    doubling: number,
    factor: number,
    fitted: number,
  ) => void;
  addColumns: (columns: number, factors: number, count: number, rows: number, target: number) => void;
  addOrders: (lines: number, cycles: number, count: number, factor: number, orders: number) => void;
  foldBlock: (x: number, half: number, out: number) => void;
  projectBlock: (folded: number, half: number, table: number, count: number, out: number) => void;
  projectTimedBlock: (folded: number, half: number, table: number, count: number, out: number) => void;
}

/** One instance of the compiled kernels with a memory of its own, which lives as long as its plan. */
export interface Kernel {
  readonly functions: KernelFunctions;
  /** Takes room for `count` numbers of 8 bytes, zeroed, 16-byte aligned; returns its address. Never given back. */
  allocate(count: number): number;
  /** View of memory. It is void after the next `allocate`. */
  floats(address: number, count: number): Float64Array;
  integers(address: number, count: number): Uint32Array;
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
/** Addresses below are left unused, so that 0 is no address. */
const FIRST_ADDRESS = 1024;

let compiled: object | null | undefined;

/** A fresh instance; null where WebAssembly or its SIMD is missing or forbidden (content security policy). */
export function createKernel(): Kernel | null {
  compiled = compiled === undefined ? compile() : compiled;
  if (compiled === null || typeof WebAssembly === 'undefined') return null;
  const { exports } = new WebAssembly.Instance(compiled);
  const { memory } = exports;
  let end = FIRST_ADDRESS;
  return {
    functions: exports,
    allocate(count) {
      const address = end;
      end += 16 * Math.ceil(count / 2);
      const missing = Math.ceil((end - memory.buffer.byteLength) / PAGE_BYTES);
      if (missing > 0) memory.grow(missing);
      return address;
    },
    floats: (address, count) => new Float64Array(memory.buffer, address, count),
    integers: (address, count) => new Uint32Array(memory.buffer, address, count),
  };
}

function compile(): object | null {
  if (typeof WebAssembly === 'undefined') return null;
  const bytes = decodeBase64(kernelBinary);
  if (!WebAssembly.validate(bytes)) return null;
  try {
    return new WebAssembly.Module(bytes);
  } catch {
    // A content security policy without 'wasm-unsafe-eval' refuses it; the plain path serves then.
    return null;
  }
}
