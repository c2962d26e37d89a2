import { residualLength, residualSpectrum } from './residual-spectrum.js';
import { subtractSinusoid } from './subtract-sinusoid.js';
import { fitTone } from './tone-fit.js';
import type { FrequencyBand, ToneOptions, TonePowers } from './tone-result.js';

export const DEFAULT_TONE_ORDER = 10;
/** Lines kept for the search of the largest spur over several stretches. */
const KEPT_SPURS = 32;
/** Cycles by which a coherent record may miss a whole number. */
const COHERENT_CYCLES = 0.01;
/** A noise line exceeds this many times its mean power with probability e^−25. */
const SIGNIFICANCE = 25;

/**
 * Mean powers of tone, harmonics and the rest of a stretch: least-squares model of offset, tone and harmonics (IEEE 1241,
 * 4.1.4; IEEE 1057 with the frequency among the unknowns); the tone is taken away sample by sample, so that the rest
 * keeps its digits.
 */
export function tonePowers(
  samples: Float64Array,
  sampleRateHz: number,
  fundamentalHz: number,
  { maxOrder = DEFAULT_TONE_ORDER, band }: ToneOptions,
): TonePowers {
  const count = samples.length;
  const { dc, tone, harmonics } = fitTone(samples, sampleRateHz, fundamentalHz, maxOrder);
  const cycles = (tone.frequencyHz * count) / sampleRateHz;
  const coherent = Math.abs(cycles - Math.round(cycles)) < COHERENT_CYCLES;
  const padded = new Float64Array(residualLength(count, coherent));
  const rest = padded.subarray(0, count);
  const noiseAndDistortion = subtractSinusoid(samples, sampleRateHz, tone, dc, rest);

  const clear = harmonics.filter((h) => h.rms ** 2 > (SIGNIFICANCE * noiseAndDistortion) / count);
  const restPower = clear.reduce(
    (_, harmonic) => subtractSinusoid(rest, sampleRateHz, harmonic, 0, rest),
    noiseAndDistortion,
  );
  // Harmonics within the noise were left in; their power, all but noise itself, is not made up for.
  const drowned = harmonics.reduce((sum, h) => (clear.includes(h) ? sum : sum + h.rms ** 2), 0);
  const spectrum = residualSpectrum(padded, count, sampleRateHz, coherent);

  return {
    sampleCount: count,
    sampleRateHz,
    frequencyHz: tone.frequencyHz,
    dc,
    tone: tone.rms ** 2,
    harmonics: Array.from({ length: maxOrder - 1 }, (_, i) => {
      const line = harmonics.find(({ order }) => order === i + 2);
      return line ? { frequencyHz: line.frequencyHz, power: line.rms ** 2 } : null;
    }),
    noiseAndDistortion,
    noise: Math.max(0, restPower - drowned),
    bandNoiseAndDistortion: band
      ? spectrum.share(band) * restPower +
        clear.filter((h) => inBand(h.frequencyHz, band)).reduce((sum, h) => sum + h.rms ** 2, 0)
      : null,
    noiseDensitySquared: spectrum.densitySquared,
    spurs: spectrum.spurs(KEPT_SPURS),
  };
}

export function inBand(frequencyHz: number, { fromHz, toHz }: FrequencyBand): boolean {
  return frequencyHz >= fromHz && frequencyHz <= toHz;
}
