import { createCalmSearch } from '../kernels/calm-samples.js';
import { CrestWatch, type CrestFindings } from './crest-watch.js';
import { GridStep } from './grid-step.js';
import { JumpWatch, type Jump } from './jump-watch.js';

export interface FlagScanOptions {
  /** Full-scale ends of an integer format, in the unit of the samples. */
  lowestCode?: number | undefined;
  highestCode?: number | undefined;
}

/** What a pass over the samples of a channel found; flags and bad ranges are drawn from it. */
export interface ScanFindings {
  sampleCount: number;
  lowest: number;
  highest: number;
  /** Step of the grid the samples lie on, in their unit; null when they lie on none. */
  quantisationStep: number | null;
  /** Full-scale ends, the lower one first; null when they are not known. */
  fullScale: [number, number] | null;
  top: CrestFindings;
  bottom: CrestFindings;
  /** The largest third differences, in falling order. */
  jumps: Jump[];
}

export interface FlagScan {
  /**
   * Takes the next samples of the channel.
   *
   * @param first position of the block's first sample in the record, counted on without holes
   * @throws RangeError when samples were left out
   */
  push(block: Float64Array, first: number): void;
  /** The findings over everything that was pushed. Nothing can be pushed afterwards. */
  finish(): ScanFindings;
}

/** Samples this near to the extreme value, in parts of the peak-to-peak value, lie on it. */
const SAME_LEVEL = 1e-6;
const DEPTH_IN_TOLERANCES = 64;
const DEPTH_IN_STEPS = 16;
const END_CODE_TOLERANCE = 1e-10;

/**
 * One pass over the samples of a channel that gathers what its quality flags rest on. The memory needed does not depend
 * on the length of the record, and faults that straddle two blocks count once. Times and values are those of the whole
 * record; the choice of blocks (thousands of samples each, for speed) hardly matters.
 */
export function createFlagScan({ lowestCode, highestCode }: FlagScanOptions = {}): FlagScan {
  return new Scan(
    lowestCode === undefined || highestCode === undefined
      ? null
      : [Math.min(lowestCode, highestCode), Math.max(lowestCode, highestCode)],
  );
}

class Scan implements FlagScan {
  private count = 0;
  private lowest = Infinity;
  private highest = -Infinity;
  private readonly grid = new GridStep();
  private readonly jumps = new JumpWatch();
  private readonly beginCalmSearch = createCalmSearch();
  private jumpGate = 0;
  private readonly top: CrestWatch;
  private readonly bottom: CrestWatch;
  /** The last sample lay at or beyond a gate of `top` or `bottom`. */
  private nearEnd = false;
  /** The last three samples; no third difference before there are as many. */
  private last: [number, number, number] = [NaN, NaN, NaN];

  constructor(private readonly fullScale: [number, number] | null) {
    const tolerance = fullScale === null ? 0 : END_CODE_TOLERANCE * (fullScale[1] - fullScale[0]);
    this.top = new CrestWatch(1, fullScale === null ? Infinity : fullScale[1] - tolerance);
    this.bottom = new CrestWatch(-1, fullScale === null ? Infinity : -(fullScale[0] + tolerance));
  }

  push(block: Float64Array, first: number): void {
    if (first !== this.count) {
      throw new RangeError(
        `The scan stands at sample ${this.count}; a block from sample ${first} on does not follow.`,
      );
    }
    this.grid.push(block);
    if (first === 0) this.lookAhead(block);
    this.aim();
    this.walk(block, first);
    this.count += block.length;
  }

  finish(): ScanFindings {
    this.top.leave(this.count);
    this.bottom.leave(this.count);
    return {
      sampleCount: this.count,
      lowest: this.lowest,
      highest: this.highest,
      quantisationStep: this.grid.step,
      fullScale: this.fullScale,
      top: this.top.findings(),
      bottom: this.bottom.findings(),
      jumps: this.jumps.list(),
    };
  }

  /** With the extremes of the first block known, its first crests are judged like all others. */
  private lookAhead(block: Float64Array): void {
    for (const x of block) {
      if (x < this.lowest) this.lowest = x;
      if (x > this.highest) this.highest = x;
    }
  }

  /** Looks at samples in fours where one of them is near an end of the range or behind a large jump. */
  private walk(block: Float64Array, first: number): void {
    const calmUntil = this.beginCalmSearch(block);
    const gates = () => ({ top: this.top.gate, bottom: -this.bottom.gate, jump: this.jumpGate });
    let i = 0;
    while (i < block.length) {
      if (i >= 3 && !this.nearEnd) i = calmUntil(i, gates());
      for (const end = Math.min(block.length, i + 4); i < end; i++) this.step(block, i, first);
    }
    for (const x of block.subarray(Math.max(0, block.length - 3))) {
      this.last = [this.last[1], this.last[2], x];
    }
  }

  private step(block: Float64Array, i: number, first: number): void {
    const before = (steps: number) => (i >= steps ? block[i - steps]! : this.last[3 + i - steps]!);
    const size = Math.abs(block[i]! - before(3) - 3 * (before(1) - before(2)));
    this.inspect(block[i]!, size, first + i);
  }

  /** @param size third difference at the sample; NaN at the first three */
  private inspect(x: number, size: number, at: number): void {
    const { top, bottom } = this;
    if (size > this.jumpGate) this.jumpGate = this.jumps.note(at, size);
    if (x > this.highest || x < this.lowest) {
      this.lowest = Math.min(this.lowest, x);
      this.highest = Math.max(this.highest, x);
      this.aim();
    }
    if (x >= top.gate) top.see(x, at);
    else if (top.entered) top.leave(at);
    if (-x >= bottom.gate) bottom.see(-x, at);
    else if (bottom.entered) bottom.leave(at);
    this.nearEnd = top.entered || bottom.entered;
  }

  /** Turns both watches to the extremes and the converter step that are known by now. */
  private aim(): void {
    const span = this.highest - this.lowest;
    if (!(span >= 0)) return;
    const tolerance = SAME_LEVEL * span;
    const depth = DEPTH_IN_TOLERANCES * tolerance + DEPTH_IN_STEPS * (this.grid.step ?? 0);
    this.top.aim(this.highest, tolerance, depth);
    this.bottom.aim(-this.lowest, tolerance, depth);
  }
}
