const NODES = 4;

/**
 * Cubics through the rows around an instant by Lagrange's interpolation formula (Abramowitz and Stegun, Handbook of
 * Mathematical Functions, 25.2.1 and 25.2.2). The error of a cubic is |f''''| / 4! x |product of (time - node)|: for a
 * sine of even stamps it stays below 0.0235 (2 pi f / rate)^4 of the amplitude, 0.4 % at a tenth of the rate.
 */
export class LocalCubic {
  private low = 0;
  private size = 0;
  private readonly weights = new Float64Array(NODES);

  /** @param widest stamps farther apart have a pause between them */
  constructor(private readonly widest: number) {}

  /**
   * Aims at `time` between `row` and `row` + 1. The cubic goes through two rows on either side where they are there, else
   * through the nearest, none of them beyond a pause. The weights serve all channels.
   */
  aim(time: number, times: Float64Array, row: number, filled: number): void {
    let low = row;
    let high = row + 1;
    const isNear = (from: number) => (times[from + 1] as number) - (times[from] as number) <= this.widest;
    if (low > 0 && isNear(low - 1)) low -= 1;
    if (high + 1 < filled && isNear(high)) high += 1;
    while (high - low + 1 < NODES && high + 1 < filled && isNear(high)) high += 1;
    while (high - low + 1 < NODES && low > 0 && isNear(low - 1)) low -= 1;
    this.low = low;
    this.size = high - low + 1;
    for (let i = 0; i < this.size; i += 1) {
      const own = times[low + i] as number;
      let weight = 1;
      for (let j = low; j <= high; j += 1)
        if (j !== low + i) weight *= (time - (times[j] as number)) / (own - (times[j] as number));
      this.weights[i] = weight;
    }
  }

  /** Value of a channel at the instant; NaN where one of the rows beside it has no number. */
  value(time: number, times: Float64Array, values: Float64Array, row: number): number {
    let sum = 0;
    for (let i = 0; i < this.size; i += 1)
      sum += (this.weights[i] as number) * (values[this.low + i] as number);
    if (!Number.isNaN(sum) || Number.isNaN(values[row]) || Number.isNaN(values[row + 1])) return sum;
    return this.throughPresent(time, times, values);
  }

  /** A number is missing farther out: the polynomial goes through those there are. */
  private throughPresent(time: number, times: Float64Array, values: Float64Array): number {
    const rows = Array.from({ length: this.size }, (_, i) => this.low + i);
    const present = rows.filter((at) => !Number.isNaN(values[at]));
    return present.reduce((sum, own) => {
      const others = present.filter((at) => at !== own).map((at) => times[at] as number);
      const weight = others.reduce((all, at) => (all * (time - at)) / ((times[own] as number) - at), 1);
      return sum + weight * (values[own] as number);
    }, 0);
  }
}
