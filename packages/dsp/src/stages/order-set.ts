import type { FundamentalEstimate } from '../fundamental/find-fundamental.js';
import type { WindowChunk } from '../parts/window-chunk.js';
import type { PhasorSet } from '../power/types.js';
import type { WindowGrid } from './window-grid.js';

/** DC and orders of a channel at one fundamental, over a whole record. */
export interface OrderSet extends PhasorSet {
  frequencyHz: number;
  rms: Float64Array;
  /** Cosine form, zero time = first sample. */
  phaseDeg: Float64Array;
  /** Standard deviation that noise gives the rms of one order. */
  noiseRms: number;
}

/** The orders of a model that was fitted to the whole record. */
export function fittedOrders(
  { frequencyHz, fit, residualRms }: FundamentalEstimate,
  sampleCount: number,
): OrderSet {
  const rms = Float64Array.from(fit.components, (component) => component.rms);
  const squares = rms.reduce((sum, x) => sum + x * x, fit.dc ** 2 + residualRms ** 2);
  return {
    frequencyHz,
    dc: fit.dc,
    totalRms: Math.sqrt(squares),
    rms,
    phaseDeg: Float64Array.from(fit.components, (component) => component.phaseDeg),
    noiseRms: residualRms / Math.sqrt(sampleCount),
  };
}

/** A fit at a fundamental that another channel set. */
export function ordersOfPhasors(phasors: PhasorSet, frequencyHz: number): OrderSet {
  return {
    ...phasors,
    frequencyHz,
    rms: Float64Array.from(phasors.rms),
    phaseDeg: Float64Array.from(phasors.phaseDeg),
    noiseRms: phasors.noiseRms ?? 0,
  };
}

export interface WindowOrderContext {
  /** Mean frequency of the channel that sets the grid. */
  frequencyHz: number;
  /** Of all samples of the channel. */
  totalRms: number;
  sampleCount: number;
  sampleRateHz: number;
}

/**
 * The orders of a record from its windows: mean phasors. Each window is turned back by the phase that the fundamental of
 * the grid has in it, order h by h times that phase, so that a frequency that wanders a little takes nothing from the
 * high orders; the mean phase of that fundamental at the first sample is put in again at the end. In windows of whole
 * cycles the orders are orthogonal, so that for a steady frequency this is the least-squares fit to all windows.
 *
 * @param reference windows of the channel that sets the grid
 */
export function windowOrders(
  windows: WindowChunk,
  reference: WindowChunk,
  grid: WindowGrid,
  { frequencyHz, totalRms, sampleCount, sampleRateHz }: WindowOrderContext,
): OrderSet {
  const { count } = windows;
  const start = fundamentalAtStart(reference, grid.boundaries, frequencyHz / sampleRateHz);
  const rms = new Float64Array(grid.orders);
  const phaseDeg = new Float64Array(grid.orders);
  const dc = windows.dc.reduce((sum, x) => sum + x, 0) / count;
  let explained = dc * dc;
  for (let order = 1; order <= grid.orders; order++) {
    let re = 0;
    let im = 0;
    for (let j = 0; j < count; j++) {
      const at = (order - 1) * count + j;
      const angle = radians(windows.phaseDeg[at]! + order * (start - reference.phaseDeg[j]!));
      re += windows.line[at]! * Math.cos(angle);
      im += windows.line[at]! * Math.sin(angle);
    }
    rms[order - 1] = Math.hypot(re, im) / count;
    phaseDeg[order - 1] = (Math.atan2(im, re) * 180) / Math.PI;
    explained += rms[order - 1]! ** 2;
  }
  const all = windows.rms.reduce((sum, x) => sum + x * x, 0) / count;
  const noiseRms = Math.sqrt(Math.max(0, all - explained) / sampleCount);
  return { frequencyHz, dc, totalRms, rms, phaseDeg, noiseRms };
}

/** Phase of order 1 at the first sample, degrees: its phases in the windows, turned back by the mean frequency. */
function fundamentalAtStart(
  reference: WindowChunk,
  boundaries: Float64Array,
  cyclesPerSample: number,
): number {
  let re = 0;
  let im = 0;
  for (let j = 0; j < reference.count; j++) {
    const cycles = cyclesPerSample * boundaries[j]!;
    const angle = radians(reference.phaseDeg[j]!) - 2 * Math.PI * (cycles - Math.floor(cycles));
    re += reference.line[j]! * Math.cos(angle);
    im += reference.line[j]! * Math.sin(angle);
  }
  return (Math.atan2(im, re) * 180) / Math.PI;
}

function radians(degrees: number): number {
  return (degrees * Math.PI) / 180;
}
