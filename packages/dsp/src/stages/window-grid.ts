import { AnalysisInputError } from '../errors.js';
import type { FrequencyTrack } from '../fundamental/frequency-track.js';
import { highFrequencyBandCentres } from '../groups/high-frequency-bands.js';
import { windowBoundaries } from '../groups/window-boundaries.js';
import { highestOrder } from '../harmonics/harmonic-orders.js';
import { cyclesFor } from '../profiles/resolve-settings.js';
import type { ResolvedSettings } from '../types.js';

/** The synchronous windows that one fundamental sets. */
export interface WindowGrid {
  /** Index of the channel whose fundamental it is. */
  channel: number;
  frequencyHz: number;
  track: FrequencyTrack | null;
  cycles: number;
  /** Orders below half the sample rate, at most those asked for. */
  orders: number;
  /** Whether the windows give the orders; otherwise a fit to the whole record does. */
  ordersFromWindows: boolean;
  /** 200 Hz bands (mains). */
  bandCentresHz: Float64Array;
  /** Positions in samples, one more than windows; a single 0 when no whole window fits. */
  boundaries: Float64Array;
}

/** Numbers that the windows of all channels of a record may hold together: half a gigabyte. */
const MOST_VALUES = 2 ** 26;

export interface GridRecord {
  sampleRateHz: number;
  sampleCount: number;
  channelCount: number;
  /** Whether the windows give the orders, which then have to lie below half the sample rate by a line of a window. */
  ordersFromWindows: boolean;
  settings: ResolvedSettings;
}

/**
 * Lays the windows of a fundamental over a record.
 *
 * @throws AnalysisInputError when the results of so many windows would not fit into memory
 */
export function createWindowGrid(
  channel: number,
  frequencyHz: number,
  track: FrequencyTrack | null,
  { sampleRateHz, sampleCount, channelCount, ordersFromWindows, settings }: GridRecord,
): WindowGrid {
  const cycles = settings.cyclesPerWindow ?? cyclesFor(frequencyHz);
  const lineHz = frequencyHz / cycles;
  const fitted = ordersFromWindows ? Math.min(sampleCount, sampleRateHz / lineHz) : sampleCount;
  const orders = highestOrder(frequencyHz, sampleRateHz, fitted, settings.maxOrder);
  const bandCentresHz =
    settings.profile === 'mains' ? highFrequencyBandCentres(sampleRateHz, lineHz) : new Float64Array(0);
  const windows = (sampleCount / sampleRateHz) * lineHz;
  const values = windows * channelCount * (6 * orders + bandCentresHz.length);
  if (values > MOST_VALUES) {
    const spanS = sampleCount / sampleRateHz;
    const longestS = spanS * (MOST_VALUES / values);
    throw new AnalysisInputError(
      `The span of ${Number(spanS.toPrecision(6))} s holds ${Math.floor(windows)} windows of ${cycles} cycles, ` +
        `too many for ${orders} orders of ${channelCount} ${channelCount === 1 ? 'channel' : 'channels'}. ` +
        `Choose spans of up to ${Number(longestS.toPrecision(3))} s, or fewer orders.`,
    );
  }
  const boundaries = windowBoundaries(sampleCount, sampleRateHz, frequencyHz, cycles, track);
  return { channel, frequencyHz, track, cycles, orders, ordersFromWindows, bandCentresHz, boundaries };
}

/** How many whole windows a grid has. */
export function windowCount({ boundaries }: WindowGrid): number {
  return boundaries.length - 1;
}
