import { refuse } from '../refusal.js';
import type { EvenGrid } from '../resampling/even-grid.js';
import type { ReadWarning } from '../types.js';
import type { TimeChoice } from './time-column.js';

const SETTLE_AFTER = 256;
const UNEVEN = 0.05;
const GAP = 1.5;
/** Intervals between stamps from which on at least one sample is missing, however uneven they are; a resampling leaves a pause. */
const PAUSE = 2;
/** Finest digit that is looked for in time stamps. */
const FINEST_DIGIT = 12;

/** Places that are told one by one. */
const PLACES = 20;

interface Tally {
  count: number;
  firstLine: number;
  samples: number[];
  /** Largest value that was counted. */
  value: number;
}

/** How places are named: lines of text, or records of binary data, which no line number leads to. */
export interface RowWords {
  row: 'line' | 'record';
  /** What a person can do instead of mending the stamps. */
  otherwise: string;
}

const LINES: RowWords = {
  row: 'line',
  otherwise: 'or state that there is no time column and give the sample rate',
};

/** A step of the time from the row before to the row of `sample`. */
interface Step {
  step: number;
  line: number;
  sample: number;
}

function count(tally: Tally, line: number, sample: number, value: number): void {
  if (tally.count === 0) tally.firstLine = line;
  if (tally.samples.length < PLACES) tally.samples.push(sample);
  tally.count += 1;
  tally.value = Math.max(tally.value, value);
}

const emptyTally = (): Tally => ({ count: 0, firstLine: 0, samples: [], value: 0 });

/** What is done about uneven stamps that are not resampled. */
export const EVEN = 'the samples are taken as evenly spaced at the mean rate';
const COARSE = `the digits of the stamps are too few for their interval, which explains it, so ${EVEN}`;

/** Value of the last digit that stamps are written with, 0 where they have more than are looked for. */
function lastDigit(stamps: number[]): number {
  for (let digits = 0; digits <= FINEST_DIGIT; digits += 1) {
    const scale = 10 ** digits;
    const isWhole = (stamp: number) => Math.abs(stamp * scale - Math.round(stamp * scale)) < 1e-3;
    if (stamps.every(isWhole)) return 1 / scale;
  }
  return 0;
}

/**
 * True where even stamps, each rounded to its last digit, would look like these: a straight line stays within one digit
 * of all of them, counted from the first.
 */
function isCoarse(first: number, steps: Step[]): boolean {
  const stamps = [first];
  for (const { step } of steps) stamps.push((stamps.at(-1) as number) + step);
  const digit = lastDigit(stamps) * (1 + 1e-6);
  const slopes = (sign: number) =>
    stamps.slice(1).map((stamp, i) => (stamp - first + sign * digit) / (i + 1));
  return Math.max(...slopes(-1)) <= Math.min(...slopes(1));
}

/**
 * Watches the time stamps go by: refuses time that runs backwards, counts uneven intervals and gaps against the median
 * of the first intervals, and knows the sample rate at the end. Holds no stamps beyond the first few hundred.
 */
export class TimeAxis {
  private firstStamp = NaN;
  private lastStamp = NaN;
  private rowsSinceLast = 0;
  private intervals = 0;
  private interval = 0;
  private early: Step[] | null = [];
  private regularTime = 0;
  private regularCount = 0;
  private readonly uneven = emptyTally();
  private readonly gaps = emptyTally();
  /** Intervals that are gaps but no pauses, and their time. */
  private longTime = 0;
  private longCount = 0;
  private coarse = false;

  /** Stamps stay in the unit of the file, so that no rounding comes into their differences. */
  constructor(
    private readonly time: TimeChoice,
    private readonly rows: RowWords = LINES,
  ) {}

  /** First time stamp in seconds, null when there is none. */
  get startS(): number | null {
    return Number.isNaN(this.firstStamp) ? null : this.firstStamp * this.time.secondsPerUnit;
  }

  /** The last stamp, NaN before the first. */
  get latest(): number {
    return this.lastStamp;
  }

  /** A row whose time stamp is missing stands in the record like any other. */
  skip(): void {
    this.rowsSinceLast += 1;
  }

  /** True when `stamp` repeats the time of the row before. */
  repeats(stamp: number): boolean {
    return stamp === this.lastStamp && this.rowsSinceLast === 0;
  }

  /** The stamp of the row that becomes sample number `sample`, counted from 0. */
  push(stamp: number, line: number, sample: number): void {
    const rows = this.rowsSinceLast + 1;
    if (Number.isNaN(this.lastStamp)) this.firstStamp = stamp;
    else {
      if (stamp <= this.lastStamp) this.refuseBackwards(stamp, line);
      this.intervals += rows;
      const step = (stamp - this.lastStamp) / rows;
      if (this.early === null) this.judge(step, line, sample);
      else this.defer(this.early, { step, line, sample });
    }
    this.lastStamp = stamp;
    this.rowsSinceLast = 0;
  }

  /** Stamps of rows one after the other, the first at `line` and of sample number `sample`. */
  pushAll(stamps: Float64Array, line: number, sample: number): void {
    for (let i = 0; i < stamps.length; i += 1) this.push(stamps[i] as number, line + i, sample + i);
  }

  /** Sample rate in Hz, from the regular intervals only where whole rows are missing; null with fewer than two stamps. */
  sampleRateHz(): number | null {
    this.settle();
    if (this.intervals === 0) return null;
    if (this.gaps.count > 0 && this.uneven.count === 0 && this.regularCount > 0) {
      return this.regularCount / (this.regularTime * this.time.secondsPerUnit);
    }
    return this.intervals / ((this.lastStamp - this.firstStamp) * this.time.secondsPerUnit);
  }

  /**
   * The grid to which the stamps are to be resampled at their mean rate; null where they are even within 5 %, or where
   * the digits they are written with explain how they differ (judged by the first few hundred).
   */
  evenGrid(): EvenGrid | null {
    this.settle();
    if (this.uneven.count === 0 || this.coarse) return null;
    const regular = this.regularCount + this.longCount;
    const span = this.lastStamp - this.firstStamp;
    const isWhole = regular === this.intervals;
    const interval = isWhole ? span / regular : (this.regularTime + this.longTime) / regular;
    const count = isWhole ? regular + 1 : Math.floor(span / interval + 1e-9) + 1;
    const { secondsPerUnit } = this.time;
    const [first, last] = [this.firstStamp, this.lastStamp];
    return { first, last, interval, count, widest: PAUSE * this.interval, secondsPerUnit };
  }

  /** Refuses stamps that are uneven, whatever the reason. */
  refuseUneven(): void {
    this.settle();
    const { count: times, firstLine } = this.uneven;
    if (times === 0) return;
    const isLine = this.rows.row === 'line';
    refuse(
      'uneven-sampling',
      `${times} intervals between time stamps differ by more than 5 % from the usual one, first at ${this.rows.row} ${firstLine}.`,
      'Export the record with even time stamps, or have it resampled to its mean rate.',
      isLine ? { line: firstLine, column: this.time.column + 1 } : {},
    );
  }

  /** @param treatment what was done about uneven stamps, as the end of a sentence */
  warnings(treatment: string): ReadWarning[] {
    this.settle();
    const found: ReadWarning[] = [];
    if (this.uneven.count > 0) {
      found.push({
        code: 'uneven-sampling',
        message: `${this.uneven.count} intervals between time stamps differ by more than 5 % from the usual one, first at ${this.rows.row} ${this.uneven.firstLine}; ${this.coarse && treatment === EVEN ? COARSE : treatment}.`,
        ...this.placesOf(this.uneven),
        limit: 100 * UNEVEN,
        unit: '%',
      });
    }
    if (this.gaps.count > 0) {
      found.push({
        code: 'gap',
        message: `The time jumps by more than 1.5 sample intervals in ${this.gaps.count} places, first before ${this.rows.row} ${this.gaps.firstLine}${this.uneven.count > 0 ? '' : '; samples are missing there'}.`,
        ...this.placesOf(this.gaps),
        limit: GAP,
        unit: 'sample intervals',
      });
    }
    return found;
  }

  private placesOf({ firstLine, ...tally }: Tally): Omit<Tally, 'firstLine'> & { firstLine?: number } {
    return this.rows.row === 'line' ? { ...tally, firstLine } : tally;
  }

  private defer(early: Step[], step: Step): void {
    early.push(step);
    if (early.length === SETTLE_AFTER) this.settle();
  }

  private settle(): void {
    const early = this.early;
    if (early === null) return;
    this.early = null;
    const steps = early.map(({ step }) => step).sort((a, b) => a - b);
    this.interval = steps[steps.length >> 1] ?? 0;
    this.coarse = isCoarse(this.firstStamp, early);
    for (const { step, line, sample } of early) this.judge(step, line, sample);
  }

  private judge(step: number, line: number, sample: number): void {
    if (step > GAP * this.interval) {
      count(this.gaps, line, sample, step / this.interval);
      if (step <= PAUSE * this.interval) {
        this.longTime += step;
        this.longCount += 1;
      }
      return;
    }
    this.regularTime += step;
    this.regularCount += 1;
    const deviation = Math.abs(step - this.interval) / this.interval;
    if (deviation > UNEVEN) count(this.uneven, line, sample, 100 * deviation);
  }

  private refuseBackwards(stamp: number, line: number): never {
    const same = stamp === this.lastStamp;
    const unit = this.time.unit ?? 's';
    const place = `${this.rows.row === 'line' ? 'Line' : 'Record'} ${line}`;
    refuse(
      same ? 'time-repeated' : 'time-not-increasing',
      same
        ? `${place} repeats the time ${stamp} ${unit} of the row before with different values: one time stamp stands twice.`
        : `${place}: the time runs backwards, ${stamp} ${unit} after ${this.lastStamp} ${unit}. Time stamps must be in increasing order.`,
      same
        ? `Export the time with more digits; ${this.rows.otherwise}.`
        : `Export the record as one piece in the order of time; ${this.rows.otherwise}.`,
      this.rows.row === 'line' ? { line, column: this.time.column + 1 } : {},
    );
  }
}
