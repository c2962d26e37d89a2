import type { LimitBasis, LimitSet, Quantity } from '@overtally/contracts';

export const quantityWords: Record<Quantity, string> = {
  voltage: 'Voltage',
  current: 'Current',
  power: 'Power',
  sound_pressure: 'Sound pressure',
  acceleration: 'Acceleration',
  velocity: 'Velocity',
  dimensionless: 'Dimensionless',
  other: 'Other',
};

export const basisWords: Record<LimitBasis, string> = {
  absolute: 'absolute, rms',
  'percent-of-fundamental': '% of the fundamental',
  'percent-of-reference': '% of a reference value',
  'milliampere-per-watt': 'mA per W of active power',
};

/** How far the values of a set can be relied on. */
export const confidenceWords: Record<LimitSet['confidence'], string> = {
  high: 'high: sources agree',
  medium: 'medium: check against the source',
  low: 'low: check before use',
};

/** Values of published sets come from print or from memory; custom sets say it in a sentence of their own. */
export const evidenceWords = (evidence: string): string =>
  evidence === 'source' ? 'Taken from the named sources' : evidence;

/** Orders 2 to 40, or "13 orders, 3 to 39" where some are left out. */
export function orderRange({ orders }: Pick<LimitSet, 'orders'>): string {
  const first = orders[0]?.order;
  const last = orders.at(-1)?.order;
  if (first === undefined || last === undefined) return 'none';
  if (first === last) return String(first);
  const whole = last - first + 1 === orders.length;
  return whole ? `${first} to ${last}` : `${orders.length} from ${first} to ${last}`;
}
