import { thdF, thdR } from '../figures/distortion.js';
import { goldenMaximum } from '../search/golden-maximum.js';
import { seriesValue } from './series-value.js';
import type { FourierSeries } from './types.js';
import { undrawnOrders, waveformOf } from './waveform.js';

/** Figures of a periodic signal. */
export interface SeriesFigures {
  /** rms with DC and all orders; `restRms` is left aside. */
  rms: number;
  fundamentalRms: number;
  /** As a ratio; null without a fundamental. */
  thdF: number | null;
  /** As a ratio; null where all orders are zero. */
  thdR: number | null;
  /** Largest magnitude over the cycle; null where the phase of an order is not known. */
  peak: number | null;
  /** Peak over rms; null where one of them has no value. */
  crestFactor: number | null;
}

/** Points for each period of the highest order among which the peak is looked for. */
const POINTS_PER_PERIOD = 32;
/** Above as many points, fewer for each period, but never fewer than these. */
const MANY_POINTS = 4096;
const FEWEST_PER_PERIOD = 8;

/**
 * rms, distortion and crest factor of a series. The peak is the largest of 32 points for each period of the
 * highest order (above order 128 down to 8), made exact by golden section about it; of two peaks that differ by less than
 * 0.5 % (8 %) of the highest orders it may be that of the lower one.
 *
 * @param maxOrder last order that counts for the distortion
 */
export function seriesFigures(series: FourierSeries, maxOrder: number): SeriesFigures {
  const highest = series.components.reduce((max, { order }) => Math.max(max, order), 1);
  const byOrder = new Float64Array(highest);
  let square = series.dc ** 2;
  for (const { order, rms } of series.components) {
    byOrder[order - 1] = rms;
    square += rms ** 2;
  }
  const rms = Math.sqrt(square);
  const peak = undrawnOrders(series).length > 0 ? null : peakOf(series, highest);
  return {
    rms,
    fundamentalRms: byOrder[0]!,
    thdF: thdF(byOrder, maxOrder),
    thdR: thdR(byOrder, maxOrder),
    peak,
    crestFactor: peak === null || rms === 0 ? null : peak / rms,
  };
}

function peakOf(series: FourierSeries, highest: number): number {
  const pointCount = Math.max(
    Math.min(POINTS_PER_PERIOD * highest, MANY_POINTS),
    FEWEST_PER_PERIOD * highest,
  );
  const { values } = waveformOf(series, { pointsPerCycle: pointCount });
  const at = values.reduce((best, y, n) => (Math.abs(y) > Math.abs(values[best]!) ? n : best), 0);
  const magnitude = (share: number) => Math.abs(seriesValue(series, share));
  return magnitude(goldenMaximum(magnitude, (at - 1) / pointCount, (at + 1) / pointCount));
}
