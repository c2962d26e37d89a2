/** Samples that are looked at one by one; from then on one in `STRIDE`. */
const FIRST_SAMPLES = 65_536;
const STRIDE = 64;
/** A remainder below this share of the step is rounding of double precision. */
const SLACK = 1e-3;
/** Steps below this share of the peak cannot be told from rounding. */
const FINEST = 1e-8;
/** Larger multiples of the step would bring in the rounding of the step itself. */
const LARGEST_MULTIPLE = 65_536;

/**
 * The step of the grid that the samples of a record lie on: the greatest common divisor of the changes between
 * successive samples (Euclid's algorithm on real numbers). A record that was not quantised has none: the divisor then
 * falls below 1e-8 of the peak within a few dozen samples. Only samples above half of the peak seen so far are looked
 * at, so that of a table with a fixed number of significant digits the step at the crests is found, not the finer one
 * around zero. Common practice; no standard defines this estimate.
 */
export class GridStep {
  private divisor = Infinity;
  private peak = 0;
  private visited = 0;
  private offset = 1;

  /** @param blockPeak largest absolute value of the block */
  push(block: Float64Array, blockPeak: number): void {
    if (blockPeak > 2 * this.peak) {
      // What was learnt at a much lower level says nothing of the step at the crests.
      this.divisor = Infinity;
      this.visited = 0;
      this.offset = 1;
    }
    this.peak = Math.max(this.peak, blockPeak);
    if (this.divisor === 0) return;
    const least = this.peak / 2;
    let i = this.offset;
    for (; i < block.length; i += this.visited++ < FIRST_SAMPLES ? 1 : STRIDE) {
      const x = block[i]!;
      const before = block[i - 1]!;
      if (x === before || Math.abs(x) < least || Math.abs(before) < least) continue;
      this.look(Math.abs(x - before));
      if (this.divisor === 0) return;
    }
    this.offset = Math.max(1, i - block.length);
  }

  /** null when no grid is seen. */
  get step(): number | null {
    return this.divisor > 0 && this.divisor < Infinity ? this.divisor : null;
  }

  private look(change: number): void {
    if (this.divisor === Infinity) this.divisor = change;
    if (change > LARGEST_MULTIPLE * this.divisor) return;
    let larger = this.divisor;
    let rest = remainder(change, larger);
    while (rest > SLACK * larger) {
      const next = remainder(larger, rest);
      larger = rest;
      rest = next;
    }
    this.divisor = larger < FINEST * this.peak ? 0 : larger;
  }
}

/** Distance of `value` from the nearest multiple of `divisor`. */
function remainder(value: number, divisor: number): number {
  return Math.abs(value - divisor * Math.round(value / divisor));
}
