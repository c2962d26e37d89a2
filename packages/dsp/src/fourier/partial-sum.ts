import type { FourierSeries } from './types.js';
import { waveformOf } from './waveform.js';

/**
 * One cycle of the partial sum of the orders 0..maxOrder (Fourier synthesis). An order whose phase is not known cannot be
 * drawn and is left out.
 *
 * @param maxOrder 0 gives DC alone
 * @param pointCount N; point n stands at n/N of the cycle
 * @throws RangeError when N is not an integer of at least 2
 */
export function partialSum(series: FourierSeries, maxOrder: number, pointCount: number): Float64Array {
  const components = series.components.filter(({ order }) => order <= maxOrder);
  return waveformOf({ ...series, components }, { pointsPerCycle: pointCount }).values;
}

/** One cycle of the waveform with all its orders, as `partialSum`. */
export function oneCycle(series: FourierSeries, pointCount: number): Float64Array {
  return partialSum(series, Infinity, pointCount);
}
