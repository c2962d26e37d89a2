/*
 * Passes of a self-sorting (Stockham) transform, decimation in frequency: with L the length still to be transformed,
 * r the radix, m = L/r and s the product of the radices done,
 *
 *   y[q + s(r p + j)] = w_L^(p j) Σ_k x[q + s(p + m k)] w_r^(j k),   p < m, q < s, j, k < r, w_n = e^(−j2π/n).
 *
 * R. C. Singleton's kernels for the radices; C. Van Loan, "Computational frameworks for the fast Fourier transform",
 * SIAM 1992, section 1.7. Sequences are cells (lanes.ts); `rowBytes` are s complex numbers, `legBytes` m s of them.
 * `twiddles` holds w_L^(p j) as re, im for j = 1..r − 1, then the next p. It starts with p = 0.
 */
import { add, all, loadAll, mul, sub } from './lanes';

const SQRT_3_4: f64 = 0.8660254037844386;
const COS_72: f64 = 0.30901699437494745;
const SIN_72: f64 = 0.9510565162951535;
const COS_144: f64 = -0.8090169943749475;
const SIN_144: f64 = 0.5877852522924731;

/** Writes the product of a number and a twiddle factor. */
function storeTurned<T>(address: usize, re: T, im: T, wRe: T, wIm: T): void {
  store<T>(address, sub<T>(mul<T>(re, wRe), mul<T>(im, wIm)));
  store<T>(address, add<T>(mul<T>(re, wIm), mul<T>(im, wRe)), sizeof<T>());
}

export function pass2<T>(
  from: usize,
  to: usize,
  rowBytes: usize,
  legBytes: usize,
  blocks: i32,
  twiddles: usize,
): void {
  for (let p = 0; p < blocks; p++) {
    const wRe = loadAll<T>(twiddles);
    const wIm = loadAll<T>(twiddles + 8);
    twiddles += 16;
    for (const end = from + rowBytes; from < end; from += 2 * sizeof<T>()) {
      const aRe = load<T>(from);
      const aIm = load<T>(from, sizeof<T>());
      const bRe = load<T>(from + legBytes);
      const bIm = load<T>(from + legBytes, sizeof<T>());
      store<T>(to, add<T>(aRe, bRe));
      store<T>(to, add<T>(aIm, bIm), sizeof<T>());
      storeTurned<T>(to + rowBytes, sub<T>(aRe, bRe), sub<T>(aIm, bIm), wRe, wIm);
      to += 2 * sizeof<T>();
    }
    to += rowBytes;
  }
}

export function pass3<T>(
  from: usize,
  to: usize,
  rowBytes: usize,
  legBytes: usize,
  blocks: i32,
  twiddles: usize,
): void {
  for (let p = 0; p < blocks; p++) {
    const w1Re = loadAll<T>(twiddles);
    const w1Im = loadAll<T>(twiddles + 8);
    const w2Re = loadAll<T>(twiddles + 16);
    const w2Im = loadAll<T>(twiddles + 24);
    twiddles += 32;
    for (const end = from + rowBytes; from < end; from += 2 * sizeof<T>()) {
      const b = from + legBytes;
      const c = b + legBytes;
      const aRe = load<T>(from);
      const aIm = load<T>(from, sizeof<T>());
      const sumRe = add<T>(load<T>(b), load<T>(c));
      const sumIm = add<T>(load<T>(b, sizeof<T>()), load<T>(c, sizeof<T>()));
      const difRe = mul<T>(all<T>(SQRT_3_4), sub<T>(load<T>(b), load<T>(c)));
      const difIm = mul<T>(all<T>(SQRT_3_4), sub<T>(load<T>(b, sizeof<T>()), load<T>(c, sizeof<T>())));
      const midRe = sub<T>(aRe, mul<T>(all<T>(0.5), sumRe));
      const midIm = sub<T>(aIm, mul<T>(all<T>(0.5), sumIm));
      store<T>(to, add<T>(aRe, sumRe));
      store<T>(to, add<T>(aIm, sumIm), sizeof<T>());
      storeTurned<T>(to + rowBytes, add<T>(midRe, difIm), sub<T>(midIm, difRe), w1Re, w1Im);
      storeTurned<T>(to + 2 * rowBytes, sub<T>(midRe, difIm), add<T>(midIm, difRe), w2Re, w2Im);
      to += 2 * sizeof<T>();
    }
    to += 2 * rowBytes;
  }
}

export function pass4<T>(
  from: usize,
  to: usize,
  rowBytes: usize,
  legBytes: usize,
  blocks: i32,
  twiddles: usize,
): void {
  for (let p = 0; p < blocks; p++) {
    const w1Re = loadAll<T>(twiddles);
    const w1Im = loadAll<T>(twiddles + 8);
    const w2Re = loadAll<T>(twiddles + 16);
    const w2Im = loadAll<T>(twiddles + 24);
    const w3Re = loadAll<T>(twiddles + 32);
    const w3Im = loadAll<T>(twiddles + 40);
    twiddles += 48;
    for (const end = from + rowBytes; from < end; from += 2 * sizeof<T>()) {
      const b = from + legBytes;
      const c = b + legBytes;
      const d = c + legBytes;
      const acRe = add<T>(load<T>(from), load<T>(c));
      const acIm = add<T>(load<T>(from, sizeof<T>()), load<T>(c, sizeof<T>()));
      const bdRe = add<T>(load<T>(b), load<T>(d));
      const bdIm = add<T>(load<T>(b, sizeof<T>()), load<T>(d, sizeof<T>()));
      const cDifRe = sub<T>(load<T>(from), load<T>(c));
      const cDifIm = sub<T>(load<T>(from, sizeof<T>()), load<T>(c, sizeof<T>()));
      const dDifRe = sub<T>(load<T>(b), load<T>(d));
      const dDifIm = sub<T>(load<T>(b, sizeof<T>()), load<T>(d, sizeof<T>()));
      store<T>(to, add<T>(acRe, bdRe));
      store<T>(to, add<T>(acIm, bdIm), sizeof<T>());
      const to1 = to + rowBytes;
      const to2 = to1 + rowBytes;
      storeTurned<T>(to1, add<T>(cDifRe, dDifIm), sub<T>(cDifIm, dDifRe), w1Re, w1Im);
      storeTurned<T>(to2, sub<T>(acRe, bdRe), sub<T>(acIm, bdIm), w2Re, w2Im);
      storeTurned<T>(to2 + rowBytes, sub<T>(cDifRe, dDifIm), add<T>(cDifIm, dDifRe), w3Re, w3Im);
      to += 2 * sizeof<T>();
    }
    to += 3 * rowBytes;
  }
}

export function pass5<T>(
  from: usize,
  to: usize,
  rowBytes: usize,
  legBytes: usize,
  blocks: i32,
  twiddles: usize,
): void {
  for (let p = 0; p < blocks; p++) {
    for (const end = from + rowBytes; from < end; from += 2 * sizeof<T>()) {
      const b = from + legBytes;
      const c = b + legBytes;
      const d = c + legBytes;
      const e = d + legBytes;
      const aRe = load<T>(from);
      const aIm = load<T>(from, sizeof<T>());
      const sum1Re = add<T>(load<T>(b), load<T>(e));
      const sum1Im = add<T>(load<T>(b, sizeof<T>()), load<T>(e, sizeof<T>()));
      const sum2Re = add<T>(load<T>(c), load<T>(d));
      const sum2Im = add<T>(load<T>(c, sizeof<T>()), load<T>(d, sizeof<T>()));
      const dif1Re = sub<T>(load<T>(b), load<T>(e));
      const dif1Im = sub<T>(load<T>(b, sizeof<T>()), load<T>(e, sizeof<T>()));
      const dif2Re = sub<T>(load<T>(c), load<T>(d));
      const dif2Im = sub<T>(load<T>(c, sizeof<T>()), load<T>(d, sizeof<T>()));
      const mid1Re = add<T>(aRe, add<T>(mul<T>(all<T>(COS_72), sum1Re), mul<T>(all<T>(COS_144), sum2Re)));
      const mid1Im = add<T>(aIm, add<T>(mul<T>(all<T>(COS_72), sum1Im), mul<T>(all<T>(COS_144), sum2Im)));
      const mid2Re = add<T>(aRe, add<T>(mul<T>(all<T>(COS_144), sum1Re), mul<T>(all<T>(COS_72), sum2Re)));
      const mid2Im = add<T>(aIm, add<T>(mul<T>(all<T>(COS_144), sum1Im), mul<T>(all<T>(COS_72), sum2Im)));
      const out1Re = add<T>(mul<T>(all<T>(SIN_72), dif1Re), mul<T>(all<T>(SIN_144), dif2Re));
      const out1Im = add<T>(mul<T>(all<T>(SIN_72), dif1Im), mul<T>(all<T>(SIN_144), dif2Im));
      const out2Re = sub<T>(mul<T>(all<T>(SIN_144), dif1Re), mul<T>(all<T>(SIN_72), dif2Re));
      const out2Im = sub<T>(mul<T>(all<T>(SIN_144), dif1Im), mul<T>(all<T>(SIN_72), dif2Im));
      store<T>(to, add<T>(aRe, add<T>(sum1Re, sum2Re)));
      store<T>(to, add<T>(aIm, add<T>(sum1Im, sum2Im)), sizeof<T>());
      const to1 = to + rowBytes;
      const to2 = to1 + rowBytes;
      const to3 = to2 + rowBytes;
      storeTurned<T>(
        to1,
        add<T>(mid1Re, out1Im),
        sub<T>(mid1Im, out1Re),
        loadAll<T>(twiddles),
        loadAll<T>(twiddles + 8),
      );
      storeTurned<T>(
        to2,
        add<T>(mid2Re, out2Im),
        sub<T>(mid2Im, out2Re),
        loadAll<T>(twiddles + 16),
        loadAll<T>(twiddles + 24),
      );
      storeTurned<T>(
        to3,
        sub<T>(mid2Re, out2Im),
        add<T>(mid2Im, out2Re),
        loadAll<T>(twiddles + 32),
        loadAll<T>(twiddles + 40),
      );
      storeTurned<T>(
        to3 + rowBytes,
        sub<T>(mid1Re, out1Im),
        add<T>(mid1Im, out1Re),
        loadAll<T>(twiddles + 48),
        loadAll<T>(twiddles + 56),
      );
      to += 2 * sizeof<T>();
    }
    to += 4 * rowBytes;
    twiddles += 64;
  }
}
