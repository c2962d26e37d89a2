import type { Kernel } from '../wasm/kernel.js';
import { convenientLength, radicesOf } from './radices.js';
import { createUnitTurns, type UnitTurns } from './unit-turns.js';

/** A complex DFT of one length in the memory of a kernel. */
export interface KernelTransform {
  readonly length: number;
  /** Address of the input: `length` complex numbers re, im, …; it stays as it is. */
  readonly source: number;
  /** Transforms; returns the address of the result: cells of two for an even length, re, im, … for an odd one. */
  run(): number;
}

const PASS_FIELDS = 5;

/** Shortest length that the compiled passes take. */
const SHORTEST_KERNEL_LENGTH = 8;
/** A chirp transform of this length fills most of the 4 GiB that a kernel can have. */
const LONGEST_KERNEL_LENGTH = 2 ** 23;

/** Whether `createKernelTransform` takes a length. */
export function isKernelLength(length: number): boolean {
  return length >= SHORTEST_KERNEL_LENGTH && length <= LONGEST_KERNEL_LENGTH;
}

/** Plan of the forward DFT, X_k = Σ x_n e^(−j2πkn/N), unscaled. @param length as `isKernelLength` has it */
export function createKernelTransform(kernel: Kernel, length: number): KernelTransform {
  const source = kernel.allocate(2 * length + 2);
  const radices = radicesOf(length);
  const { transform, chirpTransform } = kernel.functions;
  if (radices !== null) {
    const plan = layPasses(kernel, length, radices);
    return { length, source, run: () => transform(plan, source) };
  }
  const plan = layChirp(kernel, length);
  return { length, source, run: () => chirpTransform(plan, source) };
}

/** Lays a plan of assembly/transform.ts into memory. */
function layPasses(kernel: Kernel, length: number, radices: readonly number[]): number {
  const plan = kernel.allocate((PASS_FIELDS * (radices.length + 1)) / 2 + 1);
  const work = [kernel.allocate(2 * length + 2), kernel.allocate(2 * length + 2)];
  const scratch = kernel.allocate(4 * Math.max(...radices));
  const turns = createUnitTurns(length);
  const fields = [length, radices.length, ...work, scratch];
  let stride = 1;
  for (const radix of radices) {
    const blocks = length / stride / radix;
    const inPairs = stride === 1 && length % 2 === 0;
    const twiddles = inPairs
      ? layPairedTwiddles(kernel, turns, radix, blocks)
      : layTwiddles(kernel, turns, radix, blocks, stride);
    fields.push(radix, stride, blocks, twiddles, radix > 5 ? layTurns(kernel, radix) : 0);
    stride *= radix;
  }
  kernel.integers(plan, fields.length).set(fields);
  return plan;
}

/** w_L^(pj), L = radix·blocks, for p < blocks and j = 1..radix − 1. */
function layTwiddles(
  kernel: Kernel,
  turns: UnitTurns,
  radix: number,
  blocks: number,
  stride: number,
): number {
  const address = kernel.allocate(2 * (radix - 1) * blocks);
  const table = kernel.floats(address, 2 * (radix - 1) * blocks);
  let at = 0;
  for (let p = 0; p < blocks; p++) {
    for (let j = 1; j < radix; j++) {
      table[at++] = turns.cosine(p * j * stride);
      table[at++] = -turns.sine(p * j * stride);
    }
  }
  return address;
}

/** The same as cells of two blocks for a first pass; the last pair holds the last two blocks. */
function layPairedTwiddles(kernel: Kernel, turns: UnitTurns, radix: number, blocks: number): number {
  const pairs = Math.ceil(blocks / 2);
  const address = kernel.allocate(4 * (radix - 1) * pairs);
  const table = kernel.floats(address, 4 * (radix - 1) * pairs);
  let at = 0;
  for (let pair = 0; pair < pairs; pair++) {
    const p = Math.min(2 * pair, blocks - 2);
    for (let j = 1; j < radix; j++) {
      table[at++] = turns.cosine(p * j);
      table[at++] = turns.cosine((p + 1) * j);
      table[at++] = -turns.sine(p * j);
      table[at++] = -turns.sine((p + 1) * j);
    }
  }
  return address;
}

function layTurns(kernel: Kernel, radix: number): number {
  const address = kernel.allocate(2 * radix);
  const table = kernel.floats(address, 2 * radix);
  for (let i = 0; i < radix; i++) {
    table[2 * i] = Math.cos((2 * Math.PI * i) / radix);
    table[2 * i + 1] = Math.sin((2 * Math.PI * i) / radix);
  }
  return address;
}

/** Lays a plan of assembly/chirp.ts into memory. */
function layChirp(kernel: Kernel, length: number): number {
  const size = convenientLength(2 * length - 1);
  const inner = layPasses(kernel, size, radicesOf(size)!);
  const innerSource = kernel.allocate(2 * size);
  const padded = 2 * Math.ceil(length / 2);
  const chirp = kernel.allocate(2 * padded);
  const filter = kernel.allocate(2 * size);
  const out = kernel.allocate(2 * padded);
  const plan = kernel.allocate(4);
  const turns = createUnitTurns(2 * length);
  const chirpCells = kernel.floats(chirp, 2 * padded);
  const taps = kernel.floats(innerSource, 2 * size);
  for (let i = 0; i < length; i++) {
    // i² is reduced modulo 2N, so that the angle keeps its full precision.
    const square = (i * i) % (2 * length);
    const cosine = turns.cosine(square);
    const sine = turns.sine(square);
    const cell = 4 * Math.floor(i / 2) + (i % 2);
    chirpCells[cell] = cosine;
    chirpCells[cell + 2] = -sine;
    for (const place of [i, (size - i) % size]) {
      taps[2 * place] = cosine / size;
      taps[2 * place + 1] = sine / size;
    }
  }
  kernel
    .floats(filter, 2 * size)
    .set(kernel.floats(kernel.functions.transform(inner, innerSource), 2 * size));
  kernel.integers(plan, 7).set([length, size, inner, innerSource, chirp, filter, out]);
  return plan;
}
