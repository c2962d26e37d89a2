/* Integer codes of interleaved channels to numbers between -1 and 1, of one channel at a time. */

const TO_UNIT_32: f64 = 1.0 / 2147483648.0;
const TO_UNIT_16: f64 = 1.0 / 32768.0;
const TO_UNIT_8: f64 = 1.0 / 128.0;

/** `stride`: bytes from one frame to the next; `from` is the address of the first sample. */
export function decode8(from: usize, stride: usize, count: usize, to: usize): void {
  for (let i: usize = 0, p = from; i < count; i += 1, p += stride) {
    store<f64>(to + (i << 3), f64(i32(load<u8>(p)) - 128) * TO_UNIT_8);
  }
}

/** Four samples of two channels. `left` of the two lies in the lower half of each 32 bits. */
function decodePairs(pairs: v128, left: bool, to: usize): void {
  const codes = left ? i32x4.shr_s(i32x4.shl(pairs, 16), 16) : i32x4.shr_s(pairs, 16);
  const scale = f64x2.splat(TO_UNIT_16);
  v128.store(to, f64x2.mul(f64x2.convert_low_i32x4_s(codes), scale));
  const high = i64x2.shuffle(codes, codes, 1, 0);
  v128.store(to + 16, f64x2.mul(f64x2.convert_low_i32x4_s(high), scale));
}

export function decode16(from: usize, stride: usize, count: usize, to: usize): void {
  let i: usize = 0;
  if (stride === 4) {
    const left = (from & 2) === 0;
    const first = from & ~usize(3);
    const whole = count & ~usize(3);
    if (left) {
      for (; i < whole; i += 4) decodePairs(v128.load(first + (i << 2)), true, to + (i << 3));
    } else {
      for (; i < whole; i += 4) decodePairs(v128.load(first + (i << 2)), false, to + (i << 3));
    }
  }
  for (let p = from + i * stride; i < count; i += 1, p += stride) {
    store<f64>(to + (i << 3), f64(i32(load<i16>(p))) * TO_UNIT_16);
  }
}

export function decode24(from: usize, stride: usize, count: usize, to: usize): void {
  for (let i: usize = 0, p = from; i < count; i += 1, p += stride) {
    const code = (i32(load<u16>(p)) << 8) | (i32(load<u8>(p + 2)) << 24);
    store<f64>(to + (i << 3), f64(code) * TO_UNIT_32);
  }
}

export function decode32(from: usize, stride: usize, count: usize, to: usize): void {
  for (let i: usize = 0, p = from; i < count; i += 1, p += stride) {
    store<f64>(to + (i << 3), f64(load<i32>(p)) * TO_UNIT_32);
  }
}
