import { createPlainRealFftPlan } from '../fft/plain-real-fft-plan.js';
import type { SegmentPower } from './segment-power.js';

/** `createSegmentPower` in plain TypeScript, for platforms without WebAssembly SIMD. */
export function createPlainSegmentPower(window: Float64Array, removeMean: boolean): SegmentPower {
  const length = window.length;
  const plan = createPlainRealFftPlan(length);
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
