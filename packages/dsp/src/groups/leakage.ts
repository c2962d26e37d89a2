import { createSinusoidSolver } from '../model/sinusoid-solver.js';

/** Kernel values below this are rounding: the lines are orthogonal then. */
const ROUNDING = 1e-10;

/** What the orders of a window of a broken number of samples leak into its lines. */
export interface Leakage {
  /** Orders fitted, DC (order 0) included; order h is line cycles·h. */
  readonly orderCount: number;
  /** d(q), q = 0, 1, …: what a line of amplitude 1 leaks into a line q lines away. */
  readonly kernel: Float64Array;
  /**
   * Rows of orderCount numbers: amplitudes of the orders, fitted by least squares, from the amplitudes that the lines have
   * at their places. Separately for cosines and sines, which are orthogonal about the centre of the window.
   */
  readonly cosineFit: Float64Array;
  readonly sineFit: Float64Array;
}

/**
 * Leakage of the orders up to maxOrder of a rectangular window of `sampleCount` samples into lines spaced by 1/windowSamples.
 *
 * @returns null when the lines are orthogonal to rounding
 */
export function windowLeakage(
  sampleCount: number,
  windowSamples: number,
  cycles: number,
  maxOrder: number,
  lineCount: number,
): Leakage | null {
  const spacing = (2 * Math.PI) / windowSamples;
  const kernel = Float64Array.from({ length: 2 * lineCount }, (_, q) =>
    q === 0 ? 1 : Math.sin((sampleCount * q * spacing) / 2) / Math.sin((q * spacing) / 2) / sampleCount,
  );
  if (kernel.every((value, q) => q === 0 || Math.abs(value) < ROUNDING)) return null;
  const orderCount = Math.min(maxOrder, Math.floor((lineCount - 1) / cycles)) + 1;
  const angles = Float64Array.from({ length: orderCount }, (_, h) => h * cycles * spacing);
  const solve = createSinusoidSolver(angles, sampleCount);
  const cosineFit = new Float64Array(orderCount * orderCount);
  const sineFit = new Float64Array(orderCount * orderCount);
  const unit = new Float64Array(orderCount);
  for (let i = 0; i < orderCount; i++) {
    // Σ x cos(θ(n − c)) of a line of amplitude 1.
    unit.fill(0)[i] = i === 0 ? sampleCount : sampleCount / 2;
    const { cosine, sine } = solve({ cosine: unit, sine: unit });
    for (let h = 0; h < orderCount; h++) {
      cosineFit[h * orderCount + i] = cosine[h]!;
      sineFit[h * orderCount + i] = sine[h]!;
    }
  }
  return { orderCount, kernel, cosineFit, sineFit };
}

/** Takes the leakage of the orders out of line amplitudes about the centre of the window, in place. */
export function removeLeakage(
  { orderCount, kernel, cosineFit, sineFit }: Leakage,
  cycles: number,
  cosine: Float64Array,
  sine: Float64Array,
): void {
  const orderCosine = fitOrders(cosineFit, orderCount, cosine, cycles);
  const orderSine = fitOrders(sineFit, orderCount, sine, cycles);
  for (let h = 0; h < orderCount; h++) {
    const line = h * cycles;
    for (let k = 0; k < cosine.length; k++) {
      const near = kernel[Math.abs(k - line)]!;
      const far = kernel[k + line]!;
      const share = k === 0 ? 0.5 : 1;
      cosine[k]! -= share * orderCosine[h]! * (near + far);
      sine[k]! -= share * orderSine[h]! * (near - far);
    }
    cosine[line]! += orderCosine[h]!;
    sine[line]! += orderSine[h]!;
  }
}

function fitOrders(matrix: Float64Array, size: number, lines: Float64Array, cycles: number): Float64Array {
  const fitted = new Float64Array(size);
  for (let h = 0; h < size; h++) {
    for (let i = 0; i < size; i++) fitted[h]! += matrix[h * size + i]! * lines[i * cycles]!;
  }
  return fitted;
}
