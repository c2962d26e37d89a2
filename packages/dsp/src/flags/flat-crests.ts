const MIN_RUN = 3;
/** How much deeper the second look at a crest goes. */
const DEPTH_RATIO = 64;
/**
 * A smooth crest of order p widens by 64^(1/p) at 64 times the depth: 8 for a sine, 2.8 for the flattest mixture of two
 * orders. A limited crest hardly widens.
 */
const MAX_WIDENING = 1.7;

/**
 * Start positions of crests that lie flat at `level` and end sharply: runs of at least three samples within `tolerance`
 * that hardly grow when samples 64 times deeper are counted in. Crests that look flat because of fine sampling or a
 * coarse converter step do grow. Common practice; no standard defines this check.
 *
 * @param step converter step of a quantised record, added to the tolerance before the second look
 */
export function flatCrests(samples: Float64Array, level: number, tolerance: number, step: number): number[] {
  const deep = DEPTH_RATIO * (tolerance + step);
  const found: number[] = [];
  for (let i = 0; i < samples.length; i++) {
    if (Math.abs(samples[i]! - level) > tolerance) continue;
    const start = i;
    while (i + 1 < samples.length && Math.abs(samples[i + 1]! - level) <= tolerance) i++;
    const run = i - start + 1;
    if (run < MIN_RUN) continue;
    const limit = Math.ceil(MAX_WIDENING * run) + 1;
    let width = run;
    for (let k = start - 1; k >= 0 && width <= limit && Math.abs(samples[k]! - level) <= deep; k--) width++;
    for (let k = i + 1; k < samples.length && width <= limit && Math.abs(samples[k]! - level) <= deep; k++)
      width++;
    if (width <= MAX_WIDENING * run) found.push(start);
  }
  return found;
}
