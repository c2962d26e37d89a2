import type { LimitBasis, LimitEntry, LimitSet, Quantity, RowChoice } from '@overtally/contracts';
import { shownLimits, unitCell } from '@overtally/limits';

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

const evidenceOfPublished: Readonly<Record<string, string>> = {
  source: 'Taken from the named sources',
  source_partial: 'In part from the named source, the rest from memory',
  memory: 'From memory; no source was seen',
  memory_and_arithmetic: 'From memory; an independent calculation agrees with part of it',
};

/** Values of published sets come from print or from memory; custom sets say it in a sentence of their own. */
export const evidenceWords = (evidence: string): string => evidenceOfPublished[evidence] ?? evidence;

/** Unit of one limit of a set: its own, or what it refers to, as `% IL`. */
export function unitOfEntry(
  entry: Pick<LimitEntry, 'basis' | 'unit' | 'referenceParameter'>,
  set: Pick<LimitSet, 'basis' | 'unit' | 'referenceParameter'>,
): string {
  if (entry.basis === undefined) return entry.unit ?? set.unit;
  const { basis, unit = set.unit, referenceParameter = null } = entry;
  return unitCell({ basis, unit, referenceParameter }) || unit;
}

/** What the rows of a set are chosen by. */
export const rowChoiceWords: Record<RowChoice, string> = {
  range: 'Row',
  interpolate: 'Row; between two rows limits are interpolated',
  alternative: 'Alternative; one of them is enough',
};

/** Orders 2 to 40, or "13 orders, 3 to 39" where some are left out. */
export function orderRange(set: LimitSet): string {
  const { orders } = shownLimits(set);
  const first = orders[0]?.order;
  const last = orders.at(-1)?.order;
  if (first === undefined || last === undefined) return 'none';
  if (first === last) return String(first);
  const whole = last - first + 1 === orders.length;
  return whole ? `${first} to ${last}` : `${orders.length} from ${first} to ${last}`;
}
