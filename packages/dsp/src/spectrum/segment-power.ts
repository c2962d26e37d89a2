import { createRealFftPlan } from '../fft/real-fft-plan.js';

/** Sums |DFT|² of windowed segments of one length, line by line. */
export interface SegmentPower {
  /** Σ|X_k|² over the segments added so far, DC to half the sample rate. */
  readonly sum: Float64Array;
  /** Adds the segment of `samples` that starts at `offset`. */
  add(samples: Float64Array, offset: number): void;
}

/** @param removeMean takes the mean of each segment away before it is windowed */
export function createSegmentPower(window: Float64Array, removeMean: boolean): SegmentPower {
  const length = window.length;
  const plan = createRealFftPlan(length);
  const sum = new Float64Array(plan.lineCount);
  const re = new Float64Array(plan.lineCount);
  const im = new Float64Array(plan.lineCount);
  const windowed = new Float64Array(length);
  return {
    sum,
    add(samples, offset) {
      const mean = removeMean ? meanOf(samples, offset, length) : 0;
      for (let i = 0; i < length; i++) windowed[i] = (samples[offset + i]! - mean) * window[i]!;
      plan.forward(windowed, re, im);
      for (let k = 0; k < sum.length; k++) sum[k]! += re[k]! * re[k]! + im[k]! * im[k]!;
    },
  };
}

function meanOf(samples: Float64Array, offset: number, length: number): number {
  let sum = 0;
  for (let i = offset; i < offset + length; i++) sum += samples[i]!;
  return sum / length;
}
