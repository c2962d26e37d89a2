import type { FittedSinusoid } from '../model/fit-sinusoids.js';

const BLOCK = 256;

/**
 * Takes √2 rms cos(2πft + phase) away from the samples, in place. The carrier stands in a table of one block and is
 * turned to its place by the trigonometric functions once per block, so that no rounding builds up.
 */
export function subtractSinusoid(
  samples: Float64Array,
  sampleRateHz: number,
  { frequencyHz, rms, phaseDeg }: FittedSinusoid,
): void {
  const angle = (2 * Math.PI * frequencyHz) / sampleRateHz;
  const cosine = Float64Array.from({ length: BLOCK }, (_, i) => Math.cos(angle * i));
  const sine = Float64Array.from({ length: BLOCK }, (_, i) => Math.sin(angle * i));
  for (let start = 0; start < samples.length; start += BLOCK) {
    const phase = angle * start + (phaseDeg * Math.PI) / 180;
    const re = Math.SQRT2 * rms * Math.cos(phase);
    const im = Math.SQRT2 * rms * Math.sin(phase);
    const count = Math.min(BLOCK, samples.length - start);
    for (let i = 0; i < count; i++) samples[start + i]! -= re * cosine[i]! - im * sine[i]!;
  }
}
