/*
 * Lines of a window that holds no whole number of samples: the orders are fitted by least squares, and what they leak
 * into all lines is taken out (see src/groups/leakage.ts).
 */

/**
 * Amplitudes of the orders h < `orders` from the lines at their places cycles·h: solves L Lᵀ x = b.
 *
 * @param doubling factor of the line of order 0 in b
 * @param factor rows of L, each `orders` numbers rounded up to an even number; what is above the diagonal is 0
 * @param fitted receives x, with room for an even number of orders
 */
export function fitOrders(
  lines: usize,
  cycles: i32,
  orders: i32,
  doubling: f64,
  factor: usize,
  fitted: usize,
): void {
  const rowBytes: usize = ((orders + 1) & ~1) << 3;
  v128.store(fitted + rowBytes - 16, f64x2.splat(0));
  for (let h = 0; h < orders; h++) store<f64>(fitted + (h << 3), load<f64>(lines + ((cycles * h) << 3)));
  store<f64>(fitted, doubling * load<f64>(fitted));
  for (let h = 0; h < orders; h++) {
    const row = factor + h * rowBytes;
    let sums = f64x2.splat(0);
    let own: f64 = 0;
    const pairs: usize = (h & ~1) << 3;
    for (let at: usize = 0; at < pairs; at += 16) {
      sums = f64x2.add(sums, f64x2.mul(v128.load(row + at), v128.load(fitted + at)));
    }
    if ((h & 1) === 1) own = load<f64>(row + pairs) * load<f64>(fitted + pairs);
    const known = own + f64x2.extract_lane(sums, 0) + f64x2.extract_lane(sums, 1);
    const at: usize = h << 3;
    store<f64>(fitted + at, (load<f64>(fitted + at) - known) / load<f64>(row + at));
  }
  for (let h = orders - 1; h >= 0; h--) {
    const row = factor + h * rowBytes;
    const at: usize = h << 3;
    const solved = load<f64>(fitted + at) / load<f64>(row + at);
    const all = f64x2.splat(solved);
    for (let before: usize = 0; before < at; before += 16) {
      const rest = f64x2.sub(v128.load(fitted + before), f64x2.mul(all, v128.load(row + before)));
      v128.store(fitted + before, rest);
    }
    store<f64>(fitted + at, solved);
  }
}

/**
 * target += Σ_i factors[i]·column_i
 *
 * @param columns one after another, each `rows` numbers, a multiple of 4
 */
export function addColumns(columns: usize, factors: usize, count: i32, rows: i32, target: usize): void {
  const columnBytes: usize = rows << 3;
  for (let row: usize = 0; row < columnBytes; row += 32) {
    let low = v128.load(target + row);
    let high = v128.load(target + row, 16);
    let at = columns + row;
    for (let i = 0; i < count; i++) {
      const factor = v128.load_splat<f64>(factors + (i << 3));
      low = f64x2.add(low, f64x2.mul(factor, v128.load(at)));
      high = f64x2.add(high, f64x2.mul(factor, v128.load(at, 16)));
      at += columnBytes;
    }
    v128.store(target + row, low);
    v128.store(target + row, high, 16);
  }
}

/** lines[cycles·h] += factor·orders[h], h < count. */
export function addOrders(lines: usize, cycles: i32, count: i32, factor: f64, orders: usize): void {
  for (let h = 0; h < count; h++) {
    const line = lines + ((cycles * h) << 3);
    store<f64>(line, load<f64>(line) + factor * load<f64>(orders + (h << 3)));
  }
}
