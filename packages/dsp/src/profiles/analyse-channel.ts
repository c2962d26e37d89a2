import { thdF, thdR } from '../figures/distortion.js';
import { formFactor } from '../figures/form-factor.js';
import { toneFigures, type ToneResult } from '../figures/tone-figures.js';
import { waveformFigures } from '../figures/waveform-figures.js';
import { findFundamental } from '../fundamental/find-fundamental.js';
import { frequencyTrack } from '../fundamental/frequency-track.js';
import { synchronousWindows } from '../groups/synchronous-windows.js';
import { windowBoundaries } from '../groups/window-boundaries.js';
import { amplitudeSpectrum } from '../spectrum/amplitude-spectrum.js';
import { segmentLength } from '../spectrum/segment-length.js';
import type { ChannelAnalysis, ChannelInput, HarmonicResult, ResolvedSettings } from '../types.js';
import { collectFlags } from './collect-flags.js';
import { harmonicResults } from './harmonic-results.js';
import { interharmonicResults, withWindowFigures } from './mains-results.js';
import { cyclesFor } from './resolve-settings.js';

/** Reports the share of the channel that is done; throws when the caller wants to stop. */
export type Checkpoint = (fraction: number) => void;

/** Everything about one channel, by the profile of the settings. */
export function analyseChannel(
  channel: ChannelInput,
  sampleRateHz: number,
  settings: ResolvedSettings,
  checkpoint: Checkpoint,
): ChannelAnalysis {
  const { samples } = channel;
  const figures = waveformFigures(samples);
  const estimate = findFundamental(samples, sampleRateHz, settings);
  checkpoint(0.4);
  const track = estimate && frequencyTrack(samples, sampleRateHz, estimate.frequencyHz);
  const spectrum = amplitudeSpectrum(samples, sampleRateHz, {
    window: settings.window,
    segmentLength: segmentLength(samples.length, settings.profile),
    onSegment: (share) => checkpoint(0.4 + 0.2 * share),
  });
  const flags = collectFlags({ channel, sampleRateHz, settings, figures, estimate, track, spectrum });
  const steady = !flags.some((flag) => flag.code === 'frequency-drift');
  let harmonics: HarmonicResult[] = estimate ? harmonicResults(estimate, samples.length, steady) : [];
  let interharmonics: ChannelAnalysis['interharmonics'] = [];
  let windows: ChannelAnalysis['windows'] = null;
  let tone: ToneResult | null = null;
  if (settings.profile === 'mains' && estimate) {
    const cycles = settings.cyclesPerWindow ?? cyclesFor(estimate.frequencyHz);
    const boundaries = windowBoundaries(samples.length, sampleRateHz, estimate.frequencyHz, cycles, track);
    const count = boundaries.length - 1;
    if (count > 0) {
      const lines = synchronousWindows(samples, boundaries, cycles, harmonics.length, {
        onWindow: (share) => checkpoint(0.6 + 0.4 * share),
      });
      const samplesPerWindow = boundaries[count]! / count;
      harmonics = withWindowFigures(harmonics, lines, samplesPerWindow / sampleRateHz);
      interharmonics = interharmonicResults(lines, harmonics.length);
      windows = { cycles, count, samplesPerWindow };
    }
  }
  if (settings.profile === 'tone' && estimate) {
    tone = toneFigures(samples, sampleRateHz, estimate.frequencyHz, settings.thdMaxOrder);
  }
  checkpoint(1);
  const harmonicRms = harmonics.map((h) => h.rms);
  const { index, name, quantity, unit } = channel;
  return {
    ...{ index, name, quantity, unit },
    mean: estimate?.fit.dc ?? figures.mean,
    rms: figures.rms,
    peak: figures.peak,
    crestFactor: figures.rms > 0 ? figures.peak / figures.rms : null,
    formFactor: formFactor(samples, estimate && sampleRateHz / estimate.frequencyHz),
    fundamental: estimate && {
      frequencyHz: estimate.frequencyHz,
      rms: harmonics[0]!.rms,
      phaseDeg: harmonics[0]!.phaseDeg,
      frequencyUncertaintyHz: estimate.frequencyUncertaintyHz,
    },
    thdPlusNPercent: tone?.thdPlusNPercent ?? null,
    sinadDb: tone?.sinadDb ?? null,
    snrDb: tone?.snrDb ?? null,
    sfdrDb: tone?.sfdrDb ?? null,
    enobBits: tone?.enobBits ?? null,
    thdFPercent: tone ? tone.thdFPercent : percent(thdF(harmonicRms, settings.thdMaxOrder)),
    thdRPercent: tone ? tone.thdRPercent : percent(thdR(harmonicRms, settings.thdMaxOrder)),
    thdMaxOrder: settings.thdMaxOrder,
    harmonics,
    interharmonics,
    windows,
    flags,
    spectrum,
  };
}

function percent(ratio: number | null): number | null {
  return ratio === null ? null : 100 * ratio;
}
