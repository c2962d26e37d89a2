import { harmonicAngles, highestOrder } from '../harmonics/harmonic-orders.js';
import { toFit, type SinusoidFit } from '../model/fit-sinusoids.js';
import { projections } from '../model/projections.js';
import { createSinusoidSolver } from '../model/sinusoid-solver.js';
import { coarseSearch } from './coarse-search.js';
import { combFundamental } from './comb-fundamental.js';
import { refineFrequency } from './refine-frequency.js';
import { tellingOrders } from './telling-orders.js';

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

/** A frequency and the length of the stretch on which it is right to a fraction of a line. */
interface Start {
  frequencyHz: number;
  length: number;
  /** Whether the fundamental was seen to stand out of the noise around it. */
  standsOut: boolean;
}

interface Range {
  lowHz: number;
  highHz: number;
}

/** AC power relative to the square of the mean below which there is only rounding. */
const SMALLEST_AC = 1e-20;
const LOWEST_HZ = 1;
const SEARCH_SPAN = 0.15;
const FIRST_STAGE_CYCLES = 8;
const STAGE_GROWTH = 4;
/** Cycles from which the spectrum tells the orders apart. */
const SPECTRUM_CYCLES = 8;
/** Share of a line of the first stage by which the strongest orders may be off. */
const START_LINES = 0.25;
/** A noise line exceeds this many times its mean power with probability e^−25. */
const SIGNIFICANCE = 25;
/** The same for the fundamental alone, once its place is known from stronger orders. */
const KNOWN_PLACE_SIGNIFICANCE = 9;

/**
 * Finds the fundamental of a stretch and fits its harmonic series: a first value from the peaks of the spectrum (or, for
 * a few cycles around a nominal frequency, from a search over a short stretch), then nonlinear least squares on stretches
 * that grow around the middle up to all samples.
 *
 * @param samples some 2^20 at the most; of a longer record a stretch of it
 * @returns null when no fundamental stands out of the noise, or less than one cycle was recorded
 */
export function findFundamental(
  samples: Float64Array,
  sampleRateHz: number,
  { nominalFrequencyHz, maxOrder = 50 }: FundamentalOptions,
): FundamentalEstimate | null {
  if (samples.length < 8) return null;
  const { ac, mean, acPower } = withoutMean(samples);
  if (!(acPower > SMALLEST_AC * mean * mean)) return null;
  const range = searchRange(ac.length, sampleRateHz, nominalFrequencyHz);
  if (range === null) return null;
  const start = findStart(ac, sampleRateHz, range, nominalFrequencyHz !== 'auto');
  if (start === null || start.frequencyHz * samples.length < 0.98 * sampleRateHz) return null;
  const frequencyHz = growSegments(ac, sampleRateHz, start, maxOrder);
  if (!(frequencyHz > 0.9 * range.lowHz && frequencyHz < 1.1 * range.highHz)) return null;
  const estimate = fitOrders(ac, sampleRateHz, frequencyHz, maxOrder, mean);
  return isSignificant(estimate, ac.length, start.standsOut) ? estimate : null;
}

/** The strongest order stands out of the residual, and the fundamental out of that or of the noise around it. */
function isSignificant(
  { fit, residualRms }: FundamentalEstimate,
  sampleCount: number,
  standsOut: boolean,
): boolean {
  const overNoise = fit.components.map(({ rms }) => (rms ** 2 * sampleCount) / (2 * residualRms ** 2));
  return Math.max(...overNoise) >= SIGNIFICANCE && (standsOut || overNoise[0]! >= KNOWN_PLACE_SIGNIFICANCE);
}

function withoutMean(samples: Float64Array): { ac: Float64Array; mean: number; acPower: number } {
  let sum = 0;
  for (let n = 0; n < samples.length; n++) sum += samples[n]!;
  const mean = sum / samples.length;
  const ac = new Float64Array(samples.length);
  let squares = 0;
  for (let n = 0; n < ac.length; n++) {
    const x = samples[n]! - mean;
    ac[n] = x;
    squares += x * x;
  }
  return { ac, mean, acPower: squares / ac.length };
}

function searchRange(sampleCount: number, sampleRateHz: number, nominal: number | 'auto'): Range | null {
  const lineHz = sampleRateHz / sampleCount;
  const ceilingHz = sampleRateHz / 2 - 0.7 * lineHz;
  if (nominal === 'auto') return { lowHz: Math.max(LOWEST_HZ, 2 * lineHz), highHz: ceilingHz };
  // A record of hardly more than one cycle of the nominal frequency is searched from one whole cycle upwards.
  const lowHz = Math.max(nominal * (1 - SEARCH_SPAN), Math.min(lineHz, nominal));
  const highHz = Math.min(nominal * (1 + SEARCH_SPAN), ceilingHz);
  return highHz > lowHz ? { lowHz, highHz } : null;
}

function findStart(ac: Float64Array, sampleRateHz: number, range: Range, hinted: boolean): Start | null {
  const cycles = (range.lowHz * ac.length) / sampleRateHz;
  const candidate =
    hinted && cycles < SPECTRUM_CYCLES ? null : combFundamental(ac, sampleRateHz, range, hinted);
  if (candidate) {
    const { frequencyHz, uncertaintyHz, typicalOrder, standsOut } = candidate;
    const sharp = (START_LINES * sampleRateHz) / (typicalOrder * uncertaintyHz);
    return { frequencyHz, length: Math.max(sharp, firstStage(frequencyHz, sampleRateHz)), standsOut };
  }
  if (!hinted) return null;
  const frequencyHz = coarseSearch(ac, sampleRateHz, range.lowHz, range.highHz);
  return { frequencyHz, length: firstStage(frequencyHz, sampleRateHz), standsOut: false };
}

function firstStage(frequencyHz: number, sampleRateHz: number): number {
  return (FIRST_STAGE_CYCLES * sampleRateHz) / frequencyHz;
}

function growSegments(ac: Float64Array, sampleRateHz: number, start: Start, maxOrder: number): number {
  let length = Math.min(ac.length, Math.ceil(start.length));
  let { frequencyHz } = start;
  for (;;) {
    const segment = { samples: ac, sampleRateHz, start: Math.floor((ac.length - length) / 2), length };
    const orders = tellingOrders(segment, frequencyHz, maxOrder);
    frequencyHz = refineFrequency(segment, frequencyHz, orders).frequencyHz;
    if (length === ac.length) return frequencyHz;
    length = Math.min(ac.length, STAGE_GROWTH * length);
  }
}

function fitOrders(
  ac: Float64Array,
  sampleRateHz: number,
  frequencyHz: number,
  maxOrder: number,
  mean: number,
): FundamentalEstimate {
  const n = ac.length;
  const angles = harmonicAngles(
    frequencyHz,
    sampleRateHz,
    highestOrder(frequencyHz, sampleRateHz, n, maxOrder),
  );
  const solution = createSinusoidSolver(angles, n)(projections(ac, 0, n, angles));
  const fit = toFit(solution, angles, n, sampleRateHz);
  fit.dc += mean;
  let total = 0;
  for (const x of ac) total += x * x;
  const freedom = Math.max(1, n - 2 * angles.length);
  const variance = Math.max(total - solution.explained, 1e-18 * total) / freedom;
  // Kay, "Fundamentals of Statistical Signal Processing", vol. 1, 3.11, extended to Σ h² A_h² for a harmonic series.
  const weighted = fit.components.reduce((sum, c, i) => sum + 2 * ((i + 1) * c.rms) ** 2, 0);
  const deviation =
    (sampleRateHz / (2 * Math.PI)) * Math.sqrt((24 * variance) / (weighted * n * (n * n - 1)));
  return { frequencyHz, frequencyUncertaintyHz: deviation, fit, residualRms: Math.sqrt(variance) };
}
