import { thdF, thdR } from '../figures/distortion.js';
import { badRanges } from '../flags/bad-ranges.js';
import { unionOf } from '../flags/bounded-ranges.js';
import { frequencyDriftFlag } from '../flags/frequency-drift.js';
import type { WindowSynchronism } from '../flags/not-synchronous.js';
import { countedFrequency } from '../fundamental/counted-frequency.js';
import { keepsPhase } from '../fundamental/phase-wander.js';
import { listPeaks } from '../peaks/list-peaks.js';
import type { ChannelSurvey } from '../stages/channel-survey.js';
import type { MeasuredChannel } from '../stages/measure-channels.js';
import type {
  ChannelAnalysis,
  FundamentalResult,
  HarmonicResult,
  ToneDetails,
  ToneFigures,
  WindowSeries,
  WindowsResult,
} from '../types.js';
import { channelFlags, windowSynchronism } from './channel-flags.js';
import { channelUncertainties } from './channel-uncertainties.js';
import { frequencyDeviationHz } from './frequency-deviation.js';
import { harmonicResults } from './harmonic-results.js';
import {
  bandResults,
  distortionStatistics,
  interharmonicResults,
  withWindowFigures,
} from './mains-results.js';
import { windowSeries } from './window-series.js';

/** rms wander of the phase above which the fundamental has no single frequency. */
const WANDER_RAD = 0.02;

/**
 * The results of one channel, put together from what was measured.
 *
 * @param gapsBefore samples before which time is missing
 */
export function channelAnalysis(measured: MeasuredChannel, gapsBefore: readonly number[]): ChannelAnalysis {
  const { survey, scan, spectrum, frequencyHz, orders } = measured;
  const { context, track } = survey;
  const { channel, sampleRateHz, sampleCount, settings } = context;
  const { figures, formFactor } = scan;
  const mains = settings.profile === 'mains';
  const synchronism = mains ? windowSynchronism(measured) : null;
  const series = mains ? seriesOf(measured, gapsBefore) : null;
  const listed = listHarmonics(measured, series);
  const fundamental = fundamentalResult(measured, listed);
  const windows = series && windowsResult(measured, series, synchronism);
  const mean = frequencyHz !== null && orders !== null ? orders.dc : figures.mean;
  const uncertainty = channelUncertainties(measured, {
    ...{ fundamental, harmonics: listed, mean, series },
    synchronisationErrorPercent: windows?.synchronisationErrorPercent ?? null,
  });
  return {
    ...{ index: channel.index, name: channel.name, quantity: channel.quantity, unit: channel.unit },
    mean,
    rms: figures.rms,
    peak: figures.peak,
    crestFactor: figures.rms > 0 ? figures.peak / figures.rms : null,
    formFactor,
    fundamental,
    ...distortion(measured, listed),
    thdMaxOrder: settings.thdMaxOrder,
    ...toneFigures(measured),
    tone: toneDetails(measured),
    harmonics: listed.map((harmonic, i) => ({
      ...harmonic,
      uncertainty: uncertainty.orders[i]?.expanded ?? null,
    })),
    interharmonics: series ? interharmonicResults(series) : [],
    windows,
    distortion: series && distortionStatistics(series),
    bands: series ? bandResults(series) : [],
    countedFrequency: mains && track ? countedFrequency(track, sampleRateHz, sampleCount) : [],
    ...listPeaks(spectrum, { kaiserBeta: settings.kaiserBeta }),
    uncertainty: uncertainty.figures,
    series,
    flags: channelFlags(measured, synchronism),
    spectrum,
  };
}

function seriesOf(
  { survey: { context }, scan, frequencyHz, grid, windows }: MeasuredChannel,
  gapsBefore: readonly number[],
): WindowSeries | null {
  if (grid === null || windows === null) return null;
  const gaps = gapsBefore.map((sample) => ({ start: sample - 1, end: sample + 1 }));
  return windowSeries(windows, grid, {
    sampleRateHz: context.sampleRateHz,
    thdMaxOrder: context.settings.thdMaxOrder,
    periodic: frequencyHz !== null,
    badRanges: unionOf([...badRanges(scan.findings, context.sampleRateHz, frequencyHz), ...gaps]),
  });
}

function listHarmonics(measured: MeasuredChannel, series: WindowSeries | null): HarmonicResult[] {
  const { frequencyHz, grid, orders } = measured;
  if (orders === null || grid === null) return [];
  const periodic = frequencyHz !== null;
  const { sampleRateHz } = measured.survey.context;
  const steady =
    isSteady(measured) && frequencyDriftFlag(grid.track, grid.frequencyHz, sampleRateHz) === null;
  const harmonics = harmonicResults(orders, { steady, periodic });
  return series ? withWindowFigures(harmonics, series, periodic) : harmonics;
}

function fundamentalResult(
  measured: MeasuredChannel,
  harmonics: readonly HarmonicResult[],
): FundamentalResult | null {
  const { survey, frequencyHz, orders } = measured;
  const [first] = harmonics;
  if (frequencyHz === null || orders === null || first === undefined) return null;
  return {
    frequencyHz,
    rms: first.rms,
    phaseDeg: first.phaseDeg,
    frequencyUncertaintyHz: keepsFrequency(survey) ? frequencyDeviationHz(orders, survey.context) : null,
  };
}

/** Whether one frequency holds for the whole record, so that there is a value of which to state an uncertainty. */
function keepsFrequency({ track, context: { sampleCount } }: ChannelSurvey): boolean {
  return keepsPhase(track, 0, sampleCount, WANDER_RAD);
}

function isSteady({ survey: { track, context }, frequencyHz }: MeasuredChannel): boolean {
  return frequencyHz === null || frequencyDriftFlag(track, frequencyHz, context.sampleRateHz) === null;
}

function windowsResult(
  { grid }: MeasuredChannel,
  { count, flagged }: WindowSeries,
  synchronism: WindowSynchronism | null,
): WindowsResult {
  const { cycles, boundaries, channel } = grid!;
  return {
    cycles,
    count,
    samplesPerWindow: boundaries[count]! / count,
    flaggedCount: flagged.reduce((sum, x) => sum + x, 0),
    synchronisationErrorPercent:
      synchronism && Array.from(synchronism.errorPercent).reduce((max, x) => Math.max(max, x), 0),
    gridChannel: channel,
  };
}

function distortion(
  { survey, frequencyHz, tone }: MeasuredChannel,
  harmonics: readonly HarmonicResult[],
): Pick<ChannelAnalysis, 'thdFPercent' | 'thdRPercent'> {
  if (frequencyHz === null) return { thdFPercent: null, thdRPercent: null };
  if (tone) return { thdFPercent: tone.thdFPercent, thdRPercent: tone.thdRPercent };
  const rms = harmonics.map((harmonic) => harmonic.rms);
  const { thdMaxOrder } = survey.context.settings;
  return { thdFPercent: percent(thdF(rms, thdMaxOrder)), thdRPercent: percent(thdR(rms, thdMaxOrder)) };
}

function toneFigures({ tone }: MeasuredChannel): ToneFigures {
  return {
    thdPlusNPercent: tone?.thdPlusNPercent ?? null,
    sinadDb: tone?.sinadDb ?? null,
    snrDb: tone?.snrDb ?? null,
    sfdrDb: tone?.sfdrDb ?? null,
    enobBits: tone?.enobBits ?? null,
  };
}

function toneDetails({ tone }: MeasuredChannel): ToneDetails | null {
  return (
    tone && {
      levelDbfs: tone.levelDbfs,
      enobFullScaleBits: tone.enobFullScaleBits,
      noiseDensity: tone.noiseDensity,
      thdPlusNBandPercent: tone.thdPlusNBandPercent,
      bandHz: tone.bandHz,
      harmonicsDbc: tone.harmonicsDbc,
    }
  );
}

function percent(ratio: number | null): number | null {
  return ratio === null ? null : 100 * ratio;
}
