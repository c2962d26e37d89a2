import { waveformFigures } from '../figures/waveform-figures.js';
import { toFit, type SinusoidFit } from '../model/fit-sinusoids.js';
import { coarseSearch } from './coarse-search.js';
import { combCandidate } from './comb-candidate.js';
import { refineFrequency, type RefinedFrequency } from './refine-frequency.js';
import { spectralPeaks } from './spectral-peaks.js';

export interface FundamentalOptions {
  /** Where to look: ±15 % around this frequency, or 'auto' for the whole range from 1 Hz. */
  nominalFrequencyHz: number | 'auto';
  /** Orders of the model that is fitted, default 50. */
  maxOrder?: number;
}

export interface FundamentalEstimate {
  frequencyHz: number;
  /** One standard deviation by the Cramér-Rao bound, from the residual of the fit. */
  frequencyUncertaintyHz: number;
  /** Least-squares fit of DC and all orders to the whole record; phases at the first sample. */
  fit: SinusoidFit;
  /** rms of what the model leaves over: noise, interharmonics, drift. */
  residualRms: number;
}

const SEARCH_SPAN = 0.15;
const FIRST_STAGE_CYCLES = 8;
const STAGE_GROWTH = 4;
/** A noise line exceeds this many times its mean power with probability e^−25. */
const SIGNIFICANCE = 25;

/**
 * Finds the fundamental of a record and fits its harmonic series: coarse search over a short stretch, then nonlinear
 * least squares on stretches that grow around the middle up to the whole record.
 *
 * @returns null when no fundamental stands out of the noise, or less than one cycle was recorded
 */
export function findFundamental(
  samples: Float64Array,
  sampleRateHz: number,
  options: FundamentalOptions,
): FundamentalEstimate | null {
  const { mean, rms } = waveformFigures(samples);
  const acPower = rms * rms - mean * mean;
  if (samples.length < 8 || !(acPower > 1e-20 * rms * rms)) return null;
  const ac = samples.map((x) => x - mean);
  const range = searchRange(ac, sampleRateHz, options.nominalFrequencyHz);
  if (range === null || samples.length * range.lowHz < sampleRateHz * 0.98) return null;
  const coarse = coarseSearch(ac, sampleRateHz, range.lowHz, range.highHz);
  const refined = growSegments(ac, sampleRateHz, coarse, options.maxOrder ?? 50);
  if (!(refined.frequencyHz > 0.9 * range.lowHz && refined.frequencyHz < 1.1 * range.highHz)) return null;
  return assess(ac, sampleRateHz, refined, mean);
}

function searchRange(
  ac: Float64Array,
  sampleRateHz: number,
  nominal: number | 'auto',
): { lowHz: number; highHz: number } | null {
  const lineHz = sampleRateHz / ac.length;
  const ceilingHz = sampleRateHz / 2 - 0.7 * lineHz;
  if (nominal !== 'auto') {
    // A record of hardly more than one cycle of the nominal frequency is searched from one whole cycle upwards.
    const lowHz = Math.max(nominal * (1 - SEARCH_SPAN), Math.min(lineHz, nominal));
    const highHz = Math.min(nominal * (1 + SEARCH_SPAN), ceilingHz);
    return highHz > lowHz ? { lowHz, highHz } : null;
  }
  const candidate = combCandidate(spectralPeaks(ac, sampleRateHz), Math.max(lineHz, sampleRateHz / 2 ** 18));
  if (candidate === null) return null;
  const width = Math.max(0.01 * candidate, 0.3 * lineHz);
  return { lowHz: candidate - width, highHz: Math.min(candidate + width, ceilingHz) };
}

function growSegments(
  ac: Float64Array,
  sampleRateHz: number,
  coarseHz: number,
  maxOrder: number,
): RefinedFrequency {
  let length = Math.min(ac.length, Math.ceil((FIRST_STAGE_CYCLES * sampleRateHz) / coarseHz));
  let frequencyHz = coarseHz;
  for (;;) {
    const start = Math.floor((ac.length - length) / 2);
    const refined = refineFrequency({ samples: ac, sampleRateHz, start, length }, frequencyHz, maxOrder);
    if (length === ac.length) return refined;
    frequencyHz = refined.frequencyHz;
    length = Math.min(ac.length, STAGE_GROWTH * length);
  }
}

function assess(
  ac: Float64Array,
  sampleRateHz: number,
  refined: RefinedFrequency,
  mean: number,
): FundamentalEstimate | null {
  const n = ac.length;
  const fit = toFit(refined.solution, refined.angles, n, sampleRateHz);
  fit.dc += mean;
  let total = 0;
  for (const x of ac) total += x * x;
  const freedom = Math.max(1, n - 2 * refined.angles.length);
  const variance = Math.max(total - refined.solution.explained, 1e-18 * total) / freedom;
  const fundamental = fit.components[0];
  if (!fundamental || (fundamental.rms ** 2 * n) / (2 * variance) < SIGNIFICANCE) return null;
  // Kay, "Fundamentals of Statistical Signal Processing", vol. 1, 3.11, extended to Σ h² A_h² for a harmonic series.
  const weighted = fit.components.reduce((sum, c, i) => sum + 2 * ((i + 1) * c.rms) ** 2, 0);
  const deviation =
    (sampleRateHz / (2 * Math.PI)) * Math.sqrt((24 * variance) / (weighted * n * (n * n - 1)));
  return {
    frequencyHz: refined.frequencyHz,
    frequencyUncertaintyHz: deviation,
    fit,
    residualRms: Math.sqrt(variance),
  };
}
