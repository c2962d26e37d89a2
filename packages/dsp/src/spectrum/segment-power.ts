import { isKernelLength } from '../fft/kernel-transform.js';
import { createKernelSegmentPower } from './kernel-segment-power.js';
import { createPlainSegmentPower } from './plain-segment-power.js';

/** Sums |DFT|² of windowed segments of one length, line by line. */
export interface SegmentPower {
  /** Σ|X_k|² over the segments added so far, DC to half the sample rate. Computed when asked for. */
  readonly sum: Float64Array;
  /** Adds the segment of `samples` that starts at `offset`. */
  add(samples: Float64Array, offset: number): void;
}

/**
 * Runs as compiled WebAssembly where the platform has it, two segments in one complex transform.
 *
 * @param removeMean takes the mean of each segment away before it is windowed
 */
export function createSegmentPower(window: Float64Array, removeMean: boolean): SegmentPower {
  const compiled = isKernelLength(window.length) ? createKernelSegmentPower(window, removeMean) : null;
  return compiled ?? createPlainSegmentPower(window, removeMean);
}
