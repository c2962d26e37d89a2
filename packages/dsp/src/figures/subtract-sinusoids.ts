import type { FittedSinusoid } from '../model/fit-sinusoids.js';

const RESTART_EVERY = 2048;

/**
 * The samples minus a constant and sinusoids √2 rms cos(2πft + phase). The carrier is turned by recurrence and
 * restarted from the trigonometric functions every 2048 samples, so that rounding does not build up.
 */
export function subtractSinusoids(
  samples: Float64Array,
  sampleRateHz: number,
  dc: number,
  components: readonly FittedSinusoid[],
): Float64Array {
  const out = samples.map((x) => x - dc);
  for (const { frequencyHz, rms, phaseDeg } of components) {
    const angle = (2 * Math.PI * frequencyHz) / sampleRateHz;
    const turnRe = Math.cos(angle);
    const turnIm = Math.sin(angle);
    let re = 0;
    let im = 0;
    for (let n = 0; n < out.length; n++) {
      if (n % RESTART_EVERY === 0) {
        re = Math.SQRT2 * rms * Math.cos(angle * n + (phaseDeg * Math.PI) / 180);
        im = Math.SQRT2 * rms * Math.sin(angle * n + (phaseDeg * Math.PI) / 180);
      }
      out[n]! -= re;
      const next = re * turnRe - im * turnIm;
      im = re * turnIm + im * turnRe;
      re = next;
    }
  }
  return out;
}
