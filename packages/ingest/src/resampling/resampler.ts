import type { SampleSink } from '../types.js';
import { type EvenGrid, instant } from './even-grid.js';
import { LocalCubic } from './lagrange.js';

const BLOCK = 4096;
/** Stamps that are kept behind the current interval, and that must be there after it. */
const BEHIND = 3;
const AHEAD = 3;

/**
 * Resamples rows with uneven time stamps to an even grid by piecewise cubic interpolation; see `LocalCubic`. Holds one
 * block of rows. Rows without a time stamp are left out. An instant is missing in a pause, and where one of the two
 * rows around it has no number; its own value stands where a stamp falls on it.
 */
export class Resampler {
  /** Samples per channel that came out missing. */
  readonly missing: number[];
  private times = new Float64Array(BLOCK);
  private values: Float64Array[];
  private filled = 0;
  /** Row at the beginning of the interval that holds the next instant. */
  private row = 0;
  private next = 0;
  private readonly out: Float64Array[];
  private outFilled = 0;
  private readonly cubic: LocalCubic;

  constructor(
    readonly grid: EvenGrid,
    channelCount: number,
    private readonly sink: SampleSink,
  ) {
    this.cubic = new LocalCubic(grid.widest);
    this.missing = Array.from({ length: channelCount }, () => 0);
    this.values = this.missing.map(() => new Float64Array(BLOCK));
    this.out = this.missing.map(() => new Float64Array(BLOCK));
  }

  get rateHz(): number {
    return 1 / (this.grid.interval * this.grid.secondsPerUnit);
  }

  /** What was done, as the end of a sentence. */
  get treatment(): string {
    return `the samples were resampled to the mean rate, ${Number(this.rateHz.toPrecision(6))} Hz, by piecewise cubic interpolation`;
  }

  /** Takes `count` rows: their stamps (NaN: none) and the values of each channel. */
  async take(stamps: Float64Array, blocks: Float64Array[], count: number): Promise<void> {
    for (let from = 0; from < count && this.next < this.grid.count;) {
      const room = Math.min(count - from, this.times.length - this.filled);
      this.append(stamps, blocks, from, room);
      from += room;
      await this.work(false);
      this.forget();
    }
  }

  /** Hands on what is left once all rows were taken. */
  async finish(): Promise<void> {
    await this.work(true);
    await this.hand();
  }

  private append(stamps: Float64Array, blocks: Float64Array[], from: number, count: number): void {
    for (let i = from; i < from + count; i += 1) {
      const stamp = stamps[i] as number;
      if (Number.isNaN(stamp)) continue;
      this.times[this.filled] = stamp;
      for (let k = 0; k < blocks.length; k += 1)
        (this.values[k] as Float64Array)[this.filled] = (blocks[k] as Float64Array)[i] as number;
      this.filled += 1;
    }
  }

  /** Drops rows that no instant to come needs. */
  private forget(): void {
    const from = Math.max(0, this.row - BEHIND);
    for (const array of [this.times, ...this.values]) array.copyWithin(0, from, this.filled);
    this.filled -= from;
    this.row -= from;
  }

  private async work(last: boolean): Promise<void> {
    const { grid, times } = this;
    const end = last ? this.filled - 1 : this.filled - AHEAD;
    while (this.next < grid.count) {
      const time = instant(grid, this.next);
      while (this.row < end && (times[this.row + 1] as number) <= time) this.row += 1;
      if (this.row >= end && !last) return;
      this.put(time);
      this.next += 1;
      if (this.outFilled === BLOCK) await this.hand();
    }
  }

  private put(time: number): void {
    const { times, row, filled, grid, values, out, outFilled } = this;
    const onStamp = times[row] === time || row + 1 >= filled;
    const paused = !onStamp && (times[row + 1] as number) - (times[row] as number) > grid.widest;
    if (!onStamp && !paused) this.cubic.aim(time, times, row, filled);
    for (let k = 0; k < values.length; k += 1) {
      const column = values[k] as Float64Array;
      const value = onStamp
        ? (column[row] as number)
        : paused
          ? NaN
          : this.cubic.value(time, times, column, row);
      if (Number.isNaN(value)) this.missing[k] = (this.missing[k] as number) + 1;
      (out[k] as Float64Array)[outFilled] = value;
    }
    this.outFilled += 1;
  }

  private async hand(): Promise<void> {
    if (this.outFilled === 0) return;
    for (const [k, block] of this.out.entries()) await this.sink.write(k, block.subarray(0, this.outFilled));
    this.outFilled = 0;
  }
}
