import { createKernel, type Kernel } from '../wasm/kernel.js';

/** Sums over a block of samples, in the unit of the samples. */
export interface BlockSums {
  /** Σ(x − shift) */
  away: number;
  /** Σ(x − shift)² */
  squares: number;
  /** Σ|x| */
  absolute: number;
  /** Infinity for a block without finite samples. */
  lowest: number;
  highest: number;
  /** Samples that are NaN or infinite. They make the sums so, and count for no extreme if they are NaN. */
  notFinite: number;
}

/** @param shift a value near the mean, so that the squares lose no digits to a large DC component */
export type SumBlock = (block: Float64Array, shift: number) => BlockSums;

/** Samples that are summed at a time; such partial sums are then added up. */
const CHUNK = 8192;

/** One pass over a block for mean, rms, mean magnitude and extremes. As compiled code where the platform has it. */
export function createBlockSums(): SumBlock {
  const kernel = createKernel();
  const sumChunk = kernel === null ? plainBlockSums : kernelBlockSums(kernel);
  return (block, shift) => {
    const total = emptySums();
    for (let from = 0; from < block.length; from += CHUNK) {
      const sums = sumChunk(block.subarray(from, Math.min(block.length, from + CHUNK)), shift);
      total.away += sums.away;
      total.squares += sums.squares;
      total.absolute += sums.absolute;
      total.lowest = Math.min(total.lowest, sums.lowest);
      total.highest = Math.max(total.highest, sums.highest);
      total.notFinite += sums.notFinite;
    }
    return total;
  };
}

function emptySums(): BlockSums {
  return { away: 0, squares: 0, absolute: 0, lowest: Infinity, highest: -Infinity, notFinite: 0 };
}

/** For blocks of at most `CHUNK` samples. */
function kernelBlockSums(kernel: Kernel): SumBlock {
  const samplesAt = kernel.allocate(CHUNK);
  const outAt = kernel.allocate(6);
  const samples = kernel.floats(samplesAt, CHUNK);
  const out = kernel.floats(outAt, 6);
  return (block, shift) => {
    samples.set(block);
    kernel.functions.sumBlock(samplesAt, block.length, shift, outAt);
    return {
      ...{ away: out[0]!, squares: out[1]!, absolute: out[2]! },
      ...{ lowest: out[3]!, highest: out[4]!, notFinite: out[5]! },
    };
  };
}

/** The same in plain TypeScript. */
export function plainBlockSums(block: Float64Array, shift: number): BlockSums {
  const sums = emptySums();
  for (let i = 0; i < block.length; i++) {
    const x = block[i]!;
    const away = x - shift;
    sums.away += away;
    sums.squares += away * away;
    sums.absolute += Math.abs(x);
    if (x < sums.lowest) sums.lowest = x;
    if (x > sums.highest) sums.highest = x;
    if (!Number.isFinite(x)) sums.notFinite++;
  }
  return sums;
}
