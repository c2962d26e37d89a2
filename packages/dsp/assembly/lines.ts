/*
 * The DFT of a window at frequencies between its own lines: the samples are decimated by a low-pass filter, weighted and
 * transformed (real-spectrum.ts), then each line is gathered from its neighbours (see src/lines/line-frame.ts).
 */

/** out[i] = weights[i]·x[i] */
export function weigh(x: usize, weights: usize, count: i32, out: usize): void {
  for (let i = 0; i + 1 < count; i += 2) {
    const at: usize = i << 3;
    v128.store(out + at, f64x2.mul(v128.load(x + at), v128.load(weights + at)));
  }
  const last: usize = (count - 1) << 3;
  if ((count & 1) === 1) store<f64>(out + last, load<f64>(x + last) * load<f64>(weights + last));
}

/** out[i] = weights[i]·Σ_k taps[k] x[factor·i + k]. @param tapCount an even number */
export function decimate(
  x: usize,
  factor: i32,
  taps: usize,
  tapCount: i32,
  weights: usize,
  count: i32,
  out: usize,
): void {
  const hop: usize = factor << 3;
  const tapsEnd = taps + (tapCount << 3);
  const end = out + (count << 3);
  for (const tiled = out + ((count & ~3) << 3); out < tiled; out += 32) {
    let a = f64x2.splat(0);
    let b = a;
    let c = a;
    let d = a;
    let at = x;
    for (let tap = taps; tap < tapsEnd; tap += 16) {
      const h = v128.load(tap);
      const at2 = at + 2 * hop;
      a = f64x2.add(a, f64x2.mul(h, v128.load(at)));
      b = f64x2.add(b, f64x2.mul(h, v128.load(at + hop)));
      c = f64x2.add(c, f64x2.mul(h, v128.load(at2)));
      d = f64x2.add(d, f64x2.mul(h, v128.load(at2 + hop)));
      at += 16;
    }
    v128.store(out, f64x2.mul(v128.load(weights), sumsOf(a, b)));
    v128.store(out, f64x2.mul(v128.load(weights, 16), sumsOf(c, d)), 16);
    x += 4 * hop;
    weights += 32;
  }
  for (; out < end; out += 8) {
    let a = f64x2.splat(0);
    let at = x;
    for (let tap = taps; tap < tapsEnd; tap += 16) {
      a = f64x2.add(a, f64x2.mul(v128.load(tap), v128.load(at)));
      at += 16;
    }
    store<f64>(out, load<f64>(weights) * f64x2.extract_lane(sumsOf(a, a), 0));
    x += hop;
    weights += 8;
  }
}

/** The sum of the lanes of each. */
function sumsOf(a: v128, b: v128): v128 {
  return f64x2.add(v128.shuffle<f64>(a, b, 0, 2), v128.shuffle<f64>(a, b, 1, 3));
}

/** Continues a spectrum beyond line 0 or its last line, where `re` and `im` point: X(k steps on) = conj X(k steps back). */
export function mirror(re: usize, im: usize, count: i32, step: i32): void {
  for (let k = 1; k <= count; k++) {
    const at = k * step;
    store<f64>(re + at, load<f64>(re - at));
    store<f64>(im + at, -load<f64>(im - at));
  }
}

/**
 * Amplitudes of `count` lines, each the product of a complex factor and a weighted sum of `taps` neighbouring lines of a
 * spectrum: cosine + j·(−sine).
 *
 * @param starts byte offsets of the first neighbour from `re` and `im`, 32-bit
 * @param weights `taps` (a multiple of 4) for each line
 * @param factors re, im for each line
 */
export function gatherLines(
  re: usize,
  im: usize,
  starts: usize,
  weights: usize,
  taps: i32,
  factors: usize,
  count: i32,
  cosine: usize,
  sine: usize,
): void {
  for (let k = 0; k < count; k++) {
    let fromRe = re + load<i32>(starts);
    let fromIm = im + load<i32>(starts);
    let sumRe = f64x2.splat(0);
    let sumIm = sumRe;
    let sumRe2 = sumRe;
    let sumIm2 = sumRe;
    for (const end = weights + (taps << 3); weights < end; weights += 32) {
      const w = v128.load(weights);
      const w2 = v128.load(weights, 16);
      sumRe = f64x2.add(sumRe, f64x2.mul(w, v128.load(fromRe)));
      sumIm = f64x2.add(sumIm, f64x2.mul(w, v128.load(fromIm)));
      sumRe2 = f64x2.add(sumRe2, f64x2.mul(w2, v128.load(fromRe, 16)));
      sumIm2 = f64x2.add(sumIm2, f64x2.mul(w2, v128.load(fromIm, 16)));
      fromRe += 32;
      fromIm += 32;
    }
    const sums = sumsOf(f64x2.add(sumRe, sumRe2), f64x2.add(sumIm, sumIm2));
    const lineRe = f64x2.extract_lane(sums, 0);
    const lineIm = f64x2.extract_lane(sums, 1);
    const factorRe = load<f64>(factors);
    const factorIm = load<f64>(factors, 8);
    store<f64>(cosine, lineRe * factorRe - lineIm * factorIm);
    store<f64>(sine, -(lineRe * factorIm + lineIm * factorRe));
    starts += 4;
    factors += 16;
    cosine += 8;
    sine += 8;
  }
}

/** rms values of lines given as peak amplitudes; line 0 is the magnitude of the mean. `count` is rounded up to even. */
export function lineRms(cosine: usize, sine: usize, count: i32, rms: usize): void {
  const half = f64x2.splat(0.5);
  for (let i = 0; i < count; i += 2) {
    const at: usize = i << 3;
    const c = v128.load(cosine + at);
    const s = v128.load(sine + at);
    const square = f64x2.add(f64x2.mul(c, c), f64x2.mul(s, s));
    v128.store(rms + at, f64x2.sqrt(f64x2.mul(half, square)));
  }
  store<f64>(rms, Math.abs(load<f64>(cosine)));
}

/** Mean of the squares of `count` samples. */
export function meanSquare(x: usize, count: i32): f64 {
  let low = f64x2.splat(0);
  let high = low;
  const rest = count & 3;
  for (const end = x + ((count - rest) << 3); x < end; x += 32) {
    const a = v128.load(x);
    const b = v128.load(x, 16);
    low = f64x2.add(low, f64x2.mul(a, a));
    high = f64x2.add(high, f64x2.mul(b, b));
  }
  let sum = f64x2.extract_lane(sumsOf(low, high), 0) + f64x2.extract_lane(sumsOf(low, high), 1);
  for (let i = 0; i < rest; i++) sum += load<f64>(x + (i << 3)) * load<f64>(x + (i << 3));
  return sum / count;
}
