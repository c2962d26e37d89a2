import { createRealFftPlan } from '../fft/real-fft-plan.js';
import { windowGains, type WindowGains } from './window-gains.js';

export interface WindowFigures extends WindowGains {
  /** What a tone half a bin off a line loses, dB, positive. */
  scallopLossDb: number;
  /** Largest magnitude beyond the first null of the main lobe, relative to the peak, dB, negative. */
  highestSidelobeDb: number;
}

/** Lines per bin of the padded transform in which the side lobes are looked for. */
const LINES_PER_BIN = 16;
/** Each narrows the place of a side lobe to 0.618 of what it was. */
const SEARCH_STEPS = 16;

/**
 * Figures of merit of a window (F. J. Harris, Proc. IEEE 66(1), 1978, section IV and table 1). The side lobe is the
 * largest value of the discrete-time Fourier transform beyond the first null, found on a grid of 1/16 bin and refined
 * by golden section.
 *
 * @param window at least 16 samples of a window
 */
export function windowFigures(window: Float64Array): WindowFigures {
  const magnitude = transformMagnitude(window);
  const peak = magnitude[0]!;
  const sidelobe = largestBeyond(magnitude, firstNull(magnitude));
  return {
    ...windowGains(window),
    scallopLossDb: -decibels(magnitude[LINES_PER_BIN / 2]! / peak),
    highestSidelobeDb: decibels(refinedPeak(window, sidelobe / LINES_PER_BIN) / peak),
  };
}

function transformMagnitude(window: Float64Array): Float64Array {
  const padded = new Float64Array(LINES_PER_BIN * window.length);
  padded.set(window);
  const plan = createRealFftPlan(padded.length);
  const re = new Float64Array(plan.lineCount);
  const im = new Float64Array(plan.lineCount);
  plan.forward(padded, re, im);
  return re.map((value, k) => Math.hypot(value, im[k]!));
}

/** The first minimum below half power; a flat top may ripple above it. */
function firstNull(magnitude: Float64Array): number {
  const halfPower = magnitude[0]! * Math.SQRT1_2;
  let k = 1;
  while (k < magnitude.length - 1 && (magnitude[k]! > halfPower || magnitude[k + 1]! < magnitude[k]!)) k++;
  return k;
}

function largestBeyond(magnitude: Float64Array, from: number): number {
  let best = from;
  for (let k = from; k < magnitude.length; k++) if (magnitude[k]! > magnitude[best]!) best = k;
  return best;
}

/** Golden-section search for the maximum of |W| within a line of the grid around `bins`. */
function refinedPeak(window: Float64Array, bins: number): number {
  const shrink = (Math.sqrt(5) - 1) / 2;
  let low = bins - 1 / LINES_PER_BIN;
  let high = bins + 1 / LINES_PER_BIN;
  for (let i = 0; i < SEARCH_STEPS; i++) {
    const left = high - shrink * (high - low);
    const right = low + shrink * (high - low);
    if (magnitudeAt(window, left) > magnitudeAt(window, right)) high = right;
    else low = left;
  }
  return magnitudeAt(window, (low + high) / 2);
}

function magnitudeAt(window: Float64Array, bins: number): number {
  const step = (2 * Math.PI * bins) / window.length;
  let re = 0;
  let im = 0;
  for (let n = 0; n < window.length; n++) {
    re += window[n]! * Math.cos(step * n);
    im -= window[n]! * Math.sin(step * n);
  }
  return Math.hypot(re, im);
}

function decibels(ratio: number): number {
  return 20 * Math.log10(ratio);
}
