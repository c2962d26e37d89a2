import { combineTonePowers } from './combine-tone-powers.js';
import { DEFAULT_TONE_ORDER, inBand, tonePowers } from './tone-powers.js';
import type { Spur, ToneOptions, TonePowers, ToneResult } from './tone-result.js';

const FULL_SCALE_SINE_DB = 10 * Math.log10(1.5);
const DB_PER_BIT = 20 * Math.log10(2);
/** Relative rounding of the phase of a tone in double precision, per cycle: its square is what remains of a perfect tone. */
const ROUNDING_PER_CYCLE = 2 * Math.PI * Number.EPSILON;
/** Power ratio of the rounding of the samples themselves. */
const ROUNDING_OF_SAMPLES = 1e-28;

/**
 * Single-tone quality figures of a stretch (IEEE 1241 and IEEE 1057, sine-wave tests; IEC 60268-3 for THD+N):
 * SINAD = P1/NAD, NAD = everything but tone and DC; SNR = P1/(NAD − harmonics); THD_F = √(harmonics)/√P1;
 * THD+N = √NAD relative to the total AC rms (audio convention); SFDR = P1 over the largest other line;
 * ENOB = (SINAD − 1.76 dB)/6.02 dB, at full scale with SINAD raised by what the tone lacks to it. Harmonics above half
 * the sample rate are taken where they fold to. Bandwidth: DC to half the sample rate, no weighting.
 *
 * A record longer than `longestToneStretch` samples is analysed in stretches of equal length, whose results
 * `combineToneFigures` puts together; time and memory then grow no faster than the record, and a tone that moves slowly
 * is not counted as noise.
 *
 * @param fundamentalHz frequency of the tone, right to about half a line of the stretch; it is refined
 */
export function toneFigures(
  samples: Float64Array,
  sampleRateHz: number,
  fundamentalHz: number,
  options: ToneOptions = {},
): ToneResult {
  return figuresOf(tonePowers(samples, sampleRateHz, fundamentalHz, options), options);
}

/**
 * The figures of a record from those of its stretches: powers are averaged with the number of samples as weight, spurs
 * line by line.
 *
 * @param stretches at least one result of `toneFigures`, all with the same options
 */
export function combineToneFigures(stretches: readonly ToneResult[], options: ToneOptions = {}): ToneResult {
  return figuresOf(combineTonePowers(stretches.map(({ powers }) => powers)), options);
}

function figuresOf(powers: TonePowers, options: ToneOptions): ToneResult {
  const { fullScalePeak, band = null, maxOrder = DEFAULT_TONE_ORDER } = options;
  const { tone, noiseAndDistortion: nad, harmonics } = powers;
  const distortion = harmonics.reduce((sum, h) => sum + (h?.power ?? 0), 0);
  const sinadDb = overTone(powers, nad);
  const levelDbfs = fullScalePeak ? 10 * Math.log10((2 * tone) / fullScalePeak ** 2) : null;
  // Where the rest is mere rounding, so is its largest line.
  const spur = sinadDb === null ? null : largestSpur(powers);
  const toneInBand = band !== null && inBand(powers.frequencyHz, band);
  return {
    frequencyHz: powers.frequencyHz,
    rms: Math.sqrt(tone),
    dc: powers.dc,
    levelDbfs,
    thdFPercent: 100 * Math.sqrt(distortion / tone),
    thdRPercent: 100 * Math.sqrt(distortion / (distortion + tone)),
    thdPlusNPercent: 100 * Math.sqrt(nad / (tone + nad)),
    thdPlusNBandPercent: toneInBand ? bandPercent(tone, powers.bandNoiseAndDistortion) : null,
    bandHz: band,
    sinadDb,
    snrDb: overTone(powers, powers.noise),
    sfdrDb: spur && overTone(powers, spur.power),
    spurFrequencyHz: spur && spur.frequencyHz,
    enobBits: bits(sinadDb),
    enobFullScaleBits: sinadDb === null || levelDbfs === null ? null : bits(sinadDb - levelDbfs),
    noiseDensity: sinadDb === null ? null : Math.sqrt(powers.noiseDensitySquared),
    harmonicsDbc: Array.from({ length: maxOrder - 1 }, (_, i) => harmonicDbc(powers, harmonics[i] ?? null)),
    powers,
  };
}

function largestSpur({ spurs, harmonics }: TonePowers): Spur | null {
  return [...spurs, ...harmonics].reduce<Spur | null>(
    (largest, line) => (line && line.power > (largest?.power ?? 0) ? line : largest),
    null,
  );
}

function bandPercent(tone: number, bandNoise: number | null): number | null {
  return bandNoise === null ? null : 100 * Math.sqrt(bandNoise / (tone + bandNoise));
}

function harmonicDbc(powers: TonePowers, harmonic: Spur | null): number | null {
  const level = harmonic && overTone(powers, harmonic.power);
  return level === null ? null : -level;
}

function bits(sinadDb: number | null): number | null {
  return sinadDb === null ? null : (sinadDb - FULL_SCALE_SINE_DB) / DB_PER_BIT;
}

/** Level of the tone over another power; null where that is no more than rounding. */
function overTone(
  { tone, frequencyHz, sampleCount, sampleRateHz }: TonePowers,
  other: number,
): number | null {
  const cycles = (frequencyHz * sampleCount) / sampleRateHz;
  const rounding = ROUNDING_OF_SAMPLES + (ROUNDING_PER_CYCLE * cycles) ** 2;
  return other > rounding * tone ? 10 * Math.log10(tone / other) : null;
}
