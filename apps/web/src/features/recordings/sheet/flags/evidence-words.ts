import type { FlagEvidence } from '@overtally/contracts';
import { formatCount, formatFixed, formatSi } from '../../../../lib/format.js';

/** Units that are counted, not measured. */
const counted = new Set(['samples', 'cycles', 'codes']);

function amount(value: number, unit: string | null): string {
  if (unit === null) return formatSi(value, '', { digits: 3 });
  if (!counted.has(unit)) return formatSi(value, unit, { digits: 3 });
  return `${Number.isInteger(value) ? formatCount(value) : formatFixed(value, 2)} ${unit}`;
}

/** What was compared with what: "84.2 % against 90.0 %"; null where nothing was. */
export function comparedWords({ value, limit, unit }: Omit<FlagEvidence, 'count' | 'timesS'>): string | null {
  if (value === null) return null;
  return limit === null ? amount(value, unit) : `${amount(value, unit)} against ${amount(limit, unit)}`;
}

/** How often it was seen, where it has places in the record: "37 times". */
export function countWords({ count, timesS }: Pick<FlagEvidence, 'count' | 'timesS'>): string | null {
  if (timesS.length === 0) return null;
  return count === 1 ? 'once' : `${formatCount(count)} times`;
}

/** A place in the record, to the millisecond. */
export const placeWords = (timeS: number): string => formatFixed(timeS, 3, 's');
