/*
 * Passes over a block of samples.
 */

/**
 * Writes to `out`: Σ(x − shift), Σ(x − shift)², Σ|x|, lowest, highest and the number of values that are not finite. Such
 * values make the sums not finite and count for no extreme.
 */
export function sumBlock(x: usize, count: i32, shift: f64, out: usize): void {
  const shifts = f64x2.splat(shift);
  const zero = f64x2.splat(0);
  let away = zero;
  let away2 = zero;
  let squares = zero;
  let squares2 = zero;
  let absolute = zero;
  let absolute2 = zero;
  let lowest = f64x2.splat(Infinity);
  let highest = f64x2.splat(-Infinity);
  let bad = i64x2.splat(0);
  const rest = count & 3;
  for (const end = x + ((count - rest) << 3); x < end; x += 32) {
    const a = v128.load(x);
    const b = v128.load(x, 16);
    const aAway = f64x2.sub(a, shifts);
    const bAway = f64x2.sub(b, shifts);
    away = f64x2.add(away, aAway);
    away2 = f64x2.add(away2, bAway);
    squares = f64x2.add(squares, f64x2.mul(aAway, aAway));
    squares2 = f64x2.add(squares2, f64x2.mul(bAway, bAway));
    absolute = f64x2.add(absolute, f64x2.abs(a));
    absolute2 = f64x2.add(absolute2, f64x2.abs(b));
    lowest = f64x2.pmin(f64x2.pmin(lowest, a), b);
    highest = f64x2.pmax(f64x2.pmax(highest, a), b);
    bad = i64x2.sub(bad, f64x2.ne(f64x2.sub(a, a), zero));
    bad = i64x2.sub(bad, f64x2.ne(f64x2.sub(b, b), zero));
  }
  let sumAway = sumOfLanes(f64x2.add(away, away2));
  let sumSquares = sumOfLanes(f64x2.add(squares, squares2));
  let sumAbsolute = sumOfLanes(f64x2.add(absolute, absolute2));
  let low = f64x2.extract_lane(lowest, 0);
  if (f64x2.extract_lane(lowest, 1) < low) low = f64x2.extract_lane(lowest, 1);
  let high = f64x2.extract_lane(highest, 0);
  if (f64x2.extract_lane(highest, 1) > high) high = f64x2.extract_lane(highest, 1);
  let notFinite: f64 = f64(i64x2.extract_lane(bad, 0) + i64x2.extract_lane(bad, 1));
  for (let i = 0; i < rest; i++) {
    const value = load<f64>(x + (i << 3));
    const valueAway = value - shift;
    sumAway += valueAway;
    sumSquares += valueAway * valueAway;
    sumAbsolute += Math.abs(value);
    if (value < low) low = value;
    if (value > high) high = value;
    if (value - value !== 0) notFinite += 1;
  }
  store<f64>(out, sumAway);
  store<f64>(out, sumSquares, 8);
  store<f64>(out, sumAbsolute, 16);
  store<f64>(out, low, 24);
  store<f64>(out, high, 32);
  store<f64>(out, notFinite, 40);
}

/** Σ x·cosine and −Σ x·sine to `out`. */
export function demodulate(x: usize, cosine: usize, sine: usize, count: i32, out: usize): void {
  let re = f64x2.splat(0);
  let im = re;
  let re2 = re;
  let im2 = re;
  const rest = count & 3;
  for (const end = x + ((count - rest) << 3); x < end; x += 32) {
    const a = v128.load(x);
    const b = v128.load(x, 16);
    re = f64x2.add(re, f64x2.mul(a, v128.load(cosine)));
    im = f64x2.sub(im, f64x2.mul(a, v128.load(sine)));
    re2 = f64x2.add(re2, f64x2.mul(b, v128.load(cosine, 16)));
    im2 = f64x2.sub(im2, f64x2.mul(b, v128.load(sine, 16)));
    cosine += 32;
    sine += 32;
  }
  let sumRe = sumOfLanes(f64x2.add(re, re2));
  let sumIm = sumOfLanes(f64x2.add(im, im2));
  for (let i = 0; i < rest; i++) {
    sumRe += load<f64>(x + (i << 3)) * load<f64>(cosine + (i << 3));
    sumIm -= load<f64>(x + (i << 3)) * load<f64>(sine + (i << 3));
  }
  store<f64>(out, sumRe);
  store<f64>(out, sumIm, 8);
}

/**
 * Number of samples, a multiple of 4 up to `count`, before the first four of which one lies at or above `top`, at or below
 * `bottom`, or differs by more than `jump` from the parabola through the three before it (its third difference). The
 * three samples before `x` must be there.
 */
export function calmSamples(x: usize, count: i32, top: f64, bottom: f64, jump: f64): i32 {
  const tops = f64x2.splat(top);
  const bottoms = f64x2.splat(bottom);
  const jumps = f64x2.splat(jump);
  const three = f64x2.splat(3);
  const fours = count & ~3;
  let before = v128.load(x - 16);
  for (let i = 0; i < fours; i += 4) {
    const a = v128.load(x);
    const b = v128.load(x, 16);
    const aSteps = f64x2.sub(v128.load(x - 8), before);
    const bSteps = f64x2.sub(v128.load(x, 8), a);
    const aThird = f64x2.sub(f64x2.sub(a, v128.load(x - 24)), f64x2.mul(three, aSteps));
    const bThird = f64x2.sub(f64x2.sub(b, v128.load(x - 8)), f64x2.mul(three, bSteps));
    const calm = v128.and(
      f64x2.le(f64x2.pmax(f64x2.abs(aThird), f64x2.abs(bThird)), jumps),
      v128.and(f64x2.lt(f64x2.pmax(a, b), tops), f64x2.gt(f64x2.pmin(a, b), bottoms)),
    );
    if (!i64x2.all_true(calm)) return i;
    before = b;
    x += 32;
  }
  return fours;
}

function sumOfLanes(a: v128): f64 {
  return f64x2.extract_lane(a, 0) + f64x2.extract_lane(a, 1);
}
