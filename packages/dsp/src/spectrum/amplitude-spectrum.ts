import { createRealFftPlan } from '../fft/real-fft-plan.js';
import type { SpectrumResult } from '../types.js';
import { windowSamples, type WindowName } from '../windows/window-samples.js';

export interface SpectrumOptions {
  window: WindowName;
  /** Samples per averaged segment; half-overlapping segments from the first sample, a last incomplete one is dropped. */
  segmentLength: number;
  onSegment?: (fraction: number) => void;
}

/**
 * One-sided rms amplitude spectrum, DC to half the sample rate, amplitude-corrected by the coherent gain of the window;
 * power average over half-overlapping segments (P. D. Welch, IEEE Trans. AU-15, 1967; scaling as in Heinzel, Rüdiger,
 * Schilling 2002, section 9). One segment of the whole record gives the plain windowed spectrum.
 */
export function amplitudeSpectrum(
  samples: Float64Array,
  sampleRateHz: number,
  options: SpectrumOptions,
): SpectrumResult {
  const length = Math.min(samples.length, options.segmentLength);
  const window = windowSamples(options.window, length);
  const windowSum = window.reduce((sum, w) => sum + w, 0);
  const plan = createRealFftPlan(length);
  const re = new Float64Array(plan.lineCount);
  const im = new Float64Array(plan.lineCount);
  const windowed = new Float64Array(length);
  const power = new Float64Array(plan.lineCount);
  const hop = Math.max(1, Math.floor(length / 2));
  const count = Math.floor((samples.length - length) / hop) + 1;
  for (let s = 0; s < count; s++) {
    for (let i = 0; i < length; i++) windowed[i] = samples[s * hop + i]! * window[i]!;
    plan.forward(windowed, re, im);
    for (let k = 0; k < power.length; k++) power[k]! += re[k]! ** 2 + im[k]! ** 2;
    options.onSegment?.((s + 1) / count);
  }
  const rms = power.map((value, k) => {
    const single = k === 0 || 2 * k === length;
    return Math.sqrt(((single ? 1 : 2) * value) / count) / windowSum;
  });
  return { startHz: 0, stepHz: sampleRateHz / length, rms, window: options.window };
}
