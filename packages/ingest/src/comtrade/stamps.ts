import type { TimeAxis } from '../csv/time-axis.js';
import type { ReadWarning } from '../types.js';

/** Follows the time stamps of the records: closely where they decide the sample rate, else their first and last. */
export class Stamps {
  private first = NaN;
  private last = NaN;
  private firstSample = 0;
  private lastSample = 0;
  private falls = 0;

  /** @param axis watches every stamp where the time stamps rule, else null */
  constructor(
    private readonly secondsPerStamp: number,
    private readonly axis: TimeAxis | null,
  ) {}

  /** Takes `count` stamps, the first of which belongs to sample number `from`, counted from 0. */
  take(stamps: Float64Array, count: number, from: number): void {
    for (let i = 0; i < count; i += 1) {
      const stamp = stamps[i] as number;
      if (Number.isNaN(stamp)) this.axis?.skip();
      else this.keep(stamp, from + i);
    }
  }

  get startS(): number | null {
    return Number.isNaN(this.first) ? null : this.first * this.secondsPerStamp;
  }

  /** Mean rate in Hz by the stamps, null where fewer than two tell it. */
  sampleRateHz(): number | null {
    if (this.axis !== null) return this.axis.sampleRateHz();
    if (this.falls > 0) return null;
    const rate = (this.lastSample - this.firstSample) / ((this.last - this.first) * this.secondsPerStamp);
    return rate > 0 && Number.isFinite(rate) ? rate : null;
  }

  /**
   * What the stamps show. `statedHz`: the sampling rate of the configuration, which wins over them; `treatment`: what was
   * done about uneven ones.
   */
  warnings(statedHz: number | null, treatment: string): ReadWarning[] {
    if (this.axis !== null) return this.axis.warnings(treatment);
    if (statedHz !== null && this.falls > 0) {
      const message = `The time stamps of the records do not rise throughout (${this.falls} times not); the sampling rate of the configuration, ${statedHz} Hz, is used.`;
      return [{ code: 'time-stamps-differ', message, count: this.falls }];
    }
    const rate = this.sampleRateHz();
    if (statedHz === null || rate === null || Math.abs(rate - statedHz) <= 0.01 * statedHz) return [];
    const message = `The time stamps of the records run at ${Number(rate.toPrecision(6))} Hz; the sampling rate of the configuration, ${statedHz} Hz, is used.`;
    return [{ code: 'time-stamps-differ', message }];
  }

  private keep(stamp: number, sample: number): void {
    if (Number.isNaN(this.first)) {
      this.first = stamp;
      this.firstSample = sample;
    } else if (stamp <= this.last) this.falls += 1;
    this.last = stamp;
    this.lastSample = sample;
    this.axis?.push(stamp, sample + 1, sample);
  }
}
