/*
 * Arithmetic on one number (f64) or on two at once (v128), chosen by the type argument when compiled.
 *
 * A "cell" holds sizeof<T>/8 complex numbers, all real parts first: 16 bytes (re, im) for f64, 32 bytes
 * (re0, re1, im0, im1) for v128.
 */

export function add<T>(a: T, b: T): T {
  if (isVector<T>()) return f64x2.add(a, b);
  else return (a + b) as T;
}

export function sub<T>(a: T, b: T): T {
  if (isVector<T>()) return f64x2.sub(a, b);
  else return a - b;
}

export function mul<T>(a: T, b: T): T {
  if (isVector<T>()) return f64x2.mul(a, b);
  else return a * b;
}

/** One number, the same in all lanes. */
export function all<T>(value: f64): T {
  if (isVector<T>()) return f64x2.splat(value);
  else return value;
}

/** One number of memory, the same in all lanes. */
export function loadAll<T>(address: usize): T {
  if (isVector<T>()) return v128.load_splat<f64>(address);
  else return load<f64>(address);
}
