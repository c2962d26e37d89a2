/*
 * Projections of a short block on many components. With the block folded about its centre, a component costs one
 * multiplication per sample.
 */

/**
 * Even and odd part of 2·half samples about their centre, then both times the distance from it in samples: four rows of
 * `half` numbers. `half` is even.
 */
export function foldBlock(x: usize, half: i32, out: usize): void {
  const row: usize = half << 3;
  let after = x + row;
  let before = x + row - 16;
  let distance = f64x2.replace_lane(f64x2.splat(0.5), 1, 1.5);
  const two = f64x2.splat(2);
  for (const end = out + row; out < end; out += 16) {
    const right = v128.load(after);
    const left = v128.load(before);
    const mirrored = v128.shuffle<f64>(left, left, 1, 0);
    const even = f64x2.add(right, mirrored);
    const odd = f64x2.sub(right, mirrored);
    v128.store(out, even);
    v128.store(out + row, odd);
    v128.store(out + 2 * row, f64x2.mul(even, distance));
    v128.store(out + 3 * row, f64x2.mul(odd, distance));
    distance = f64x2.add(distance, two);
    after += 16;
    before -= 16;
  }
}

/** Per component Σ even·cosine and −Σ odd·sine; `table` holds `half` cosines and as many sines of each. */
export function projectBlock(folded: usize, half: i32, table: usize, count: i32, out: usize): void {
  const row: usize = half << 3;
  for (let c = 0; c < count; c++) {
    store<f64>(out, dot(folded, table, half));
    store<f64>(out, -dot(folded + row, table + row, half), 8);
    table += 2 * row;
    out += 16;
  }
}

/** As `projectBlock`, followed for each component by the same two sums weighted by the distance from the centre. */
export function projectTimedBlock(folded: usize, half: i32, table: usize, count: i32, out: usize): void {
  const row: usize = half << 3;
  for (let c = 0; c < count; c++) {
    store<f64>(out, dot(folded, table, half));
    store<f64>(out, -dot(folded + row, table + row, half), 8);
    store<f64>(out, dot(folded + 3 * row, table, half), 16);
    store<f64>(out, -dot(folded + 2 * row, table + row, half), 24);
    table += 2 * row;
    out += 32;
  }
}

/** Σ a·b of an even number of values. */
function dot(a: usize, b: usize, count: i32): f64 {
  let sum = f64x2.splat(0);
  let sum2 = sum;
  const rest = count & 3;
  for (const end = a + ((count - rest) << 3); a < end; a += 32) {
    sum = f64x2.add(sum, f64x2.mul(v128.load(a), v128.load(b)));
    sum2 = f64x2.add(sum2, f64x2.mul(v128.load(a, 16), v128.load(b, 16)));
    b += 32;
  }
  if (rest) sum = f64x2.add(sum, f64x2.mul(v128.load(a), v128.load(b)));
  sum = f64x2.add(sum, sum2);
  return f64x2.extract_lane(sum, 0) + f64x2.extract_lane(sum, 1);
}
