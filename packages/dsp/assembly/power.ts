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

/** Puts (samples − mean)·window of `length` samples into every other number from `to`. */
export function windowInto(samples: usize, window: usize, length: i32, mean: f64, to: usize): void {
  for (let i = 0; i < length; i++) {
    store<f64>(to, (load<f64>(samples) - mean) * load<f64>(window));
    samples += 8;
    window += 8;
    to += 16;
  }
}
