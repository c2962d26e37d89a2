import { BoundedRanges, type SampleRange } from './bounded-ranges.js';
import { MAX_TIMES } from './evidence.js';

/** Flat crests and saturated runs at one end of the range of a record. */
export interface CrestFindings {
  /** The extreme value, with its own sign. */
  level: number;
  /** Crests that lie flat at the level and end sharply. */
  flat: RunFindings;
  /** Runs of samples at the end code of the converter. */
  saturated: RunFindings;
}

export interface RunFindings {
  count: number;
  /** Samples in all runs, and in the longest. */
  samples: number;
  longest: number;
  /** Where the first 20 begin. */
  positions: number[];
  ranges: SampleRange[];
}

const MIN_FLAT_RUN = 3;
const MIN_SATURATED_RUN = 2;
/**
 * A smooth crest of order p widens by 64^(1/p) at 64 times the depth: 8 for a sine, 2.8 for the flattest mixture of two
 * orders; at 16 converter steps by at least 17^(1/p): 4.1 and 2. A limited crest hardly widens.
 */
const MAX_WIDENING = 1.7;

/**
 * Watches one end of the range while the samples go by. Runs are kept at the extreme seen so far and dropped when it is
 * exceeded, so that at the end those at the extreme of the record are left.
 *
 * Crests that look flat because of fine sampling or a coarse converter step widen when samples somewhat deeper are
 * counted in; limited crests do not. Common practice; no standard defines this check.
 *
 * Values are turned for the lower end (sign −1), so that the extreme is always the largest.
 */
export class CrestWatch {
  /** Samples at or above the gate must be shown to `see`. */
  gate = Infinity;
  /** The last sample was one of these. */
  entered = false;
  private level = -Infinity;
  private flatFrom = Infinity;
  private start = -1;
  private run = 0;
  private longest = 0;
  private saturatedStart = -1;
  private readonly flat = new RunTally();
  private readonly saturated = new RunTally();

  /** @param endCode value of the end code, turned; samples from there on are saturated */
  constructor(
    private readonly sign: 1 | -1,
    private readonly endCode: number,
  ) {}

  /**
   * Turns to a new extreme. Runs at the one before are dropped when they lie below it by more than the tolerance; a
   * crest that is going on is then judged with the width it has so far, which can only let it pass as smooth.
   *
   * @param extreme largest value so far
   * @param tolerance how far below the extreme a sample still lies on the flat
   * @param depth how deep the second look at a crest goes
   */
  aim(extreme: number, tolerance: number, depth: number): void {
    if (extreme > this.level + tolerance) {
      if (extreme - this.level > depth) this.entered = false;
      this.level = extreme;
      this.run = 0;
      this.longest = 0;
      this.flat.clear();
    }
    this.flatFrom = this.level - tolerance;
    this.gate = Math.min(this.level - depth, this.endCode);
  }

  /** Takes a sample at or above the gate. */
  see(value: number, at: number): void {
    if (!this.entered) {
      this.entered = true;
      this.start = at;
    }
    if (value < this.flatFrom) this.run = 0;
    else if (++this.run > this.longest) this.longest = this.run;
    if (value >= this.endCode) {
      if (this.saturatedStart < 0) this.saturatedStart = at;
    } else if (this.saturatedStart >= 0) this.endSaturated(at);
  }

  /** The samples went below the gate, or the record ended, at `at`. */
  leave(at: number): void {
    if (this.saturatedStart >= 0) this.endSaturated(at);
    const width = at - this.start;
    if (this.longest >= MIN_FLAT_RUN && width <= MAX_WIDENING * this.longest) {
      this.flat.add(this.start, at, this.longest);
    }
    this.entered = false;
    this.run = 0;
    this.longest = 0;
  }

  findings(): CrestFindings {
    return {
      level: this.sign * this.level,
      flat: this.flat.findings(),
      saturated: this.saturated.findings(),
    };
  }

  private endSaturated(at: number): void {
    const run = at - this.saturatedStart;
    if (run >= MIN_SATURATED_RUN) this.saturated.add(this.saturatedStart, at, run);
    this.saturatedStart = -1;
  }
}

class RunTally {
  private count = 0;
  private samples = 0;
  private longest = 0;
  private positions: number[] = [];
  private readonly ranges = new BoundedRanges();

  add(start: number, end: number, run: number): void {
    this.count++;
    this.samples += run;
    this.longest = Math.max(this.longest, run);
    if (this.positions.length < MAX_TIMES) this.positions.push(start);
    this.ranges.push(start, end);
  }

  clear(): void {
    this.count = 0;
    this.samples = 0;
    this.longest = 0;
    this.positions = [];
    this.ranges.clear();
  }

  findings(): RunFindings {
    const { count, samples, longest, positions } = this;
    return { count, samples, longest, positions: [...positions], ranges: this.ranges.list() };
  }
}
