import { findFundamental, type FundamentalEstimate } from '../fundamental/find-fundamental.js';
import type { PartContext } from './part-types.js';
import type { Reading } from './reading.js';

/** Records up to this length are fitted as a whole. */
const LONGEST_WHOLE_FIT = 2 ** 20;
/** Records that hold fewer cycles than this are fitted as a whole up to a greater length. */
const FEW_CYCLES = 64;
const LONGEST_FEW_CYCLES = 2 ** 23;
/** Length of the stretch that stands for a longer record. */
const STRETCH_SAMPLES = 2 ** 17;
const STRETCH_CYCLES = 16;
const LONGEST_STRETCH = 2 ** 22;
/** Where the middles of the stretches lie that are tried, as a share of the record. */
const PLACES = [0.5, 0.25, 0.75];

/** Whether the model of all orders is fitted to the whole record; otherwise the synchronous windows give the orders. */
export function fitsAsWhole({ sampleRateHz, sampleCount, settings }: PartContext): boolean {
  const nominal = settings.nominalFrequencyHz;
  const fewCycles = nominal !== 'auto' && sampleCount * nominal < FEW_CYCLES * sampleRateHz;
  return sampleCount <= (fewCycles ? LONGEST_FEW_CYCLES : LONGEST_WHOLE_FIT);
}

/**
 * Finds the fundamental of a channel. A record of more than 2^20 samples is represented by a stretch from its middle
 * (2^17 samples or 16 cycles of the nominal frequency), or, when no fundamental stands out there, from its first or third
 * quarter; the frequency over the whole record then follows from the frequency track.
 */
export function* locateFundamental(context: PartContext): Reading<FundamentalEstimate | null> {
  const { sampleRateHz, sampleCount, settings } = context;
  if (fitsAsWhole(context)) {
    return findFundamental(yield { from: 0, to: sampleCount }, sampleRateHz, settings);
  }
  const length = stretchSamples(context);
  for (const place of PLACES) {
    const from = Math.min(sampleCount - length, Math.max(0, Math.round(place * sampleCount - length / 2)));
    const samples = yield { from, to: from + length };
    const estimate = findFundamental(samples, sampleRateHz, settings);
    if (estimate) return estimate;
  }
  return null;
}

function stretchSamples({ sampleRateHz, sampleCount, settings }: PartContext): number {
  const nominal = settings.nominalFrequencyHz;
  const cycles = nominal === 'auto' ? 0 : Math.ceil((STRETCH_CYCLES * sampleRateHz) / nominal);
  return Math.min(sampleCount, LONGEST_STRETCH, Math.max(STRETCH_SAMPLES, cycles));
}
