import { createComplexFftPlan } from './complex-fft-plan.js';
import type { RealFftPlan } from './real-fft-plan.js';

/**
 * The transform of `createRealFftPlan` in plain TypeScript, for platforms without WebAssembly SIMD. Even lengths run as
 * one complex transform of half the length (Cooley, Lewis, Welch 1970).
 */
export function createPlainRealFftPlan(length: number): RealFftPlan {
  return length % 2 === 0 ? evenPlan(length) : oddPlan(length);
}

function oddPlan(length: number): RealFftPlan {
  const plan = createComplexFftPlan(length);
  const lineCount = (length + 1) / 2;
  const input = new Float64Array(2 * length);
  const output = new Float64Array(2 * length);
  return {
    length,
    lineCount,
    forward(samples, re, im, offset = 0) {
      for (let i = 0; i < length; i++) input[2 * i] = samples[offset + i]!;
      plan.transform(input, output);
      for (let k = 0; k < lineCount; k++) {
        re[k] = output[2 * k]!;
        im[k] = output[2 * k + 1]!;
      }
    },
  };
}

function evenPlan(length: number): RealFftPlan {
  const half = length / 2;
  const plan = createComplexFftPlan(half);
  const output = new Array<number>(length).fill(0);
  const cosine = new Float64Array(half + 1);
  const sine = new Float64Array(half + 1);
  for (let k = 0; k <= half; k++) {
    cosine[k] = Math.cos((2 * Math.PI * k) / length);
    sine[k] = Math.sin((2 * Math.PI * k) / length);
  }
  return {
    length,
    lineCount: half + 1,
    forward(samples, re, im, offset = 0) {
      plan.transform(samples.subarray(offset, offset + length), output);
      for (let k = 0; k <= half; k++) {
        const a = 2 * (k % half);
        const b = 2 * ((half - k) % half);
        const evenRe = 0.5 * (output[a]! + output[b]!);
        const evenIm = 0.5 * (output[a + 1]! - output[b + 1]!);
        const oddRe = 0.5 * (output[a + 1]! + output[b + 1]!);
        const oddIm = -0.5 * (output[a]! - output[b]!);
        re[k] = evenRe + cosine[k]! * oddRe + sine[k]! * oddIm;
        im[k] = evenIm + cosine[k]! * oddIm - sine[k]! * oddRe;
      }
    },
  };
}
