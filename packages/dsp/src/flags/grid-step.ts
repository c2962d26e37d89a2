/** Samples that are looked at one by one; from then on one in `STRIDE`. */
const FIRST_SAMPLES = 65_536;
const STRIDE = 64;
/** A remainder below this share of the divisor is rounding of double precision. */
const SLACK = 1e-3;
/** Steps below this share of the peak (21 bits and more) matter nowhere, and rounding comes near them. */
const FINEST = 1e-6;
/** Larger multiples of the divisor would bring in the rounding of the divisor itself. */
const LARGEST_MULTIPLE = 65_536;

/**
 * The step of the grid that the samples of a record lie on: the greatest common divisor of the changes between
 * successive samples (Euclid's algorithm on real numbers). A record that was not quantised has none: the divisor then
 * falls below 1e-6 of the peak within a few dozen samples.
 *
 * A table with a fixed number of significant digits has a coarser step at its crests than around zero. Meant is the one
 * at the crests: samples in the decade of the peak are looked at, and those above half of the peak where that decade
 * holds too few. Common practice; no standard defines this estimate.
 */
export class GridStep {
  private peak = 0;
  private learntAt = 0;
  private decade = 0;
  private visited = 0;
  private offset = 1;
  private inDecade = new CommonDivisor();
  private inUpperHalf = new CommonDivisor();

  push(block: Float64Array): void {
    let i = this.offset;
    for (; i < block.length; i += this.visited++ < FIRST_SAMPLES ? 1 : STRIDE) {
      const x = Math.abs(block[i]!);
      if (x > this.peak) this.rise(x);
      const change = Math.abs(block[i]! - block[i - 1]!);
      if (change === 0) continue;
      // Zero lies on the grid of every decade.
      const lower = block[i - 1] === 0 ? x : Math.min(x, Math.abs(block[i - 1]!));
      const finest = FINEST * this.peak;
      if (lower >= this.decade) this.inDecade.take(change, finest);
      if (lower >= this.peak / 2) this.inUpperHalf.take(change, finest);
    }
    this.offset = Math.max(1, i - block.length);
  }

  /** In the unit of the samples; null when no grid is seen. */
  get step(): number | null {
    const { value } = this.inDecade.value < Infinity ? this.inDecade : this.inUpperHalf;
    return value > 0 && value < Infinity ? value : null;
  }

  /** What was learnt at a lower level says nothing of the step at the crests. */
  private rise(peak: number): void {
    this.peak = peak;
    const decade = 10 ** Math.floor(Math.log10(peak));
    if (decade > this.decade) {
      this.decade = decade;
      this.inDecade = new CommonDivisor();
    }
    if (peak > 2 * this.learntAt) {
      this.learntAt = peak;
      this.inUpperHalf = new CommonDivisor();
    }
  }
}

/** Greatest common divisor of real numbers; Infinity before the first, 0 when it is finer than can be told. */
class CommonDivisor {
  value = Infinity;

  take(change: number, finest: number): void {
    if (this.value === 0) return;
    if (this.value === Infinity) this.value = change;
    if (change > LARGEST_MULTIPLE * this.value) return;
    let larger = this.value;
    let rest = remainder(change, larger);
    while (rest > SLACK * larger) {
      const next = remainder(larger, rest);
      larger = rest;
      rest = next;
    }
    this.value = larger < finest ? 0 : larger;
  }
}

/** Distance of `value` from the nearest multiple of `divisor`. */
function remainder(value: number, divisor: number): number {
  return Math.abs(value - divisor * Math.round(value / divisor));
}
