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
  private jumpGate = 0;
  private readonly top: CrestWatch;
  private readonly bottom: CrestWatch;
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
    if (block.length === 0) return;
    this.prepare(block);
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

  /** The extremes are known before the samples are looked at one by one. */
  private prepare(block: Float64Array): void {
    let low = Infinity;
    let high = -Infinity;
    for (let i = 0; i < block.length; i++) {
      const x = block[i]!;
      if (x < low) low = x;
      if (x > high) high = x;
    }
    this.lowest = Math.min(this.lowest, low);
    this.highest = Math.max(this.highest, high);
    this.grid.push(block, Math.max(Math.abs(low), Math.abs(high)));
    const tolerance = SAME_LEVEL * (this.highest - this.lowest);
    const depth = DEPTH_IN_TOLERANCES * tolerance + DEPTH_IN_STEPS * (this.grid.step ?? 0);
    this.top.expect(high, tolerance, depth);
    this.bottom.expect(-low, tolerance, depth);
  }

  private walk(block: Float64Array, first: number): void {
    const { top, bottom, jumps } = this;
    const topGate = top.gate;
    const bottomGate = -bottom.gate;
    let { jumpGate, nearEnd } = this;
    let [a, b, c] = this.last;
    for (let i = 0; i < block.length; i++) {
      const x = block[i]!;
      const size = Math.abs(x - a - 3 * (c - b));
      if (size > jumpGate) jumpGate = jumps.note(first + i, size);
      if (x >= topGate || x <= bottomGate) {
        top.see(x, first + i);
        bottom.see(-x, first + i);
        nearEnd = true;
      } else if (nearEnd) {
        top.leave(first + i);
        bottom.leave(first + i);
        nearEnd = false;
      }
      a = b;
      b = c;
      c = x;
    }
    this.last = [a, b, c];
    this.jumpGate = jumpGate;
    this.nearEnd = nearEnd;
  }
}
