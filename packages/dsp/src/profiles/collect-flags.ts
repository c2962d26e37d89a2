import type { WaveformFigures } from '../figures/waveform-figures.js';
import { adcSaturatedFlag } from '../flags/adc-saturated.js';
import { clippedFlag } from '../flags/clipped.js';
import { dcHeavyFlag } from '../flags/dc-heavy.js';
import { discontinuityFlag } from '../flags/discontinuity.js';
import { frequencyDriftFlag } from '../flags/frequency-drift.js';
import { nearNyquistFlag } from '../flags/near-nyquist.js';
import { recordLengthFlag } from '../flags/record-length.js';
import type { FundamentalEstimate } from '../fundamental/find-fundamental.js';
import type { FrequencyTrack } from '../fundamental/frequency-track.js';
import type { ChannelInput, Flag, ResolvedSettings, SpectrumResult } from '../types.js';

export interface FlagEvidence {
  channel: ChannelInput;
  sampleRateHz: number;
  settings: ResolvedSettings;
  figures: WaveformFigures;
  estimate: FundamentalEstimate | null;
  track: FrequencyTrack | null;
  spectrum: SpectrumResult;
}

/** All quality flags of a channel, errors first. */
export function collectFlags(evidence: FlagEvidence): Flag[] {
  const { channel, sampleRateHz, settings, figures, estimate, track, spectrum } = evidence;
  const { samples } = channel;
  const found = estimate?.frequencyHz ?? null;
  const nominal = settings.nominalFrequencyHz === 'auto' ? null : settings.nominalFrequencyHz;
  const cycleHz = found ?? nominal;
  const acRms = Math.sqrt(Math.max(0, figures.rms ** 2 - figures.mean ** 2));
  const flags = [
    cycleHz && recordLengthFlag(samples.length / sampleRateHz, cycleHz),
    estimate ? null : noPeriodicComponent(settings),
    adcSaturatedFlag(channel),
    clippedFlag(samples, figures, sampleRateHz),
    discontinuityFlag(samples, sampleRateHz, figures.highest - figures.lowest),
    found && frequencyDriftFlag(track, found),
    estimate && nearNyquistFlag(spectrum, sampleRateHz, estimate.fit.components[0]!.rms),
    dcHeavyFlag(estimate?.fit.dc ?? figures.mean, acRms, channel.unit),
    estimate && orderBeyondNyquist(estimate, sampleRateHz, settings.maxOrder),
  ];
  const severities = ['error', 'warning', 'info'];
  return flags
    .filter((flag) => typeof flag === 'object' && flag !== null)
    .sort((a, b) => severities.indexOf(a.severity) - severities.indexOf(b.severity));
}

function noPeriodicComponent(settings: ResolvedSettings): Flag {
  const where =
    settings.nominalFrequencyHz === 'auto'
      ? 'anywhere in the spectrum'
      : `within 15 % of ${settings.nominalFrequencyHz} Hz`;
  return {
    code: 'no-periodic-component',
    severity: 'warning',
    message: `No fundamental stands out of the noise ${where}, so no harmonics are given. Check the channel and the nominal frequency.`,
  };
}

function orderBeyondNyquist(
  estimate: FundamentalEstimate,
  sampleRateHz: number,
  maxOrder: number,
): Flag | null {
  const listed = estimate.fit.components.length;
  if (listed >= maxOrder) return null;
  return {
    code: 'order-beyond-nyquist',
    severity: 'info',
    message:
      `Orders ${listed + 1} to ${maxOrder} lie above half the sample rate of ${sampleRateHz} Hz and are not listed. ` +
      `A sample rate above ${Math.ceil(2 * maxOrder * estimate.frequencyHz)} Hz would show them.`,
  };
}
