import { fitSinusoids, type FittedSinusoid } from '../model/fit-sinusoids.js';
import { amplitudeSpectrum } from '../spectrum/amplitude-spectrum.js';
import type { ToneFigures } from '../types.js';
import { foldedFrequency } from './folded-frequency.js';
import { subtractSinusoids } from './subtract-sinusoids.js';
import { waveformFigures } from './waveform-figures.js';

const FULL_SCALE_SINE_DB = 10 * Math.log10(1.5);
const DB_PER_BIT = 20 * Math.log10(2);
/** Power ratios below this are rounding of double precision, not a measurement. */
const SMALLEST_RATIO = 1e-28;

export interface ToneResult extends ToneFigures {
  thdFPercent: number | null;
  thdRPercent: number | null;
  /** Orders 2, 3, … relative to the tone; null where an order cannot be told apart after folding. */
  harmonicsDbc: (number | null)[];
}

/**
 * Single-tone quality figures from a least-squares model of tone, harmonics and offset (IEEE 1241, 4.1.4; harmonics that
 * lie above half the sample rate are taken where they fold to):
 * SINAD = P1/NAD, NAD = everything but tone and DC; SNR = P1/(NAD − harmonics); THD+N = √NAD relative to the total AC
 * rms (audio convention, IEC 60268-3); SFDR = P1 over the largest other line; ENOB = (SINAD − 1.76 dB)/6.02 dB.
 * Bandwidth: DC to half the sample rate, no weighting.
 *
 * @param maxOrder harmonics 2..maxOrder belong to the distortion
 */
export function toneFigures(
  samples: Float64Array,
  sampleRateHz: number,
  fundamentalHz: number,
  maxOrder: number,
): ToneResult {
  const lines = toneLines(fundamentalHz, sampleRateHz, samples.length, maxOrder);
  const fit = fitSinusoids(
    samples,
    sampleRateHz,
    lines.map((line) => line.frequencyHz),
  );
  const tone = fit.components[0]!;
  const harmonics = fit.components.slice(1);
  const power = tone.rms ** 2;
  const residual = subtractSinusoids(samples, sampleRateHz, fit.dc, [tone]);
  const nad = waveformFigures(residual).rms ** 2;
  const distortion = harmonics.reduce((sum, h) => sum + h.rms ** 2, 0);
  const sinadDb = ratioDb(power, nad);
  return {
    thdFPercent: 100 * Math.sqrt(distortion / power),
    thdRPercent: 100 * Math.sqrt(distortion / (distortion + power)),
    thdPlusNPercent: 100 * Math.sqrt(nad / (power + nad)),
    sinadDb,
    snrDb: ratioDb(power, nad - distortion),
    sfdrDb: ratioDb(power, largestSpur(residual, sampleRateHz, tone, harmonics)),
    enobBits: sinadDb === null ? null : (sinadDb - FULL_SCALE_SINE_DB) / DB_PER_BIT,
    harmonicsDbc: Array.from({ length: maxOrder - 1 }, (_, i) => {
      const at = lines.findIndex((line) => line.order === i + 2);
      const level = at < 0 ? null : ratioDb(power, fit.components[at]!.rms ** 2);
      return level === null ? null : -level;
    }),
  };
}

/** The tone and its harmonics where they appear, without those that meet DC, the Nyquist line or one another. */
function toneLines(
  fundamentalHz: number,
  sampleRateHz: number,
  sampleCount: number,
  maxOrder: number,
): { order: number; frequencyHz: number }[] {
  const closest = (0.9 * sampleRateHz) / sampleCount;
  const out = [{ order: 1, frequencyHz: fundamentalHz }];
  for (let order = 2; order <= maxOrder; order++) {
    const frequencyHz = foldedFrequency(order * fundamentalHz, sampleRateHz);
    const atEnd = frequencyHz < closest || frequencyHz > sampleRateHz / 2 - closest;
    const free = out.every((other) => Math.abs(other.frequencyHz - frequencyHz) >= closest);
    if (!atEnd && free) out.push({ order, frequencyHz });
  }
  return out;
}

/** Power of the largest line besides the tone: of a coherent record the plain DFT line, otherwise flat-top. */
function largestSpur(
  residual: Float64Array,
  sampleRateHz: number,
  tone: FittedSinusoid,
  harmonics: readonly FittedSinusoid[],
): number {
  const cycles = (tone.frequencyHz * residual.length) / sampleRateHz;
  const coherent = Math.abs(cycles - Math.round(cycles)) < 0.01;
  const window = coherent ? 'rectangular' : 'flat-top';
  const rest = coherent ? residual : subtractSinusoids(residual, sampleRateHz, 0, harmonics);
  const { rms } = amplitudeSpectrum(rest, sampleRateHz, { window, segmentLength: rest.length });
  const skip = coherent ? 1 : 5;
  let largest = coherent ? 0 : Math.max(0, ...harmonics.map((h) => h.rms));
  for (let k = skip; k < rms.length; k++) largest = Math.max(largest, rms[k]!);
  return largest ** 2;
}

function ratioDb(power: number, other: number): number | null {
  return other > SMALLEST_RATIO * power ? 10 * Math.log10(power / other) : null;
}
