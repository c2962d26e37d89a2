import type { SpectrumResult } from '../types.js';
import type { WindowName } from '../windows/window-samples.js';
import { createWelch } from './welch.js';

export interface SpectrumOptions {
  window: WindowName;
  /** Kaiser only. */
  kaiserBeta?: number | undefined;
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
  { window, kaiserBeta, segmentLength, onSegment }: SpectrumOptions,
): SpectrumResult {
  const length = Math.min(samples.length, segmentLength);
  const overlapSamples = Math.floor(length / 2);
  const average = createWelch(sampleRateHz, {
    ...{ window, kaiserBeta, overlapSamples, segmentLength: length },
    ...({ detrend: 'none', scaling: 'spectrum' } as const),
  });
  for (let at = 0; at < samples.length; at += length) {
    average.push(samples.subarray(at, at + length));
    onSegment?.(Math.min(1, (at + length) / samples.length));
  }
  const { stepHz, power, segments, noiseBandwidthHz } = average.finish()!;
  return { startHz: 0, stepHz, rms: power.map(Math.sqrt), window, noiseBandwidthHz, segments };
}
