import { createRealFftPlan } from '../fft/real-fft-plan.js';
import { windowSamples } from '../windows/window-samples.js';

export interface SpectralPeak {
  frequencyHz: number;
  amplitude: number;
}

const MAX_LENGTH = 2 ** 18;
const MAX_PEAKS = 40;

/**
 * The largest local maxima of the Hann-windowed spectrum of (the middle of) a record, largest first, their frequency
 * interpolated between lines by a parabola through the logarithms (Gasior & Gonzalez, CERN-AB-2004-023).
 * Kept are peaks of at least 1 % of the largest that also stand four times above the median line.
 */
export function spectralPeaks(samples: Float64Array, sampleRateHz: number): SpectralPeak[] {
  const length = Math.min(samples.length, MAX_LENGTH);
  const start = Math.floor((samples.length - length) / 2);
  const window = windowSamples('hann', length);
  const windowed = window.map((w, n) => w * samples[start + n]!);
  const plan = createRealFftPlan(length);
  const re = new Float64Array(plan.lineCount);
  const im = new Float64Array(plan.lineCount);
  plan.forward(windowed, re, im);
  const magnitude = re.map((value, k) => Math.hypot(value, im[k]!));
  const median = magnitude.slice().sort()[magnitude.length >> 1]!;
  const peaks: SpectralPeak[] = [];
  for (let k = 2; k < magnitude.length - 1; k++) {
    const here = magnitude[k]!;
    if (here <= 4 * median || here < magnitude[k - 1]! || here <= magnitude[k + 1]!) continue;
    peaks.push({ frequencyHz: ((k + peakOffset(magnitude, k)) * sampleRateHz) / length, amplitude: here });
  }
  peaks.sort((a, b) => b.amplitude - a.amplitude);
  return peaks.slice(0, MAX_PEAKS).filter((p) => p.amplitude >= 0.01 * peaks[0]!.amplitude);
}

function peakOffset(magnitude: Float64Array, k: number): number {
  const floor = 1e-300;
  const left = Math.log(magnitude[k - 1]! + floor);
  const centre = Math.log(magnitude[k]! + floor);
  const right = Math.log(magnitude[k + 1]! + floor);
  const curvature = left - 2 * centre + right;
  return curvature < 0 ? (0.5 * (left - right)) / curvature : 0;
}
