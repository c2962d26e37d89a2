import type { Flag } from '../types.js';

/** Orders that were asked for lie at or above half the sample rate. */
export function orderBeyondNyquistFlag(
  frequencyHz: number,
  listedOrders: number,
  maxOrder: number,
  sampleRateHz: number,
): Flag | null {
  if (listedOrders >= maxOrder) return null;
  return {
    code: 'order-beyond-nyquist',
    severity: 'info',
    message:
      `Orders ${listedOrders + 1} to ${maxOrder} lie above half the sample rate of ${sampleRateHz} Hz and are not listed. ` +
      `A sample rate above ${Math.ceil(2 * maxOrder * frequencyHz)} Hz would show them.`,
    evidence: {
      count: maxOrder - listedOrders,
      timesS: [],
      value: maxOrder * frequencyHz,
      limit: sampleRateHz / 2,
      unit: 'Hz',
    },
  };
}
