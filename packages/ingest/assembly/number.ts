/*
 * Decimal numbers, eight digits at a time. A word holds eight bytes of text less '0'; the first letter lies lowest.
 *
 * The value is exactly that of the correctly rounded decimal: the mantissa is a whole number up to 2^53 and takes one
 * multiplication or division by a power of ten up to 10^22, all of them exact in binary, so that only one rounding
 * occurs (Clinger, "How to Read Floating Point Numbers Accurately", PLDI 1990, fast path). Anything else is refused.
 */

const POWERS = memory.data<f64>([
  1, 1e1, 1e2, 1e3, 1e4, 1e5, 1e6, 1e7, 1e8, 1e9, 1e10, 1e11, 1e12, 1e13, 1e14, 1e15, 1e16, 1e17, 1e18, 1e19,
  1e20, 1e21, 1e22,
]);
const WHOLE_POWERS = memory.data<u64>([1, 10, 100, 1000, 10000, 100000, 1000000, 10000000, 100000000]);
/** A byte of 1, and every second byte and pair of bytes filled, all over a word. */
const ONES: u64 = u64.MAX_VALUE / 0xff;
const BYTES: u64 = u64.MAX_VALUE / 0x101;
const PAIRS: u64 = u64.MAX_VALUE / 0x10001;
const ZEROS: u64 = ONES * 48;
const EXACT_LIMIT: u64 = 9007199254740992;
/** Largest mantissas that may take so many more digits. */
const ROOMS = memory.data<u64>([
  9007199254740992, 900719925474099, 90071992547409, 9007199254740, 900719925474, 90071992547, 9007199254,
  900719925, 90071992,
]);
const MAX_POWER = 22;

/** What was read last. */
export let value: f64 = 0;
/** Digits after the decimal mark, or 100 + digits of the exponent. */
export let tail: i32 = 0;

function word(at: usize): u64 {
  return load<u64>(at) ^ ZEROS;
}

/** How many of the first bytes are digits. */
function digitsIn(bytes: u64): u64 {
  const others = (((bytes & (ONES * 0x7f)) + ONES * 0x76) | bytes) & (ONES * 0x80);
  return ctz(others) >> 3;
}

/** The number that the first `count` bytes write, 1 to 8 digits. */
function wholeOf(bytes: u64, count: u64): u64 {
  let x = bytes << ((8 - count) << 3);
  x = (x * 10 + (x >> 8)) & BYTES;
  x = (x * 100 + (x >> 16)) & PAIRS;
  return (x * 10000 + (x >> 32)) & 0xffffffff;
}

/** `mantissa` with the digits behind it that the first `count` bytes write; beyond `EXACT_LIMIT` where it is too large. */
function extended(mantissa: u64, bytes: u64, count: u64): u64 {
  const at = usize(count) << 3;
  if (mantissa > load<u64>(ROOMS + at)) return u64.MAX_VALUE;
  return mantissa * load<u64>(WHOLE_POWERS + at) + wholeOf(bytes, count);
}

/** Reads the number at `from` into `value` and `tail`; returns the address behind it, 0 when it is none of the plain kind. */
export function scan(from: usize, decimal: u32): usize {
  let p = from;
  const sign = u32(load<u8>(p));
  const negative = sign === 45;
  if (negative || sign === 43) p += 1;
  let bytes = word(p);
  let count = digitsIn(bytes);
  let mantissa: u64;
  let fraction: i32 = 0;
  if (count < 8 && u32(load<u8>(p + usize(count))) === decimal) {
    // The digits on both sides of the mark as one word.
    const whole = count;
    const before = (u64(1) << (whole << 3)) - 1;
    bytes = (bytes & before) | (word(p + 1) & ~before);
    count = digitsIn(bytes);
    if (count === 0) return 0;
    mantissa = wholeOf(bytes, count);
    fraction = i32(count - whole);
    p += usize(count) + 1;
  } else {
    if (count === 0) return 0;
    mantissa = wholeOf(bytes, count);
    p += usize(count);
    while (count === 8) {
      bytes = word(p);
      count = digitsIn(bytes);
      if (count === 0) break;
      mantissa = extended(mantissa, bytes, count);
      if (mantissa > EXACT_LIMIT) return 0;
      p += usize(count);
    }
    count = 0;
    if (u32(load<u8>(p)) === decimal) {
      p += 1;
      count = 8;
    }
  }
  const marked = fraction > 0 || count > 0;
  while (count === 8) {
    bytes = word(p);
    count = digitsIn(bytes);
    if (count === 0) break;
    mantissa = extended(mantissa, bytes, count);
    if (mantissa > EXACT_LIMIT) return 0;
    fraction += i32(count);
    p += usize(count);
  }
  // "1," at the end of a cell is no number where the comma is the mark.
  if (marked && fraction === 0 && decimal === 44) return 0;
  tail = fraction;
  let exponent = -fraction;
  const letter = u32(load<u8>(p)) | 0x20;
  if (letter === 101) {
    p += 1;
    const direction = u32(load<u8>(p));
    if (direction === 45 || direction === 43) p += 1;
    bytes = word(p);
    count = digitsIn(bytes);
    if (count === 0 || count === 8) return 0;
    const size = i32(wholeOf(bytes, count));
    exponent += direction === 45 ? -size : size;
    tail = 100 + i32(count);
    p += usize(count);
  }
  if (exponent < -MAX_POWER || exponent > MAX_POWER) return 0;
  const exact = f64(i64(mantissa));
  const size =
    exponent < 0
      ? exact / load<f64>(POWERS + (usize(-exponent) << 3))
      : exact * load<f64>(POWERS + (usize(exponent) << 3));
  value = negative ? -size : size;
  return p;
}
