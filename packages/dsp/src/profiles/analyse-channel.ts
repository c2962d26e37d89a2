import { thdF, thdR } from '../figures/distortion.js';
import { formFactor } from '../figures/form-factor.js';
import { waveformFigures } from '../figures/waveform-figures.js';
import { findFundamental, type FundamentalEstimate } from '../fundamental/find-fundamental.js';
import { frequencyTrack, type FrequencyTrack } from '../fundamental/frequency-track.js';
import { amplitudeSpectrum } from '../spectrum/amplitude-spectrum.js';
import { segmentLength } from '../spectrum/segment-length.js';
import { toneFigures } from '../tone/tone-figures.js';
import type { ChannelAnalysis, ChannelInput, ResolvedSettings, ToneFigures } from '../types.js';
import { collectFlags } from './collect-flags.js';
import { harmonicResults } from './harmonic-results.js';
import { mainsResults } from './mains-results.js';
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
  const { index, name, quantity, unit, samples } = channel;
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
  const periodic = estimate
    ? periodicResults(channel, sampleRateHz, settings, { estimate, track, steady, checkpoint })
    : NOT_PERIODIC;
  checkpoint(1);
  return {
    ...{ index, name, quantity, unit },
    mean: estimate?.fit.dc ?? figures.mean,
    rms: figures.rms,
    peak: figures.peak,
    crestFactor: figures.rms > 0 ? figures.peak / figures.rms : null,
    formFactor: formFactor(samples, estimate && sampleRateHz / estimate.frequencyHz),
    ...periodic,
    thdMaxOrder: settings.thdMaxOrder,
    flags,
    spectrum,
  };
}

type PeriodicResults = ToneFigures &
  Pick<
    ChannelAnalysis,
    'fundamental' | 'thdFPercent' | 'thdRPercent' | 'harmonics' | 'interharmonics' | 'windows'
  >;

const NOT_PERIODIC: PeriodicResults = {
  fundamental: null,
  thdFPercent: null,
  thdRPercent: null,
  thdPlusNPercent: null,
  sinadDb: null,
  snrDb: null,
  sfdrDb: null,
  enobBits: null,
  harmonics: [],
  interharmonics: [],
  windows: null,
};

interface PeriodicEvidence {
  estimate: FundamentalEstimate;
  track: FrequencyTrack | null;
  steady: boolean;
  checkpoint: Checkpoint;
}

/** What rests on the fundamental: orders, distortion, windows (mains) and tone figures (tone). */
function periodicResults(
  { samples }: ChannelInput,
  sampleRateHz: number,
  settings: ResolvedSettings,
  { estimate, track, steady, checkpoint }: PeriodicEvidence,
): PeriodicResults {
  const { frequencyHz } = estimate;
  const frequencyUncertaintyHz = steady ? estimate.frequencyUncertaintyHz : null;
  const fitted = harmonicResults(estimate, samples.length, steady);
  const mains =
    settings.profile === 'mains'
      ? mainsResults(samples, fitted, {
          sampleRateHz,
          frequencyHz,
          track,
          cycles: settings.cyclesPerWindow ?? cyclesFor(frequencyHz),
          onWindow: (share) => checkpoint(0.6 + 0.4 * share),
        })
      : null;
  const harmonics = mains?.harmonics ?? fitted;
  const tone =
    settings.profile === 'tone'
      ? toneFigures(samples, sampleRateHz, frequencyHz, { maxOrder: settings.thdMaxOrder })
      : null;
  const harmonicRms = harmonics.map((h) => h.rms);
  const { rms, phaseDeg } = harmonics[0]!;
  return {
    fundamental: { frequencyHz, rms, phaseDeg, frequencyUncertaintyHz },
    thdFPercent: tone ? tone.thdFPercent : percent(thdF(harmonicRms, settings.thdMaxOrder)),
    thdRPercent: tone ? tone.thdRPercent : percent(thdR(harmonicRms, settings.thdMaxOrder)),
    thdPlusNPercent: tone?.thdPlusNPercent ?? null,
    sinadDb: tone?.sinadDb ?? null,
    snrDb: tone?.snrDb ?? null,
    sfdrDb: tone?.sfdrDb ?? null,
    enobBits: tone?.enobBits ?? null,
    harmonics,
    interharmonics: mains?.interharmonics ?? [],
    windows: mains?.windows ?? null,
  };
}

function percent(ratio: number | null): number | null {
  return ratio === null ? null : 100 * ratio;
}
