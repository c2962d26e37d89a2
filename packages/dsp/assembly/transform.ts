import { firstPass2, firstPass4 } from './first-passes';
import { pass2, pass3, pass4, pass5 } from './passes';
import { passPrime } from './prime-pass';

/*
 * A plan in memory, 32-bit numbers: length, number of passes, addresses of two work areas of `length` complex numbers,
 * address of the scratch of prime passes; then for each pass: radix, stride s, blocks m, addresses of the twiddle factors
 * and of the turns of a prime radix.
 */
const PASSES: usize = 20;
const PASS_BYTES: usize = 20;

/**
 * Forward DFT of `length` complex numbers at `source` (re, im, re, im, …), which stay as they are.
 *
 * @returns address of the result: cells of two for an even length, re, im, … for an odd one
 */
export function transform(plan: usize, source: usize): usize {
  const even = (load<i32>(plan) & 1) === 0;
  const passCount = load<i32>(plan, 4);
  const scratch: usize = load<u32>(plan, 16);
  let to: usize = load<u32>(plan, 8);
  let other: usize = load<u32>(plan, 12);
  let from = source;
  for (let i = 0; i < passCount; i++) {
    const pass = plan + PASSES + i * PASS_BYTES;
    if (even && i === 0) firstPass(pass, from, to);
    else if (even) nextPass<v128>(pass, from, to, scratch);
    else nextPass<f64>(pass, from, to, scratch);
    from = to;
    to = other;
    other = from;
  }
  return from;
}

function firstPass(pass: usize, from: usize, to: usize): void {
  if (load<i32>(pass) === 4) firstPass4(from, to, load<i32>(pass, 8), load<u32>(pass, 12));
  else firstPass2(from, to, load<i32>(pass, 8), load<u32>(pass, 12));
}

function nextPass<T>(pass: usize, from: usize, to: usize, scratch: usize): void {
  const radix = load<i32>(pass);
  const rowBytes: usize = load<i32>(pass, 4) << 4;
  const blocks = load<i32>(pass, 8);
  const twiddles: usize = load<u32>(pass, 12);
  const legBytes = rowBytes * blocks;
  if (radix === 4) pass4<T>(from, to, rowBytes, legBytes, blocks, twiddles);
  else if (radix === 2) pass2<T>(from, to, rowBytes, legBytes, blocks, twiddles);
  else if (radix === 3) pass3<T>(from, to, rowBytes, legBytes, blocks, twiddles);
  else if (radix === 5) pass5<T>(from, to, rowBytes, legBytes, blocks, twiddles);
  else {
    const turns: usize = load<u32>(pass, 16);
    passPrime<T>(from, to, rowBytes, legBytes, blocks, twiddles, radix, turns, scratch);
  }
}
