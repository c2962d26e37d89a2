/*
 * Spectrum of 2n real numbers from the DFT Z of n complex ones z[i] = x[2i] + j x[2i+1] (Cooley, Lewis, Welch 1970):
 * X_k = E_k + w^k O_k and X_(n−k) = conj(E_k − w^k O_k), w = e^(−j2π/2n), with the even and odd parts of Z. `turns` holds
 * cos and sin of 2πk/2n, all halved; as cells of two for k = 0..n/2 + 1 where n is even, else as pairs for k = 0..(n − 1)/2.
 */

/** n even: `z` are cells of two. Writes k = 0..n to `re` and `im`. */
export function unpackEven(z: usize, n: i32, turns: usize, re: usize, im: usize): void {
  const half = f64x2.splat(0.5);
  const size: usize = n << 4;
  const end: usize = n << 3;
  // Lane 0 of what follows the mirrored pair: Z_n is Z_0.
  let nextRe = v128.load(z);
  let nextIm = v128.load(z, 16);
  for (let at: usize = 0; at <= end / 2; at += 16) {
    const aRe = v128.load(z + 2 * at);
    const aIm = v128.load(z + 2 * at, 16);
    const before = z + size - 32 - 2 * at;
    const lastRe = v128.load(before);
    const lastIm = v128.load(before, 16);
    const bRe = v128.shuffle<f64>(nextRe, lastRe, 0, 3);
    const bIm = v128.shuffle<f64>(nextIm, lastIm, 0, 3);
    nextRe = lastRe;
    nextIm = lastIm;
    const cosine = v128.load(turns + 2 * at);
    const sine = v128.load(turns + 2 * at, 16);
    const evenRe = f64x2.mul(half, f64x2.add(aRe, bRe));
    const evenIm = f64x2.mul(half, f64x2.sub(aIm, bIm));
    const oddRe = f64x2.add(aIm, bIm);
    const oddIm = f64x2.sub(bRe, aRe);
    const turnedRe = f64x2.add(f64x2.mul(cosine, oddRe), f64x2.mul(sine, oddIm));
    const turnedIm = f64x2.sub(f64x2.mul(cosine, oddIm), f64x2.mul(sine, oddRe));
    const mirroredRe = f64x2.sub(evenRe, turnedRe);
    const mirroredIm = f64x2.sub(turnedIm, evenIm);
    v128.store(re + at, f64x2.add(evenRe, turnedRe));
    v128.store(im + at, f64x2.add(evenIm, turnedIm));
    v128.store(re + end - 8 - at, v128.shuffle<f64>(mirroredRe, mirroredRe, 1, 0));
    v128.store(im + end - 8 - at, v128.shuffle<f64>(mirroredIm, mirroredIm, 1, 0));
  }
}

/** n odd: `z` is re, im, … */
export function unpackOdd(z: usize, n: i32, turns: usize, re: usize, im: usize): void {
  store<f64>(re, load<f64>(z) + load<f64>(z, 8));
  store<f64>(im, 0);
  store<f64>(re + (n << 3), load<f64>(z) - load<f64>(z, 8));
  store<f64>(im + (n << 3), 0);
  for (let k = 1; 2 * k < n; k++) {
    const a = z + (k << 4);
    const b = z + ((n - k) << 4);
    const cosine = load<f64>(turns + (k << 4));
    const sine = load<f64>(turns + (k << 4), 8);
    const evenRe = 0.5 * (load<f64>(a) + load<f64>(b));
    const evenIm = 0.5 * (load<f64>(a, 8) - load<f64>(b, 8));
    const oddRe = load<f64>(a, 8) + load<f64>(b, 8);
    const oddIm = load<f64>(b) - load<f64>(a);
    const turnedRe = cosine * oddRe + sine * oddIm;
    const turnedIm = cosine * oddIm - sine * oddRe;
    store<f64>(re + (k << 3), evenRe + turnedRe);
    store<f64>(im + (k << 3), evenIm + turnedIm);
    store<f64>(re + ((n - k) << 3), evenRe - turnedRe);
    store<f64>(im + ((n - k) << 3), turnedIm - evenIm);
  }
}

/** Separates n complex numbers re, im, … into two arrays. */
export function separate(z: usize, count: i32, re: usize, im: usize): void {
  for (let k = 0; k < count; k++) {
    store<f64>(re + (k << 3), load<f64>(z + (k << 4)));
    store<f64>(im + (k << 3), load<f64>(z + (k << 4), 8));
  }
}
