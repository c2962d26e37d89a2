import { createChirpPlan } from '../fft/chirp-plan.js';
import { createSinusoidSolver } from '../model/sinusoid-solver.js';

/** A prepared line analysis of windows of one length. The plan holds scratch space; use one per thread. */
export interface WindowLinePlan {
  /** Whole samples that one window takes. */
  readonly sampleCount: number;
  /** Exact length of the window in samples, may be fractional. */
  readonly windowSamples: number;
  /** Lines k = 0..lineCount − 1 at the frequencies k/windowSamples (cycles per sample). */
  readonly lineCount: number;
  /**
   * Amplitudes of x[n] = Σ_k cosine[k] cos(θ_k (n − c)) + sine[k] sin(θ_k (n − c)), θ_k = 2πk/windowSamples, of the window
   * that starts at sample `start`. Time is counted from the centre of the window, c = start + (sampleCount − 1)/2; the
   * cosine phase of line k at any position p is atan2(−sine[k], cosine[k]) + θ_k (p − c).
   *
   * @param cosine receives lineCount peak amplitudes (line 0: the mean)
   * @param sine receives lineCount peak amplitudes
   */
  amplitudes(samples: Float64Array, start: number, cosine: Float64Array, sine: Float64Array): void;
}

/** rms values of lines given as peak amplitudes; line 0 is the magnitude of the mean. */
export function lineRms(cosine: Float64Array, sine: Float64Array): Float64Array {
  return cosine.map((c, k) => (k === 0 ? Math.abs(c) : Math.hypot(c, sine[k]!) / Math.SQRT2));
}

/**
 * Plan for the lines k = 0..lineCount−1, spacing f0/N, of a rectangular window of exactly `windowSamples` samples
 * (N cycles; may be fractional) that is taken over `sampleCount` whole samples.
 *
 * The lines are evaluated at their exact frequencies (chirp transform). When the window is not a whole number of
 * samples the lines are no longer orthogonal; the orders up to maxOrder are then fitted by least squares and their
 * leakage is taken out of all lines, which leaves an error only on the (small) rest. For whole-sample windows this is
 * the DFT of IEC 61000-4-7.
 *
 * @param cycles periods per window (N): order h is line N·h
 * @param maxOrder highest order whose leakage is taken out
 * @param lineCount lines wanted, by default up to just below order maxOrder + 1; cut at half the sample rate
 */
export function createWindowLines(
  sampleCount: number,
  windowSamples: number,
  cycles: number,
  maxOrder: number,
  lineCount = cycles * (maxOrder + 1),
): WindowLinePlan {
  const spacing = (2 * Math.PI) / windowSamples;
  const count = Math.min(lineCount, Math.ceil(sampleCount / 2 - 0.25));
  const plan = createChirpPlan(sampleCount, count, (i) => (spacing * i * i) / 2);
  const input = new Float64Array(2 * sampleCount);
  const output = new Float64Array(2 * count);
  const removeLeakage = leakageRemoval(sampleCount, spacing, cycles, maxOrder, count);
  const centre = (sampleCount - 1) / 2;
  const turnCos = Float64Array.from({ length: count }, (_, k) => Math.cos(k * spacing * centre));
  const turnSin = Float64Array.from({ length: count }, (_, k) => Math.sin(k * spacing * centre));

  function amplitudes(samples: Float64Array, start: number, cosine: Float64Array, sine: Float64Array): void {
    for (let i = 0; i < sampleCount; i++) input[2 * i] = samples[start + i]!;
    plan.transform(input, output);
    for (let k = 0; k < count; k++) {
      const re = output[2 * k]!;
      const im = output[2 * k + 1]!;
      const scale = (k === 0 ? 1 : 2) / sampleCount;
      cosine[k] = scale * (re * turnCos[k]! - im * turnSin[k]!);
      sine[k] = -scale * (re * turnSin[k]! + im * turnCos[k]!);
    }
    removeLeakage?.(cosine, sine);
  }
  return { sampleCount, windowSamples, lineCount: count, amplitudes };
}

/** Works on line amplitudes in place; null when the lines are orthogonal to rounding. */
function leakageRemoval(
  sampleCount: number,
  spacing: number,
  cycles: number,
  maxOrder: number,
  lineCount: number,
): ((cosine: Float64Array, sine: Float64Array) => void) | null {
  const kernel = Float64Array.from({ length: 2 * lineCount }, (_, q) =>
    q === 0 ? 1 : Math.sin((sampleCount * q * spacing) / 2) / Math.sin((q * spacing) / 2) / sampleCount,
  );
  if (kernel.every((value, q) => q === 0 || Math.abs(value) < 1e-10)) return null;
  const orderCount = Math.min(maxOrder, Math.floor((lineCount - 1) / cycles));
  const angles = Float64Array.from({ length: orderCount + 1 }, (_, h) => h * cycles * spacing);
  const solve = createSinusoidSolver(angles, sampleCount);
  const projected = { cosine: new Float64Array(orderCount + 1), sine: new Float64Array(orderCount + 1) };
  return (cosine, sine) => {
    for (let h = 0; h <= orderCount; h++) {
      const scale = h === 0 ? sampleCount : sampleCount / 2;
      projected.cosine[h] = scale * cosine[h * cycles]!;
      projected.sine[h] = scale * sine[h * cycles]!;
    }
    const model = solve(projected);
    for (let h = 0; h <= orderCount; h++) {
      const line = h * cycles;
      for (let k = 0; k < lineCount; k++) {
        const near = kernel[Math.abs(k - line)]!;
        const far = kernel[k + line]!;
        const share = k === 0 ? 0.5 : 1;
        cosine[k]! -= share * model.cosine[h]! * (near + far);
        sine[k]! -= share * model.sine[h]! * (near - far);
      }
      cosine[line]! += model.cosine[h]!;
      sine[line]! += model.sine[h]!;
    }
  };
}
