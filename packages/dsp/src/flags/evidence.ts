import type { FlagEvidence } from '../types.js';

/** How many places of a fault are kept. */
export const MAX_TIMES = 20;

/** Evidence of something that holds for the record as a whole and has no place in it. */
export function wholeRecordEvidence(value: number, limit: number, unit: string | null): FlagEvidence {
  return { count: 1, timesS: [], value, limit, unit };
}

/** The first times of a fault in rising order, from sample positions in any order. */
export function firstTimes(positions: readonly number[], sampleRateHz: number): number[] {
  return [...positions]
    .sort((a, b) => a - b)
    .slice(0, MAX_TIMES)
    .map((at) => at / sampleRateHz);
}

/** A list of times for a message, shortened after the first five. */
export function timesInWords(timesS: readonly number[], count: number): string {
  const shown = timesS.slice(0, 5).map((t) => `${t.toPrecision(5)} s`);
  return count > shown.length
    ? `${shown.join(', ')} and ${count - shown.length} more places`
    : shown.join(', ');
}
