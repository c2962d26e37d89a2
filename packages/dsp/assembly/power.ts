import { add, mul } from './lanes';

/*
 * Two real segments a and b ride in one complex transform, z = a + jb: |A_k|² + |B_k|² = (|Z_k|² + |Z_(N−k)|²)/2.
 */

/** Adds |Z_k|² of cells of two (length even) to `sum`. */
export function addPowerEven(z: usize, length: i32, sum: usize): void {
  addPower<v128>(z, length, sum);
}

/** Adds |Z_k|² of re, im, … to `sum`. */
export function addPowerOdd(z: usize, length: i32, sum: usize): void {
  addPower<f64>(z, length, sum);
}

function addPower<T>(z: usize, length: i32, sum: usize): void {
  for (const end = sum + (length << 3); sum < end; sum += sizeof<T>()) {
    const re = load<T>(z);
    const im = load<T>(z, sizeof<T>());
    store<T>(sum, add<T>(load<T>(sum), add<T>(mul<T>(re, re), mul<T>(im, im))));
    z += 2 * sizeof<T>();
  }
}

/**
 * Puts (a − meanA)·window + j (b − meanB)·window as re, im, … to `to`. An odd length reads and writes one number more.
 */
export function pairSegments(
  a: usize,
  b: usize,
  window: usize,
  length: i32,
  meanA: f64,
  meanB: f64,
  to: usize,
): void {
  for (let i = 0; i < length; i += 2) {
    const at: usize = i << 3;
    const w = v128.load(window + at);
    const re = f64x2.mul(w, f64x2.sub(v128.load(a + at), f64x2.splat(meanA)));
    const im = f64x2.mul(w, f64x2.sub(v128.load(b + at), f64x2.splat(meanB)));
    v128.store(to + 2 * at, v128.shuffle<f64>(re, im, 0, 2));
    v128.store(to + 2 * at, v128.shuffle<f64>(re, im, 1, 3), 16);
  }
}

/** Mean of `length` numbers. */
export function mean(from: usize, length: i32): f64 {
  let sums = f64x2.splat(0);
  const pairs: usize = length >> 1;
  for (let i: usize = 0; i < pairs; i++) sums = f64x2.add(sums, v128.load(from + (i << 4)));
  const rest = (length & 1) === 1 ? load<f64>(from + ((length - 1) << 3)) : 0;
  return (f64x2.extract_lane(sums, 0) + f64x2.extract_lane(sums, 1) + rest) / length;
}
