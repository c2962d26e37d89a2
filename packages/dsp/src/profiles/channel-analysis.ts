import { thdF, thdR } from '../figures/distortion.js';
import { badRanges } from '../flags/bad-ranges.js';
import { frequencyDriftFlag } from '../flags/frequency-drift.js';
import type { WindowSynchronism } from '../flags/not-synchronous.js';
import { qualityFlags } from '../flags/quality-flags.js';
import { countedFrequency } from '../fundamental/counted-frequency.js';
import { meanFrequencyHz } from '../fundamental/local-frequency.js';
import type { MeasuredChannel } from '../stages/measure-channels.js';
import { windowCount } from '../stages/window-grid.js';
import type { ChannelAnalysis, Flag, FundamentalResult, HarmonicResult, ToneFigures } from '../types.js';
import { frequencyDeviationHz } from './frequency-deviation.js';
import { harmonicResults } from './harmonic-results.js';
import {
  bandResults,
  distortionStatistics,
  interharmonicResults,
  withWindowFigures,
} from './mains-results.js';
import { windowSeries } from './window-series.js';

/** The results of one channel, put together from what was measured. */
export function channelAnalysis(measured: MeasuredChannel): ChannelAnalysis {
  const { survey, grid, windows, tone } = measured;
  const { context, scan, spectrum, fundamental, track } = survey;
  const { channel, sampleRateHz, sampleCount, settings } = context;
  const { figures, findings, formFactor } = scan;
  const periodic = fundamental !== null;
  const mains = settings.profile === 'mains';
  const synchronism = mains ? windowSynchronism(measured) : null;
  const flags = channelFlags(measured, synchronism);
  const harmonics = orderResults(measured, flags);
  const series =
    mains && windows && grid
      ? windowSeries(windows, grid, {
          sampleRateHz,
          thdMaxOrder: settings.thdMaxOrder,
          periodic,
          badRanges: badRanges(findings, sampleRateHz, fundamental?.frequencyHz ?? null),
        })
      : null;
  const listed = series ? withWindowFigures(harmonics, series, periodic) : harmonics;
  return {
    ...{ index: channel.index, name: channel.name, quantity: channel.quantity, unit: channel.unit },
    mean: periodic ? measured.orders!.dc : figures.mean,
    rms: figures.rms,
    peak: figures.peak,
    crestFactor: figures.rms > 0 ? figures.peak / figures.rms : null,
    formFactor,
    fundamental: periodic ? fundamentalResult(measured, listed[0]!) : null,
    ...distortion(measured, listed),
    thdMaxOrder: settings.thdMaxOrder,
    ...toneLevels(tone),
    harmonics: listed,
    interharmonics: series ? interharmonicResults(series) : [],
    windows:
      series && grid
        ? {
            cycles: grid.cycles,
            count: series.count,
            samplesPerWindow: grid.boundaries[series.count]! / series.count,
            flaggedCount: series.flagged.reduce((sum, x) => sum + x, 0),
            synchronisationErrorPercent: largest(synchronism?.errorPercent),
            gridChannel: grid.channel,
          }
        : null,
    tone: tone && {
      levelDbfs: tone.levelDbfs,
      enobFullScaleBits: tone.enobFullScaleBits,
      noiseDensity: tone.noiseDensity,
      thdPlusNBandPercent: tone.thdPlusNBandPercent,
      bandHz: tone.bandHz,
      harmonicsDbc: tone.harmonicsDbc,
    },
    distortion: series && distortionStatistics(series),
    bands: series ? bandResults(series) : [],
    countedFrequency: mains && track ? countedFrequency(track, sampleRateHz, sampleCount) : [],
    lines: [],
    families: [],
    uncertainty: {},
    series,
    flags,
    spectrum,
  };
}

function orderResults({ survey, grid, orders }: MeasuredChannel, flags: readonly Flag[]): HarmonicResult[] {
  if (orders === null || grid === null) return [];
  const { sampleRateHz } = survey.context;
  const drifts =
    flags.some((flag) => flag.code === 'frequency-drift') ||
    frequencyDriftFlag(grid.track, grid.frequencyHz, sampleRateHz) !== null;
  return harmonicResults(orders, { steady: !drifts, periodic: survey.fundamental !== null });
}

function fundamentalResult(
  { survey: { context, track }, frequencyHz, orders }: MeasuredChannel,
  { rms, phaseDeg }: HarmonicResult,
): FundamentalResult {
  const steady = frequencyDriftFlag(track, frequencyHz!, context.sampleRateHz) === null;
  return {
    frequencyHz: frequencyHz!,
    rms,
    phaseDeg,
    frequencyUncertaintyHz: steady ? frequencyDeviationHz(orders!, context) : null,
  };
}

function distortion(
  { survey, tone }: MeasuredChannel,
  harmonics: readonly HarmonicResult[],
): Pick<ChannelAnalysis, 'thdFPercent' | 'thdRPercent'> {
  if (survey.fundamental === null) return { thdFPercent: null, thdRPercent: null };
  if (tone) return { thdFPercent: tone.thdFPercent, thdRPercent: tone.thdRPercent };
  const rms = harmonics.map((harmonic) => harmonic.rms);
  const { thdMaxOrder } = survey.context.settings;
  return { thdFPercent: percent(thdF(rms, thdMaxOrder)), thdRPercent: percent(thdR(rms, thdMaxOrder)) };
}

function toneLevels(tone: ToneFigures | null): ToneFigures {
  return {
    thdPlusNPercent: tone?.thdPlusNPercent ?? null,
    sinadDb: tone?.sinadDb ?? null,
    snrDb: tone?.snrDb ?? null,
    sfdrDb: tone?.sfdrDb ?? null,
    enobBits: tone?.enobBits ?? null,
  };
}

function channelFlags({ survey, orders, grid }: MeasuredChannel, windows: WindowSynchronism | null): Flag[] {
  const { context, scan, spectrum, fundamental, track } = survey;
  const { figures, findings } = scan;
  const { settings, sampleRateHz, channel } = context;
  return qualityFlags({
    findings,
    sampleRateHz,
    unit: channel.unit,
    nominalFrequencyHz: settings.nominalFrequencyHz,
    maxOrder: settings.maxOrder,
    mean: fundamental ? orders!.dc : figures.mean,
    acRms: Math.sqrt(Math.max(0, figures.rms ** 2 - figures.mean ** 2)),
    fundamental: fundamental && {
      frequencyHz: fundamental.frequencyHz,
      rms: orders!.rms[0]!,
      listedOrders: grid!.orders,
    },
    track,
    spectrum,
    windows,
  });
}

/** What the windows miss of whole cycles of the channel's own fundamental. */
function windowSynchronism({
  survey: { context, track },
  grid,
  windows,
}: MeasuredChannel): WindowSynchronism | null {
  if (grid === null || windows === null || track === null) return null;
  const { boundaries, cycles } = grid;
  const errorPercent = Float64Array.from({ length: windowCount(grid) }, (_, j) => {
    const [from, to] = [boundaries[j]!, boundaries[j + 1]!];
    const held =
      (meanFrequencyHz(track, context.sampleRateHz, from, to) * (to - from)) / context.sampleRateHz;
    return 100 * Math.abs(held / cycles - 1);
  });
  return { starts: boundaries.slice(0, -1), errorPercent };
}

function largest(values: ArrayLike<number> | undefined): number | null {
  return values === undefined ? null : Array.from(values).reduce((max, x) => Math.max(max, x), 0);
}

function percent(ratio: number | null): number | null {
  return ratio === null ? null : 100 * ratio;
}
