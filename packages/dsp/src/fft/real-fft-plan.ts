import { createKernel } from '../wasm/kernel.js';
import { createPlanCache } from './plan-cache.js';
import { createKernelRealFftPlan, isKernelRealLength } from './kernel-real-fft-plan.js';
import { createPlainRealFftPlan } from './plain-real-fft-plan.js';

/** A prepared DFT of a real sequence. The plan holds tables and scratch space; use one per thread. */
export interface RealFftPlan {
  readonly length: number;
  /** Lines from DC up to and including half the sample rate: floor(length/2) + 1. */
  readonly lineCount: number;
  /** Reads `length` samples of `input` from `offset`, writes `lineCount` values to `re` and `im`. */
  forward(input: Float64Array, re: Float64Array, im: Float64Array, offset?: number): void;
}

const plans = createPlanCache<RealFftPlan>();

/**
 * Plan for the forward DFT X_k = Σ x_n e^(−j2πkn/N), unscaled, of a real sequence of any length N ≥ 1. Relative error
 * (rms over the lines) a few units of double precision. Runs as compiled WebAssembly where the platform has it. The
 * plans used last are kept, so that asking again for a length costs nothing.
 *
 * @throws RangeError when the length is not a positive integer
 */
export function createRealFftPlan(length: number): RealFftPlan {
  if (!Number.isInteger(length) || length < 1)
    throw new RangeError(`FFT length must be a positive integer, got ${length}`);
  if (!isKernelRealLength(length)) return createPlainRealFftPlan(length);
  return plans.get(`${length}`, length, () => {
    const kernel = createKernel();
    return kernel === null ? createPlainRealFftPlan(length) : createKernelRealFftPlan(kernel, length);
  });
}
