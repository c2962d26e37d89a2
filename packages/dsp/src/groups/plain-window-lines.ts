import { createChirpPlan } from '../fft/chirp-plan.js';
import { leakageCurve, orderFit, removeLeakage } from './leakage.js';
import { lineRms, ordersOf, type WindowLinePlan, type WindowShape } from './window-shape.js';

/**
 * `createWindowLines` in plain TypeScript, by a chirp transform of each window; for platforms without WebAssembly SIMD.
 */
export function createPlainWindowLines(shape: WindowShape): WindowLinePlan {
  const { sampleCount, windowSamples, cycles, lineCount } = shape;
  const spacing = (2 * Math.PI) / windowSamples;
  const plan = createChirpPlan(sampleCount, lineCount, (i) => (spacing * i * i) / 2);
  const input = new Float64Array(2 * sampleCount);
  const output = new Float64Array(2 * lineCount);
  const curve = leakageCurve(sampleCount, windowSamples);
  const fit = curve && orderFit(curve, cycles, ordersOf(shape));
  const centre = (sampleCount - 1) / 2;
  const turnCos = Float64Array.from({ length: lineCount }, (_, k) => Math.cos(k * spacing * centre));
  const turnSin = Float64Array.from({ length: lineCount }, (_, k) => Math.sin(k * spacing * centre));

  function amplitudes(
    samples: Float64Array,
    start: number,
    cosine: Float64Array,
    sine: Float64Array,
    rms?: Float64Array,
  ): number {
    let squares = 0;
    for (let i = 0; i < sampleCount; i++) {
      const x = samples[start + i]!;
      input[2 * i] = x;
      squares += x * x;
    }
    plan.transform(input, output);
    for (let k = 0; k < lineCount; k++) {
      const re = output[2 * k]!;
      const im = output[2 * k + 1]!;
      const scale = (k === 0 ? 1 : 2) / sampleCount;
      cosine[k] = scale * (re * turnCos[k]! - im * turnSin[k]!);
      sine[k] = -scale * (re * turnSin[k]! + im * turnCos[k]!);
    }
    if (curve && fit) removeLeakage(curve, fit, cycles, cosine, sine);
    rms?.set(lineRms(cosine, sine));
    return Math.sqrt(squares / sampleCount);
  }
  return { sampleCount, windowSamples, lineCount, amplitudes };
}
