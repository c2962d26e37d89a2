import { transform } from './transform';

/*
 * Chirp transform of any length n (L. I. Bluestein, IEEE Trans. Audio Electroacoust. AU-18, 1970) by two transforms of a
 * convenient even length m >= 2n - 1. A plan in memory, 32-bit numbers: n, m, then the addresses of the plan and source
 * of the inner transform, of the chirp e^(−jπi²/n) in cells of two (n rounded up to even), of the spectrum of the
 * conjugate chirp over m in cells, and of room for the result.
 */

/**
 * Forward DFT of the n complex numbers at `source` (re, im, …), followed by one of any value.
 *
 * @returns address of the result: cells of two for an even n, re, im, … for an odd one
 */
export function chirpTransform(plan: usize, source: usize): usize {
  const n = load<i32>(plan);
  const m = load<i32>(plan, 4);
  const inner: usize = load<u32>(plan, 8);
  const innerSource: usize = load<u32>(plan, 12);
  const chirp: usize = load<u32>(plan, 16);
  const filter: usize = load<u32>(plan, 20);
  const out: usize = load<u32>(plan, 24);
  for (let i = 0; i < n; i += 2) {
    const at: usize = i << 4;
    const re = v128.shuffle<f64>(v128.load(source + at), v128.load(source + at, 16), 0, 2);
    const im = v128.shuffle<f64>(v128.load(source + at), v128.load(source + at, 16), 1, 3);
    storePair(innerSource + at, productRe(re, im, chirp + at), productIm(re, im, chirp + at));
  }
  memory.fill(innerSource + (n << 4), 0, (m - n) << 4);
  // The inverse transform is a forward one with real and imaginary parts exchanged before and after.
  const spectrum = transform(inner, innerSource);
  for (let at: usize = 0; at < usize(m << 4); at += 32) {
    const re = v128.load(spectrum + at);
    const im = v128.load(spectrum + at, 16);
    storePair(innerSource + at, productIm(re, im, filter + at), productRe(re, im, filter + at));
  }
  const convolved = transform(inner, innerSource);
  for (let i = 0; i < n; i += 2) {
    const at: usize = i << 4;
    const re = v128.load(convolved + at, 16);
    const im = v128.load(convolved + at);
    const yRe = productRe(re, im, chirp + at);
    const yIm = productIm(re, im, chirp + at);
    if ((n & 1) === 0) {
      v128.store(out + at, yRe);
      v128.store(out + at, yIm, 16);
    } else storePair(out + at, yRe, yIm);
  }
  return out;
}

function productRe(re: v128, im: v128, cell: usize): v128 {
  return f64x2.sub(f64x2.mul(re, v128.load(cell)), f64x2.mul(im, v128.load(cell, 16)));
}

function productIm(re: v128, im: v128, cell: usize): v128 {
  return f64x2.add(f64x2.mul(re, v128.load(cell, 16)), f64x2.mul(im, v128.load(cell)));
}

/** Two complex numbers as re, im, re, im. */
function storePair(address: usize, re: v128, im: v128): void {
  v128.store(address, v128.shuffle<f64>(re, im, 0, 2));
  v128.store(address, v128.shuffle<f64>(re, im, 1, 3), 16);
}
