import { createKernel, type Kernel } from '../wasm/kernel.js';

/** Limits within which samples are calm. */
export interface CalmLimits {
  /** Samples at or above are not calm. */
  top: number;
  /** Samples at or below are not calm. */
  bottom: number;
  /** Nor are samples whose third difference |x_n − 3x_(n−1) + 3x_(n−2) − x_(n−3)| is larger. */
  jump: number;
}

/**
 * Where calm samples end: the first of `from`, `from` + 4, … that begins four samples of which one is not calm, or that
 * has no four samples of the block after it.
 *
 * @param from at least 3
 */
export type CalmUntil = (from: number, limits: CalmLimits) => number;

/** Begins a search in a block of finite samples; only the search begun last can be gone on with. */
export type BeginCalmSearch = (block: Float64Array) => CalmUntil;

const CHUNK = 8192;

/** A search for the rare samples that need a closer look. As compiled code where the platform has it. */
export function createCalmSearch(): BeginCalmSearch {
  const kernel = createKernel();
  return kernel === null ? plainCalmSearch : kernelCalmSearch(kernel);
}

function kernelCalmSearch(kernel: Kernel): BeginCalmSearch {
  const samplesAt = kernel.allocate(CHUNK + 4);
  const samples = kernel.floats(samplesAt, CHUNK + 4);
  return (block) => {
    /** The samples in memory, with three before them. */
    let first = 0;
    let end = 0;
    return (from, { top, bottom, jump }) => {
      let at = from;
      while (at + 4 <= block.length) {
        if (at < first || at + 4 > end) {
          first = at;
          end = Math.min(block.length, at + CHUNK);
          samples.set(block.subarray(first - 3, end));
        }
        const count = (end - at) & ~3;
        const place = samplesAt + 8 * (at - first + 3);
        const calm = kernel.functions.calmSamples(place, count, top, bottom, jump);
        at += calm;
        if (calm < count) return at;
      }
      return at;
    };
  };
}

/** The same in plain TypeScript. */
export function plainCalmSearch(block: Float64Array): CalmUntil {
  return (from, { top, bottom, jump }) => {
    let at = from;
    for (; at + 4 <= block.length; at += 4) {
      for (let i = at; i < at + 4; i++) {
        const x = block[i]!;
        const third = Math.abs(x - block[i - 3]! - 3 * (block[i - 1]! - block[i - 2]!));
        if (!(x < top && x > bottom && third <= jump)) return at;
      }
    }
    return at;
  };
}
