/** Samples that are looked at one by one; from then on one in `STRIDE`. */
const FIRST_SAMPLES = 65_536;
const STRIDE = 64;
/** A remainder below this share of the divisor is rounding of double precision. */
const SLACK = 1e-3;
/** Steps below this share of the peak (18 bits and more) matter nowhere, and rounding comes near them. */
const FINEST = 1e-5;
/** Multiples up to which a divisor that was just found is exact enough, and how much farther each one carries. */
const FIRST_REACH = 256;
const REACH_GROWTH = 64;
/** Different multiples that make a divisor a grid: three real numbers have one by chance once in 10⁹ times. */
const ENOUGH_MULTIPLES = 3;

/**
 * The step of the grid that the samples of a record lie on: the greatest common divisor of their distances from one of
 * them (Euclid's algorithm on real numbers), once at least three different multiples of it were seen. A record that was
 * not quantised has none: the divisor then falls below 1e-5 of the peak within a few dozen samples.
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
  private offset = 0;
  private inDecade = new Grid();
  private inUpperHalf = new Grid();

  push(block: Float64Array): void {
    let i = this.offset;
    for (; i < block.length; i += this.visited++ < FIRST_SAMPLES ? 1 : STRIDE) {
      const x = Math.abs(block[i]!);
      if (x > this.peak) this.rise(x);
      const finest = FINEST * this.peak;
      if (x >= this.decade) this.inDecade.take(block[i]!, finest);
      if (x >= this.peak / 2) this.inUpperHalf.take(block[i]!, finest);
    }
    this.offset = i - block.length;
  }

  /** In the unit of the samples; null when no grid is seen. */
  get step(): number | null {
    return this.inDecade.isJudged ? this.inDecade.step : this.inUpperHalf.step;
  }

  /** What was learnt at a lower level says nothing of the step at the crests. */
  private rise(peak: number): void {
    this.peak = peak;
    const decade = 10 ** Math.floor(Math.log10(peak));
    if (decade > this.decade) {
      this.decade = decade;
      this.inDecade = new Grid();
    }
    if (peak > 2 * this.learntAt) {
      this.learntAt = peak;
      this.inUpperHalf = new Grid();
    }
  }
}

/** Greatest common divisor of the distances of values from the first of them. */
class Grid {
  private origin = NaN;
  /** Infinity before the first distance, 0 when it is finer than can be told. */
  private divisor = Infinity;
  private reach = FIRST_REACH;
  private multiples = new Set<number>();

  get isJudged(): boolean {
    return this.divisor === 0 || this.multiples.size >= ENOUGH_MULTIPLES;
  }

  get step(): number | null {
    return this.isJudged && this.divisor > 0 ? this.divisor : null;
  }

  take(value: number, finest: number): void {
    if (Number.isNaN(this.origin)) this.origin = value;
    const distance = Math.abs(value - this.origin);
    if (distance === 0 || this.divisor === 0) return;
    if (this.divisor === Infinity) this.divisor = distance;
    if (distance > this.reach * this.divisor) return;
    if (remainder(distance, this.divisor) > SLACK * this.divisor) {
      this.divide(distance);
      if (this.divisor < finest) this.divisor = 0;
    } else this.confirm(distance, Math.round(distance / this.divisor));
  }

  /** A large multiple tells the divisor more exactly than the division that it came from. */
  private confirm(distance: number, multiple: number): void {
    if (this.multiples.size < ENOUGH_MULTIPLES) this.multiples.add(multiple);
    if (REACH_GROWTH * multiple <= this.reach) return;
    this.divisor = distance / multiple;
    this.reach = REACH_GROWTH * multiple;
  }

  private divide(distance: number): void {
    this.multiples.clear();
    this.reach = FIRST_REACH;
    let rest = remainder(distance, this.divisor);
    while (rest > SLACK * this.divisor) {
      const next = remainder(this.divisor, rest);
      this.divisor = rest;
      rest = next;
    }
  }
}

/** Distance of `value` from the nearest multiple of `divisor`. */
function remainder(value: number, divisor: number): number {
  return Math.abs(value - divisor * Math.round(value / divisor));
}
