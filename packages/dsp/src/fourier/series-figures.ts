import { thdF, thdR } from '../figures/distortion.js';
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

/** Points for each period of the highest order when the peak is looked for: its error is below (π/32)²/2, 0.5 %. */
const POINTS_PER_PERIOD = 32;

/**
 * rms, distortion and crest factor of a series. The peak is the largest of at least 32 points for each period of the
 * highest order, which is too low by less than 0.5 % of the highest orders.
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
  const peak =
    undrawnOrders(series).length > 0
      ? null
      : waveformOf(series, { pointsPerCycle: POINTS_PER_PERIOD * highest }).values.reduce(
          (max, x) => Math.max(max, Math.abs(x)),
          0,
        );
  return {
    rms,
    fundamentalRms: byOrder[0]!,
    thdF: thdF(byOrder, maxOrder),
    thdR: thdR(byOrder, maxOrder),
    peak,
    crestFactor: peak === null || rms === 0 ? null : peak / rms,
  };
}
