import { findFundamental, type FundamentalEstimate } from '../fundamental/find-fundamental.js';
import type { PartContext } from './part-types.js';
import type { Reading } from './reading.js';

/** Records up to this length are fitted as a whole. */
export const LONGEST_WHOLE_FIT = 2 ** 20;
/** Of longer ones a stretch of this length. */
const STRETCH_SAMPLES = 2 ** 19;
/** Where the middles of the stretches lie that are tried, as a share of the record. */
const PLACES = [0.5, 0.25, 0.75];

/**
 * Finds the fundamental of a channel. A record of more than 2^20 samples is represented by 2^19 of them from its middle,
 * or, when no fundamental stands out there, from its first or third quarter; the frequency over the whole record then
 * follows from the frequency track.
 */
export function* locateFundamental({
  sampleRateHz,
  sampleCount,
  settings,
}: PartContext): Reading<FundamentalEstimate | null> {
  if (sampleCount <= LONGEST_WHOLE_FIT) {
    return findFundamental(yield { from: 0, to: sampleCount }, sampleRateHz, settings);
  }
  for (const place of PLACES) {
    const from = Math.round(place * sampleCount - STRETCH_SAMPLES / 2);
    const samples = yield { from, to: from + STRETCH_SAMPLES };
    const estimate = findFundamental(samples, sampleRateHz, settings);
    if (estimate) return estimate;
  }
  return null;
}
