import type { FittedSinusoid } from '../model/fit-sinusoids.js';

const BLOCK = 256;

/**
 * Writes to `to` what is left of the samples without a constant and √2 rms cos(2πft + phase); both may be the same array.
 * The carrier stands in a table of one block and is turned to its place by the trigonometric functions once per block,
 * so that no rounding builds up.
 *
 * @returns mean square of what is left
 */
export function subtractSinusoid(
  samples: Float64Array,
  sampleRateHz: number,
  { frequencyHz, rms, phaseDeg }: FittedSinusoid,
  offset: number,
  to: Float64Array,
): number {
  const angle = (2 * Math.PI * frequencyHz) / sampleRateHz;
  const cosine = Float64Array.from({ length: BLOCK }, (_, i) => Math.cos(angle * i));
  const sine = Float64Array.from({ length: BLOCK }, (_, i) => Math.sin(angle * i));
  let squares = 0;
  for (let start = 0; start < samples.length; start += BLOCK) {
    const phase = angle * start + (phaseDeg * Math.PI) / 180;
    const re = Math.SQRT2 * rms * Math.cos(phase);
    const im = Math.SQRT2 * rms * Math.sin(phase);
    const count = Math.min(BLOCK, samples.length - start);
    for (let i = 0; i < count; i++) {
      const rest = samples[start + i]! - offset - (re * cosine[i]! - im * sine[i]!);
      to[start + i] = rest;
      squares += rest * rest;
    }
  }
  return squares / samples.length;
}
