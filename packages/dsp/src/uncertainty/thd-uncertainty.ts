import type { Contribution } from './combine.js';
import { riseOf } from './disturbance.js';
import { fundamentalLeakage, lineLoss, type Synchronism } from './synchronisation.js';

/** Standard uncertainty of the rms of orders, and the mean square that may have been added to each. */
export interface DisturbedOrders {
  /** rms of orders 1, 2, … up to the highest in the THD. */
  lineRms: readonly number[];
  /** Standard uncertainty of the part in phase, per order. */
  inPhase: readonly number[];
  /** Mean square that was added, per order. */
  power: readonly number[];
}

/**
 * Standard uncertainty of THD_F as a plain ratio T = √(Σ X_h²)/X_1, h from 2, from independent disturbances of its
 * orders (JCGM 100:2008, 5.1.2): ∂T/∂X_h = X_h/(T X_1²), ∂T/∂X_1 = −T/X_1, and the rise of the distortion by what was
 * added to all orders together.
 *
 * An error of the gain is common to all orders and cancels in the ratio: calibration and accuracy of reading do not come
 * in, as far as they hold for all orders alike. A frequency response of the instrument is not known and not part of it.
 */
export function thdStandard({ lineRms, inPhase, power }: DisturbedOrders): number {
  const fundamental = lineRms[0]!;
  let distortion = 0;
  let moved = 0;
  let added = 0;
  for (let i = 1; i < lineRms.length; i++) {
    distortion += lineRms[i]! ** 2;
    moved += (lineRms[i]! * inPhase[i]!) ** 2;
    added += power[i]!;
  }
  const rms = Math.sqrt(distortion);
  const ofOrders = rms > 0 ? Math.sqrt(moved) / rms : 0;
  const ofFundamental = (rms / fundamental) * inPhase[0]!;
  return Math.hypot(ofOrders, ofFundamental, riseOf(rms, added)) / fundamental;
}

/**
 * What windows that miss whole cycles bring to THD_F: the loss of all lines, which is one and the same error and adds up
 * with signs, and the leakage of the fundamental into the orders.
 */
export function thdSynchronisation(lineRms: readonly number[], synchronism: Synchronism): Contribution {
  const fundamental = lineRms[0]!;
  const leak = lineRms.map((_, i) => fundamental * fundamentalLeakage(i + 1, synchronism));
  const leaked = thdStandard({
    lineRms,
    inPhase: leak.map((rms) => rms / Math.SQRT2),
    power: leak.map((rms) => rms ** 2),
  });
  let distortion = 0;
  let lost = 0;
  for (let i = 1; i < lineRms.length; i++) {
    distortion += lineRms[i]! ** 2;
    lost += lineRms[i]! ** 2 * lineLoss(i + 1, synchronism);
  }
  const thd = Math.sqrt(distortion) / fundamental;
  const relative = (distortion > 0 ? lost / distortion : 0) - lineLoss(1, synchronism);
  return { source: 'synchronisation', standard: Math.hypot(leaked, (thd * relative) / Math.sqrt(3)) };
}
