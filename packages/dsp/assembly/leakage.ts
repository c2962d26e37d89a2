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
 * Takes the leakage of the orders h < orders (order h at line cycles·h) out of the lines and leaves the orders themselves:
 * cosine[k] −= Σ_h a_h (d(k − ch) + d(k + ch)) and sine[k] −= Σ_h b_h (d(k − ch) − d(k + ch)), half of that for k = 0.
 *
 * @param kernel address of d(0); d is there for all k ± ch
 * @param count lines, rounded up to a multiple of 4 in memory
 */
export function removeLeakage(
  kernel: usize,
  cycles: i32,
  orders: i32,
  orderCosine: usize,
  orderSine: usize,
  count: i32,
  cosine: usize,
  sine: usize,
): void {
  const hop: usize = cycles << 3;
  const mean = load<f64>(cosine);
  const ordersEnd = orderCosine + (orders << 3);
  for (let k = 0; k < count; k += 4) {
    const line: usize = k << 3;
    let near = kernel + line;
    let far = near;
    let cosLow = f64x2.splat(0);
    let cosHigh = cosLow;
    let sinLow = cosLow;
    let sinHigh = cosLow;
    let b = orderSine;
    for (let a = orderCosine; a < ordersEnd; a += 8) {
      const aAll = v128.load_splat<f64>(a);
      const bAll = v128.load_splat<f64>(b);
      const nearLow = v128.load(near);
      const nearHigh = v128.load(near, 16);
      const farLow = v128.load(far);
      const farHigh = v128.load(far, 16);
      cosLow = f64x2.add(cosLow, f64x2.mul(aAll, f64x2.add(nearLow, farLow)));
      cosHigh = f64x2.add(cosHigh, f64x2.mul(aAll, f64x2.add(nearHigh, farHigh)));
      sinLow = f64x2.add(sinLow, f64x2.mul(bAll, f64x2.sub(nearLow, farLow)));
      sinHigh = f64x2.add(sinHigh, f64x2.mul(bAll, f64x2.sub(nearHigh, farHigh)));
      near -= hop;
      far += hop;
      b += 8;
    }
    v128.store(cosine + line, f64x2.sub(v128.load(cosine + line), cosLow));
    v128.store(cosine + line, f64x2.sub(v128.load(cosine + line, 16), cosHigh), 16);
    v128.store(sine + line, f64x2.sub(v128.load(sine + line), sinLow));
    v128.store(sine + line, f64x2.sub(v128.load(sine + line, 16), sinHigh), 16);
  }
  store<f64>(cosine, mean - 0.5 * (mean - load<f64>(cosine)));
  for (let h = 0; h < orders; h++) {
    const line: usize = (h * cycles) << 3;
    const order: usize = h << 3;
    store<f64>(cosine + line, load<f64>(cosine + line) + load<f64>(orderCosine + order));
    store<f64>(sine + line, load<f64>(sine + line) + load<f64>(orderSine + order));
  }
}
