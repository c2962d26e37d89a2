import { wrapDegrees } from '../model/fit-sinusoids.js';
import type { WindowChunk } from '../parts/window-chunk.js';
import type { WindowGrid } from './window-grid.js';

/** Orders below this share of the largest one, weighted by their order, add nothing to the frequency. */
const TELLING_SHARE = 1e-2;

/**
 * The fundamental frequency of a long record from the phases of its windows: linear regression of the phase of the
 * fundamental over the windows (S. A. Tretter, IEEE Trans. Information Theory 31, 1985), to which every order h adds what
 * it tells, weighted by (h·amplitude)². For a steady frequency this comes near the Cramér-Rao bound; for one that moves it
 * is the mean frequency.
 *
 * @returns null with fewer than three windows
 */
export function windowFrequencyHz(
  windows: WindowChunk,
  grid: WindowGrid,
  sampleRateHz: number,
): number | null {
  const { count } = windows;
  if (count < 3) return null;
  const phase = fundamentalPhases(windows, grid, sampleRateHz);
  const middle = (j: number) => (grid.boundaries[j]! + grid.boundaries[j + 1]!) / 2 / sampleRateHz;
  let meanS = 0;
  let meanPhase = 0;
  for (let j = 0; j < count; j++) {
    meanS += middle(j) / count;
    meanPhase += phase[j]! / count;
  }
  let product = 0;
  let square = 0;
  for (let j = 0; j < count; j++) {
    product += (middle(j) - meanS) * (phase[j]! - meanPhase);
    square += (middle(j) - meanS) ** 2;
  }
  return grid.frequencyHz + product / square / (2 * Math.PI);
}

/** Phase of the fundamental in the middle of each window against the frequency of the grid, unwrapped, radians. */
function fundamentalPhases(windows: WindowChunk, grid: WindowGrid, sampleRateHz: number): Float64Array {
  const { count, phaseDeg } = windows;
  const { boundaries, cycles, frequencyHz } = grid;
  const phase = new Float64Array(count);
  for (let j = 0; j < count; j++) {
    // A line turns by whole cycles of the window, from its beginning to its middle by half as many.
    const turns = cycles / 2 - (frequencyHz * (boundaries[j]! + boundaries[j + 1]!)) / 2 / sampleRateHz;
    const turned = phaseDeg[j]! + 360 * (turns - Math.floor(turns));
    phase[j] = turned - 360 * Math.round((turned - (j === 0 ? turned : phase[j - 1]!)) / 360);
  }
  const corrections = correctionsByOrders(windows, grid.orders);
  return phase.map((degrees, j) => radians(degrees + corrections[j]!));
}

/**
 * What the orders above 1 add to the phase of the fundamental in each window, degrees: order h stands at h times that
 * phase plus a constant, so what it deviates from the constant, over h, is an estimate of its own.
 */
function correctionsByOrders({ count, line, phaseDeg }: WindowChunk, orders: number): Float64Array {
  const weights = weightsOf(line, orders, count);
  const total = weights.reduce((sum, x) => sum + x, 0);
  const corrections = new Float64Array(count);
  for (let order = 2; order <= orders; order++) {
    const weight = weights[order - 1]! / total;
    if (weight === 0) continue;
    const relative = Float64Array.from({ length: count }, (_, j) =>
      radians(phaseDeg[(order - 1) * count + j]! - order * phaseDeg[j]!),
    );
    const constant = circularMean(relative);
    for (let j = 0; j < count; j++) {
      const away = wrapDegrees(((relative[j]! - constant) * 180) / Math.PI);
      corrections[j]! += (weight * away) / order;
    }
  }
  return corrections;
}

/** (h·amplitude)² of each order, 0 for those that tell little. */
function weightsOf(line: Float64Array, orders: number, count: number): Float64Array {
  const weights = Float64Array.from({ length: orders }, (_, i) => {
    let sum = 0;
    for (let j = 0; j < count; j++) sum += line[i * count + j]!;
    return Number.isNaN(sum) ? 0 : (((i + 1) * sum) / count) ** 2;
  });
  const largest = weights.reduce((max, x) => Math.max(max, x), 0);
  return weights.map((weight) => (weight >= TELLING_SHARE ** 2 * largest ? weight : 0));
}

function circularMean(angles: Float64Array): number {
  let re = 0;
  let im = 0;
  for (const angle of angles) {
    re += Math.cos(angle);
    im += Math.sin(angle);
  }
  return Math.atan2(im, re);
}

function radians(degrees: number): number {
  return (degrees * Math.PI) / 180;
}
