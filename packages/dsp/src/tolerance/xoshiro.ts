/** Source of numbers from 0 to 1, 1 left out; the same for the same seed. */
export interface RandomSource {
  /** Whole number from 0 to 2^32 − 1. */
  nextWord: () => number;
  /** From 0 up to but not including 1, in steps of 2^−53. */
  uniform: () => number;
  /** Mean 0 and standard deviation 1, by the polar method of G. Marsaglia (SIAM Review 6, 1964). */
  normal: () => number;
}

const LOW_64 = (1n << 64n) - 1n;

/**
 * Generator xoshiro128** (D. Blackman and S. Vigna, Scrambled Linear Pseudorandom Number Generators, ACM Trans. Math.
 * Softw. 47, 2021), period 2^128 − 1, its state filled by SplitMix64 from the seed as its authors recommend.
 *
 * @param seed any whole number; the lowest 64 bits count
 */
export function seededSource(seed: number): RandomSource {
  const first = splitMix64(BigInt(Math.trunc(seed)) & LOW_64);
  const words = [first.next(), first.next()].flatMap((x) => [Number(x & 0xffffffffn), Number(x >> 32n)]);
  return xoshiro128(words as [number, number, number, number]);
}

/** The generator from a state of four words of 32 bits that are not all zero. */
export function xoshiro128(state: readonly [number, number, number, number]): RandomSource {
  let [a, b, c, d] = state;
  const nextWord = () => {
    const result = Math.imul(rotated(Math.imul(b, 5), 7), 9) >>> 0;
    const shifted = b << 9;
    c ^= a;
    d ^= b;
    b ^= c;
    a ^= d;
    c ^= shifted;
    d = rotated(d, 11);
    return result;
  };
  const uniform = () => {
    const high = nextWord() >>> 5;
    return (high * 2 ** 26 + (nextWord() >>> 6)) / 2 ** 53;
  };
  let spare: number | null = null;
  const normal = () => {
    if (spare !== null) {
      const kept = spare;
      spare = null;
      return kept;
    }
    for (;;) {
      const x = 2 * uniform() - 1;
      const y = 2 * uniform() - 1;
      const square = x * x + y * y;
      if (square >= 1 || square === 0) continue;
      const scale = Math.sqrt((-2 * Math.log(square)) / square);
      spare = y * scale;
      return x * scale;
    }
  };
  return { nextWord, uniform, normal };
}

function rotated(x: number, by: number): number {
  return (x << by) | (x >>> (32 - by));
}

/** SplitMix64 (G. L. Steele, D. Lea and C. H. Flood, OOPSLA 2014). */
export function splitMix64(seed: bigint): { next: () => bigint } {
  let state = seed & LOW_64;
  return {
    next: () => {
      state = (state + 0x9e3779b97f4a7c15n) & LOW_64;
      let z = state;
      z = ((z ^ (z >> 30n)) * 0xbf58476d1ce4e5b9n) & LOW_64;
      z = ((z ^ (z >> 27n)) * 0x94d049bb133111ebn) & LOW_64;
      return z ^ (z >> 31n);
    },
  };
}
