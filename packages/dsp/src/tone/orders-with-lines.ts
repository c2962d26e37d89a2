import { foldedFrequency } from '../figures/folded-frequency.js';

/** Nearest that two lines of a fit may lie, in lines of the record. */
const CLOSEST_LINES = 0.9;

/**
 * Order 1 and those of the orders 2..maxOrder that have a line of their own after folding: none that meets DC, half the
 * sample rate or a line of lower order.
 */
export function ordersWithLines(
  fundamentalHz: number,
  sampleRateHz: number,
  sampleCount: number,
  maxOrder: number,
): number[] {
  const closest = (CLOSEST_LINES * sampleRateHz) / sampleCount;
  const orders = [1];
  const taken = [fundamentalHz];
  for (let order = 2; order <= maxOrder; order++) {
    const frequencyHz = foldedFrequency(order * fundamentalHz, sampleRateHz);
    const atEnd = frequencyHz < closest || frequencyHz > sampleRateHz / 2 - closest;
    if (atEnd || taken.some((other) => Math.abs(other - frequencyHz) < closest)) continue;
    orders.push(order);
    taken.push(frequencyHz);
  }
  return orders;
}
