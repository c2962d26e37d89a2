import { findFundamental, type FundamentalEstimate } from '../fundamental/find-fundamental.js';
import type { PartContext } from './part-types.js';
import type { Reading, SampleRange } from './reading.js';

/** Records up to this length are fitted as a whole. */
const LONGEST_WHOLE_FIT = 2 ** 20;
/** Records that hold fewer cycles than this are fitted as a whole up to a greater length. */
const FEW_CYCLES = 64;
const LONGEST_FEW_CYCLES = 2 ** 23;
/** A stretch holds so many cycles of the nominal frequency, within these lengths. */
const STRETCH_CYCLES = 64;
const SHORTEST_STRETCH = 2 ** 15;
const LONGEST_STRETCH = 2 ** 22;
/** Length of a stretch when nothing is known of the frequency. */
const BLIND_STRETCH = 2 ** 17;
/** Where the middles of the stretches lie that are tried, as a share of the record. */
const PLACES = [0.5, 0.25, 0.75];
/** The stretch that is tried last, for a fundamental deep in noise. */
const LAST_STRETCH = 2 ** 19;
/** Orders fitted to a stretch: enough to tell the fundamental. The windows give all orders. */
const STRETCH_ORDERS = 20;

/** Whether the model of all orders is fitted to the whole record; otherwise the synchronous windows give the orders. */
export function fitsAsWhole({ sampleRateHz, sampleCount, settings }: PartContext): boolean {
  const nominal = settings.nominalFrequencyHz;
  const fewCycles = nominal !== 'auto' && sampleCount * nominal < FEW_CYCLES * sampleRateHz;
  return sampleCount <= (fewCycles ? LONGEST_FEW_CYCLES : LONGEST_WHOLE_FIT);
}

/**
 * Finds the fundamental of a channel. A record of more than 2^20 samples is represented by a stretch from its middle (64
 * cycles of the nominal frequency; 2^17 samples when that is unknown), or, when no fundamental stands out there, from its
 * first or third quarter, or by 2^19 samples from its middle; the frequency over the whole record then follows from the
 * frequency track and the windows.
 */
export function* locateFundamental(context: PartContext): Reading<FundamentalEstimate | null> {
  const { sampleRateHz, sampleCount, settings } = context;
  if (fitsAsWhole(context)) {
    return findFundamental(yield { from: 0, to: sampleCount }, sampleRateHz, settings);
  }
  const options = { ...settings, maxOrder: Math.min(settings.maxOrder, STRETCH_ORDERS) };
  for (const stretch of stretches(context)) {
    const estimate = findFundamental(yield stretch, sampleRateHz, options);
    if (estimate) return estimate;
  }
  return null;
}

function stretches({ sampleRateHz, sampleCount, settings }: PartContext): SampleRange[] {
  const nominal = settings.nominalFrequencyHz;
  const wanted = nominal === 'auto' ? BLIND_STRETCH : Math.ceil((STRETCH_CYCLES * sampleRateHz) / nominal);
  const length = Math.min(sampleCount, LONGEST_STRETCH, Math.max(SHORTEST_STRETCH, wanted));
  const last = Math.min(sampleCount, Math.max(LAST_STRETCH, length));
  return [...PLACES.map((place) => ({ place, length })), { place: 0.5, length: last }].map((stretch) => {
    const from = Math.round(stretch.place * sampleCount - stretch.length / 2);
    const within = Math.min(sampleCount - stretch.length, Math.max(0, from));
    return { from: within, to: within + stretch.length };
  });
}
