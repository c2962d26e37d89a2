/*
 * First passes (s = 1 of passes.ts) of an even length: they read complex numbers as re, im, re, im, … and write cells of
 * two. Twiddle factors lie as cells for p and p + 1, j = 1..r − 1; with an odd number of blocks the last cells are those
 * of the last two blocks, which overlap the pair before.
 */

/** Real parts of two complex numbers that follow each other in memory. */
function realParts(address: usize): v128 {
  return v128.shuffle<f64>(v128.load(address), v128.load(address, 16), 0, 2);
}

function imaginaryParts(address: usize): v128 {
  return v128.shuffle<f64>(v128.load(address), v128.load(address, 16), 1, 3);
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
    const aRe = realParts(a);
    const aIm = imaginaryParts(a);
    const bRe = realParts(a + leg);
    const bIm = imaginaryParts(a + leg);
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
    const acRe = f64x2.add(realParts(a), realParts(c));
    const acIm = f64x2.add(imaginaryParts(a), imaginaryParts(c));
    const bdRe = f64x2.add(realParts(b), realParts(d));
    const bdIm = f64x2.add(imaginaryParts(b), imaginaryParts(d));
    const cDifRe = f64x2.sub(realParts(a), realParts(c));
    const cDifIm = f64x2.sub(imaginaryParts(a), imaginaryParts(c));
    const dDifRe = f64x2.sub(realParts(b), realParts(d));
    const dDifIm = f64x2.sub(imaginaryParts(b), imaginaryParts(d));
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
