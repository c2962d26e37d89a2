import type { WaveformFigures } from '../figures/waveform-figures.js';
import { createFlagScan } from '../flags/flag-scan.js';
import { qualityFlags } from '../flags/quality-flags.js';
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

/** All quality flags of a channel whose samples are held in one piece, errors first. */
export function collectFlags(evidence: FlagEvidence): Flag[] {
  const { channel, sampleRateHz, settings, figures, estimate, track, spectrum } = evidence;
  const scan = createFlagScan(channel);
  scan.push(channel.samples, 0);
  return qualityFlags({
    findings: scan.finish(),
    ...{ sampleRateHz, track, spectrum, unit: channel.unit, windows: null },
    nominalFrequencyHz: settings.nominalFrequencyHz,
    maxOrder: settings.maxOrder,
    mean: estimate?.fit.dc ?? figures.mean,
    acRms: Math.sqrt(Math.max(0, figures.rms ** 2 - figures.mean ** 2)),
    fundamental: estimate && {
      frequencyHz: estimate.frequencyHz,
      rms: estimate.fit.components[0]!.rms,
      listedOrders: estimate.fit.components.length,
    },
  });
}
