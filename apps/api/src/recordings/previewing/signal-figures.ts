import type { ImportPreview } from '@overtally/contracts';
import { findFundamental } from '@overtally/dsp';

type SignalFigures = Pick<ImportPreview['signals'][number], 'rms' | 'peak' | 'fundamentalHz'>;

/** Samples in which a fundamental is looked for: some milliseconds of computing. */
const searchedSamples = 2 ** 16;
/** Fewer say too little of a frequency. */
const fewestCycles = 3;

/**
 * rms and largest magnitude of the samples in their unit, missing ones (NaN) left out, and the fundamental in the longest
 * stretch of the first 65536 that none is missing from.
 */
export function signalFigures(samples: Float64Array, sampleRateHz: number | null): SignalFigures {
  let count = 0;
  let squares = 0;
  let peak = 0;
  for (const value of samples) {
    if (!Number.isFinite(value)) continue;
    count += 1;
    squares += value * value;
    peak = Math.max(peak, Math.abs(value));
  }
  const rms = Math.sqrt(squares / count);
  if (count === 0 || !Number.isFinite(rms)) return { rms: null, peak: null, fundamentalHz: null };
  return { rms, peak, fundamentalHz: sampleRateHz === null ? null : fundamentalOf(samples, sampleRateHz) };
}

function fundamentalOf(samples: Float64Array, sampleRateHz: number): number | null {
  const stretch = longestWhole(samples.subarray(0, searchedSamples));
  const found = findFundamental(stretch, sampleRateHz, { nominalFrequencyHz: 'auto' });
  if (found === null || found.frequencyHz * stretch.length < fewestCycles * sampleRateHz) return null;
  return found.frequencyHz;
}

/** The longest stretch of finite samples. */
function longestWhole(samples: Float64Array): Float64Array {
  let longest = samples.subarray(0, 0);
  let from = 0;
  for (let i = 0; i <= samples.length; i += 1) {
    if (i < samples.length && Number.isFinite(samples[i])) continue;
    if (i - from > longest.length) longest = samples.subarray(from, i);
    from = i + 1;
  }
  return longest;
}
