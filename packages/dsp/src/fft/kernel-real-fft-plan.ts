import type { Kernel } from '../wasm/kernel.js';
import { createKernelTransform, isKernelLength } from './kernel-transform.js';
import type { RealFftPlan } from './real-fft-plan.js';
import { createUnitTurns } from './unit-turns.js';

/** Whether `createKernelRealFftPlan` takes a length. */
export function isKernelRealLength(length: number): boolean {
  return isKernelLength(length % 2 === 0 ? length / 2 : length);
}

/** The transform of `createRealFftPlan` as compiled code; the kernel belongs to the plan. */
export function createKernelRealFftPlan(kernel: Kernel, length: number): RealFftPlan {
  const lineCount = Math.floor(length / 2) + 1;
  const spectrum = { re: kernel.allocate(lineCount + 1), im: kernel.allocate(lineCount + 1) };
  const run = length % 2 === 0 ? runEven(kernel, length, spectrum) : runOdd(kernel, length, spectrum);
  const reView = kernel.floats(spectrum.re, lineCount);
  const imView = kernel.floats(spectrum.im, lineCount);
  return {
    length,
    lineCount,
    forward(samples, re, im, offset = 0) {
      run(samples.subarray(offset, offset + length));
      re.set(reView);
      im.set(imView);
    },
  };
}

interface SpectrumAddresses {
  re: number;
  im: number;
}

type Run = (samples: Float64Array) => void;

/** One complex transform of half the length (Cooley, Lewis, Welch 1970). */
function runEven(kernel: Kernel, length: number, { re, im }: SpectrumAddresses): Run {
  const half = length / 2;
  const transform = createKernelTransform(kernel, half);
  const turns = layHalfTurns(kernel, length);
  const source = kernel.floats(transform.source, length);
  const { unpackEven, unpackOdd } = kernel.functions;
  const unpack = half % 2 === 0 ? unpackEven : unpackOdd;
  return (samples) => {
    source.set(samples);
    unpack(transform.run(), half, turns, re, im);
  };
}

/** cos and sin of 2πk/length, halved, for assembly/real-spectrum.ts. */
export function layHalfTurns(kernel: Kernel, length: number): number {
  const half = length / 2;
  const inCells = half % 2 === 0;
  const count = Math.floor(half / 2) + 2;
  const address = kernel.allocate(2 * count + 2);
  const table = kernel.floats(address, 2 * count + 2);
  const turns = createUnitTurns(length);
  for (let k = 0; k < count; k++) {
    const at = inCells ? 4 * Math.floor(k / 2) + (k % 2) : 2 * k;
    table[at] = turns.cosine(k) / 2;
    table[at + (inCells ? 2 : 1)] = turns.sine(k) / 2;
  }
  return address;
}

function runOdd(kernel: Kernel, length: number, { re, im }: SpectrumAddresses): Run {
  const transform = createKernelTransform(kernel, length);
  const source = kernel.floats(transform.source, 2 * length);
  const { separate } = kernel.functions;
  return (samples) => {
    for (let i = 0; i < length; i++) source[2 * i] = samples[i]!;
    separate(transform.run(), (length + 1) / 2, re, im);
  };
}
