import { add, loadAll, mul, sub } from './lanes';

/**
 * A pass (see passes.ts) of any odd radix, by the sums and differences of the inputs k and r − k.
 *
 * @param turns cos and sin of 2πi/r, i = 0..r − 1
 * @param scratch room for r cells
 */
export function passPrime<T>(
  from: usize,
  to: usize,
  rowBytes: usize,
  legBytes: usize,
  blocks: i32,
  twiddles: usize,
  radix: i32,
  turns: usize,
  scratch: usize,
): void {
  const cell = 2 * sizeof<T>();
  const half = (radix - 1) / 2;
  for (let p = 0; p < blocks; p++) {
    for (const end = from + rowBytes; from < end; from += cell) {
      foldInputs<T>(from, legBytes, radix, scratch);
      let meanRe = load<T>(from);
      let meanIm = load<T>(from, sizeof<T>());
      for (let k = 0; k < half; k++) {
        meanRe = add<T>(meanRe, load<T>(scratch + 2 * k * cell));
        meanIm = add<T>(meanIm, load<T>(scratch + 2 * k * cell, sizeof<T>()));
      }
      store<T>(to, meanRe);
      store<T>(to, meanIm, sizeof<T>());
      for (let j = 1; j <= half; j++) {
        let evenRe = load<T>(from);
        let evenIm = load<T>(from, sizeof<T>());
        let oddRe = sub<T>(evenRe, evenRe);
        let oddIm = oddRe;
        let turn = 0;
        for (let k = 0; k < half; k++) {
          turn += j;
          if (turn >= radix) turn -= radix;
          const cosine = loadAll<T>(turns + 16 * turn);
          const sine = loadAll<T>(turns + 16 * turn + 8);
          const sums = scratch + 2 * k * cell;
          evenRe = add<T>(evenRe, mul<T>(cosine, load<T>(sums)));
          evenIm = add<T>(evenIm, mul<T>(cosine, load<T>(sums, sizeof<T>())));
          oddRe = add<T>(oddRe, mul<T>(sine, load<T>(sums, 2 * sizeof<T>())));
          oddIm = add<T>(oddIm, mul<T>(sine, load<T>(sums, 3 * sizeof<T>())));
        }
        turnInto<T>(to + j * rowBytes, add<T>(evenRe, oddIm), sub<T>(evenIm, oddRe), twiddles + 16 * (j - 1));
        const mirrored = radix - j;
        turnInto<T>(
          to + mirrored * rowBytes,
          sub<T>(evenRe, oddIm),
          add<T>(evenIm, oddRe),
          twiddles + 16 * (mirrored - 1),
        );
      }
      to += cell;
    }
    to += (radix - 1) * rowBytes;
    twiddles += 16 * (radix - 1);
  }
}

function foldInputs<T>(from: usize, legBytes: usize, radix: i32, scratch: usize): void {
  for (let k = 1; 2 * k < radix; k++) {
    const a = from + k * legBytes;
    const b = from + (radix - k) * legBytes;
    store<T>(scratch, add<T>(load<T>(a), load<T>(b)));
    store<T>(scratch, add<T>(load<T>(a, sizeof<T>()), load<T>(b, sizeof<T>())), sizeof<T>());
    store<T>(scratch, sub<T>(load<T>(a), load<T>(b)), 2 * sizeof<T>());
    store<T>(scratch, sub<T>(load<T>(a, sizeof<T>()), load<T>(b, sizeof<T>())), 3 * sizeof<T>());
    scratch += 4 * sizeof<T>();
  }
}

function turnInto<T>(address: usize, re: T, im: T, twiddle: usize): void {
  const wRe = loadAll<T>(twiddle);
  const wIm = loadAll<T>(twiddle + 8);
  store<T>(address, sub<T>(mul<T>(re, wRe), mul<T>(im, wIm)));
  store<T>(address, add<T>(mul<T>(re, wIm), mul<T>(im, wRe)), sizeof<T>());
}
