import type { WaveformFigures } from '../figures/waveform-figures.js';
import { adcSaturatedFlag } from '../flags/adc-saturated.js';
import { clippedFlag } from '../flags/clipped.js';
import { discontinuityFlag } from '../flags/discontinuity.js';
import type { Flag } from '../types.js';
import type { PartContext } from './part-types.js';
import type { Reading } from './reading.js';
import { requireNumbers } from './require-numbers.js';
import { createWaveformScan } from './waveform-scan.js';

/** What one pass over all samples of a channel gives. */
export interface ChannelScan {
  figures: WaveformFigures;
  formFactor: number | null;
  /** Flags that rest on the samples alone. */
  flags: Flag[];
}

/**
 * One pass over all samples of a channel.
 *
 * @param fundamentalHz where it is known, the form factor is that of the whole periods from the first sample
 * @throws AnalysisInputError for samples that are no finite numbers
 */
export function* scanChannel(
  { channel, sampleRateHz, sampleCount }: PartContext,
  fundamentalHz: number | null,
): Reading<ChannelScan> {
  const samples = yield { from: 0, to: sampleCount };
  requireNumbers(samples, 0, channel.name, sampleRateHz);
  const waveform = createWaveformScan();
  const periodic = wholePeriods(sampleCount, fundamentalHz && sampleRateHz / fundamentalHz);
  waveform.push(samples.subarray(0, periodic));
  const formFactor = waveform.formFactor();
  waveform.push(samples.subarray(periodic));
  const figures = waveform.figures();
  const flags = [
    adcSaturatedFlag({ ...channel, samples }),
    clippedFlag(samples, figures, sampleRateHz),
    discontinuityFlag(samples, sampleRateHz, figures.highest - figures.lowest),
  ].filter((flag) => flag !== null);
  return { figures, formFactor, flags };
}

/** Samples of the whole periods that fit into a record; all samples when no period is known. */
function wholePeriods(sampleCount: number, periodSamples: number | null): number {
  const periods = periodSamples === null ? 0 : Math.floor((sampleCount + 0.5) / periodSamples);
  return periods > 0 && periodSamples !== null
    ? Math.min(sampleCount, Math.round(periods * periodSamples))
    : sampleCount;
}
