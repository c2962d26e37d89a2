import { wholePeriodSamples } from '../figures/form-factor.js';
import type { WaveformFigures } from '../figures/waveform-figures.js';
import { createFlagScan, type ScanFindings } from '../flags/flag-scan.js';
import type { PartContext } from './part-types.js';
import { BLOCK_SAMPLES, type Reading } from './reading.js';
import { LARGEST_VALUE, refuseValues } from './refuse-values.js';
import { createWaveformScan } from './waveform-scan.js';

/** What one pass over all samples of a channel gives. */
export interface ChannelScan {
  figures: WaveformFigures;
  /** rms/mean|x|, DC included; null for a record of zeros. */
  formFactor: number | null;
  /** What the quality flags rest on. */
  findings: ScanFindings;
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
  const waveform = createWaveformScan();
  const flags = createFlagScan(channel);
  const periodic = wholePeriodSamples(sampleCount, fundamentalHz && sampleRateHz / fundamentalHz);
  let formFactor: number | null = null;
  for (let from = 0; from < sampleCount; from += BLOCK_SAMPLES) {
    const to = Math.min(sampleCount, from + BLOCK_SAMPLES);
    const block = yield { from, to };
    const split = from < periodic && periodic <= to ? periodic - from : 0;
    let sound = waveform.push(block.subarray(0, split));
    if (split > 0) formFactor = waveform.formFactor();
    sound = waveform.push(block.subarray(split)) && sound;
    if (!sound || waveform.figures().peak > LARGEST_VALUE) {
      throw refuseValues(block, from, channel.name, sampleRateHz);
    }
    flags.push(block, from);
  }
  return { figures: waveform.figures(), formFactor, findings: flags.finish() };
}
