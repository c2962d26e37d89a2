/*
 * First passes (s = 1 of passes.ts) of an even length: they read complex numbers as re, im, re, im, … and write cells of
 * two. Twiddle factors lie as cells for p and p + 1, j = 1..r − 1; with an odd number of blocks the last cells are those
 * of the last two blocks, which overlap the pair before.
 */

/** Real parts of two complex numbers re, im. */
function realParts(first: v128, second: v128): v128 {
  return v128.shuffle<f64>(first, second, 0, 2);
}

function imaginaryParts(first: v128, second: v128): v128 {
  return v128.shuffle<f64>(first, second, 1, 3);
}

function turnedRe(re: v128, im: v128, twiddle: usize): v128 {
  return f64x2.sub(f64x2.mul(re, v128.load(twiddle)), f64x2.mul(im, v128.load(twiddle, 16)));
}

function turnedIm(re: v128, im: v128, twiddle: usize): v128 {
  return f64x2.add(f64x2.mul(re, v128.load(twiddle, 16)), f64x2.mul(im, v128.load(twiddle)));
}

export function firstPass2(source: usize, to: usize, blocks: i32, twiddles: usize): void {
  const leg: usize = blocks << 4;
  for (let p = 0; p < blocks; p += 2) {
    if (p === blocks - 1) p--;
    const a = source + (p << 4);
    const a0 = v128.load(a);
    const a1 = v128.load(a, 16);
    const aRe = realParts(a0, a1);
    const aIm = imaginaryParts(a0, a1);
    const b0 = v128.load(a + leg);
    const b1 = v128.load(a + leg, 16);
    const bRe = realParts(b0, b1);
    const bIm = imaginaryParts(b0, b1);
    const y0Re = f64x2.add(aRe, bRe);
    const y0Im = f64x2.add(aIm, bIm);
    const difRe = f64x2.sub(aRe, bRe);
    const difIm = f64x2.sub(aIm, bIm);
    const y1Re = turnedRe(difRe, difIm, twiddles);
    const y1Im = turnedIm(difRe, difIm, twiddles);
    twiddles += 32;
    const cell = to + (p << 5);
    v128.store(cell, v128.shuffle<f64>(y0Re, y1Re, 0, 2));
    v128.store(cell, v128.shuffle<f64>(y0Im, y1Im, 0, 2), 16);
    v128.store(cell, v128.shuffle<f64>(y0Re, y1Re, 1, 3), 32);
    v128.store(cell, v128.shuffle<f64>(y0Im, y1Im, 1, 3), 48);
  }
}

export function firstPass4(source: usize, to: usize, blocks: i32, twiddles: usize): void {
  const leg: usize = blocks << 4;
  for (let p = 0; p < blocks; p += 2) {
    if (p === blocks - 1) p--;
    const a = source + (p << 4);
    const b = a + leg;
    const c = b + leg;
    const d = c + leg;
    const a0 = v128.load(a);
    const a1 = v128.load(a, 16);
    const aRe = realParts(a0, a1);
    const aIm = imaginaryParts(a0, a1);
    const c0 = v128.load(c);
    const c1 = v128.load(c, 16);
    const cRe = realParts(c0, c1);
    const cIm = imaginaryParts(c0, c1);
    const acRe = f64x2.add(aRe, cRe);
    const acIm = f64x2.add(aIm, cIm);
    const cDifRe = f64x2.sub(aRe, cRe);
    const cDifIm = f64x2.sub(aIm, cIm);
    const b0 = v128.load(b);
    const b1 = v128.load(b, 16);
    const bRe = realParts(b0, b1);
    const bIm = imaginaryParts(b0, b1);
    const d0 = v128.load(d);
    const d1 = v128.load(d, 16);
    const dRe = realParts(d0, d1);
    const dIm = imaginaryParts(d0, d1);
    const bdRe = f64x2.add(bRe, dRe);
    const bdIm = f64x2.add(bIm, dIm);
    const dDifRe = f64x2.sub(bRe, dRe);
    const dDifIm = f64x2.sub(bIm, dIm);
    const sum1Re = f64x2.add(cDifRe, dDifIm);
    const sum1Im = f64x2.sub(cDifIm, dDifRe);
    const sum2Re = f64x2.sub(acRe, bdRe);
    const sum2Im = f64x2.sub(acIm, bdIm);
    const sum3Re = f64x2.sub(cDifRe, dDifIm);
    const sum3Im = f64x2.add(cDifIm, dDifRe);
    const y0Re = f64x2.add(acRe, bdRe);
    const y0Im = f64x2.add(acIm, bdIm);
    const y1Re = turnedRe(sum1Re, sum1Im, twiddles);
    const y1Im = turnedIm(sum1Re, sum1Im, twiddles);
    const y2Re = turnedRe(sum2Re, sum2Im, twiddles + 32);
    const y2Im = turnedIm(sum2Re, sum2Im, twiddles + 32);
    const y3Re = turnedRe(sum3Re, sum3Im, twiddles + 64);
    const y3Im = turnedIm(sum3Re, sum3Im, twiddles + 64);
    twiddles += 96;
    const cell = to + (p << 6);
    v128.store(cell, v128.shuffle<f64>(y0Re, y1Re, 0, 2));
    v128.store(cell, v128.shuffle<f64>(y0Im, y1Im, 0, 2), 16);
    v128.store(cell, v128.shuffle<f64>(y2Re, y3Re, 0, 2), 32);
    v128.store(cell, v128.shuffle<f64>(y2Im, y3Im, 0, 2), 48);
    v128.store(cell, v128.shuffle<f64>(y0Re, y1Re, 1, 3), 64);
    v128.store(cell, v128.shuffle<f64>(y0Im, y1Im, 1, 3), 80);
    v128.store(cell, v128.shuffle<f64>(y2Re, y3Re, 1, 3), 96);
    v128.store(cell, v128.shuffle<f64>(y2Im, y3Im, 1, 3), 112);
  }
}
