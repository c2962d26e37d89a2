import { thdF } from '../figures/distortion.js';
import type { Uncertainty, WindowSeries } from '../types.js';
import { combineUncertainty, type Contribution } from './combine.js';
import { disturbance } from './disturbance.js';
import {
  gainContributions,
  quantisationDeviation,
  whiteNoiseOfFigure,
  type GainAccuracy,
} from './instrument.js';
import { noiseFromResidual, noiseFromWindows, type LineNoise } from './line-noise.js';
import { quadraticMeanScatter } from './scatter.js';
import { brokenCycle, fundamentalLeakage, lineLoss, type Synchronism } from './synchronisation.js';
import { thdStandard, thdSynchronisation } from './thd-uncertainty.js';

/** The synchronous windows that figures were taken from. */
export interface WindowsBehindFigures {
  cycles: number;
  /** Largest deviation of a window from whole cycles in percent; null when it is not known. */
  synchronisationErrorPercent: number | null;
  series: Pick<WindowSeries, 'count' | 'flagged' | 'rms' | 'thd' | 'line' | 'centredSubgroup'>;
}

export interface UncertaintyInput {
  sampleRateHz: number;
  sampleCount: number;
  /** What is known of the gain; null: nothing, and the uncertainties hold for the record alone. */
  accuracy: GainAccuracy | null;
  /** Step of the converter in the unit of the samples; null when the samples lie on no grid. */
  quantisationStep: number | null;
  mean: number | null;
  /** Of all samples. */
  rms: number | null;
  /** rms of what the fit of the whole record leaves over (without a fit: of everything but DC). */
  residualRms: number;
  /** Null without a fundamental; the deviation is that of the Cramér-Rao bound, null when the frequency drifts. */
  fundamental: { frequencyHz: number; frequencyUncertaintyHz: number | null } | null;
  /** rms of orders 1, 2, …; empty without a fundamental. */
  lineRms: readonly number[];
  thdMaxOrder: number;
  /** Null where the orders come from the fit of the whole record. */
  windows: WindowsBehindFigures | null;
}

export interface ChannelUncertainty {
  /** By the name of the figure: rms, mean, fundamental.rms, fundamental.frequencyHz, thdFPercent, thdRPercent. */
  figures: Record<string, Uncertainty>;
  /** Of the rms of orders 1, 2, …; null where nothing is known. */
  orders: (Uncertainty | null)[];
}

/**
 * Expanded uncertainties (k = 2) of the figures of a channel by the GUM (JCGM 100:2008). Sources:
 *
 * - calibration and accuracy of the gain, in percent of reading (not in ratios, where a common gain cancels);
 * - quantisation as white noise, step/√12 spread over the samples (see `quantisationOf`);
 * - noise from the scatter of the windows, of four or more that are not flagged; otherwise from the residual of the fit;
 * - synchronisation: windows that miss whole cycles, and a broken cycle at the end of the record for the total rms;
 * - fit: the Cramér-Rao bound of the frequency.
 *
 * Not part of it, as nothing tells of them: offset, frequency response and linearity of the instrument, error of its
 * time base, sensors outside the stated accuracy.
 */
export function channelUncertainty(input: UncertaintyInput): ChannelUncertainty {
  const noise = lineNoise(input);
  const quantisation = quantisationOf(input);
  const orders = input.lineRms.map((rms, i) =>
    combineUncertainty([
      ...gainContributions(rms, input.accuracy),
      { source: 'quantisation', standard: disturbance(rms, 2 * quantisation ** 2) },
      { source: 'noise', standard: noise.standard[i] ?? 0 },
      ...lineSynchronisation(input, i + 1),
    ]),
  );
  const thd = thdContributions(input, noise, quantisation);
  const figures: Record<string, Uncertainty | null> = {
    rms: input.rms === null ? null : rmsUncertainty(input, input.rms, quantisation),
    mean: input.mean === null ? null : meanUncertainty(input, input.mean, quantisation),
    'fundamental.rms': orders[0] ?? null,
    'fundamental.frequencyHz': combineUncertainty([
      { source: 'fit', standard: input.fundamental?.frequencyUncertaintyHz ?? 0 },
    ]),
    thdFPercent: combineUncertainty(thd.ofF),
    thdRPercent: combineUncertainty(thd.ofR),
  };
  const known = Object.entries(figures).filter((entry): entry is [string, Uncertainty] => entry[1] !== null);
  return { figures: Object.fromEntries(known), orders };
}

function lineNoise({ lineRms, residualRms, sampleCount, windows }: UncertaintyInput): LineNoise {
  if (windows !== null) {
    const noise = noiseFromWindows(lineRms, { ...windows.series, cycles: windows.cycles });
    if (noise.standard[0] !== null) return noise;
  }
  return noiseFromResidual(lineRms, residualRms, sampleCount);
}

/**
 * Standard uncertainty that the converter brings to a mean, a total rms or the rms of a line. Noise of half a step or more
 * makes its errors independent from sample to sample (Widrow and Kollár, "Quantization Noise", 2008, on dither): they
 * average over the whole record. A cleaner signal may be in step with the sampling, and its errors then are the same in
 * every cycle and mirrored in every half: only the samples of half a cycle surely average.
 */
function quantisationOf({
  quantisationStep,
  residualRms,
  sampleCount,
  sampleRateHz,
  fundamental,
}: UncertaintyInput): number {
  if (quantisationStep === null) return 0;
  const deviation = quantisationDeviation(quantisationStep);
  const noise = Math.sqrt(Math.max(0, residualRms ** 2 - deviation ** 2));
  const dithered = fundamental === null || noise >= quantisationStep / 2;
  const averaged = dithered
    ? sampleCount
    : Math.min(sampleCount, sampleRateHz / (2 * fundamental.frequencyHz));
  return whiteNoiseOfFigure(deviation, Math.max(1, averaged));
}

function synchronismOf({ windows }: UncertaintyInput): Synchronism | null {
  const percent = windows?.synchronisationErrorPercent ?? null;
  return windows === null || percent === null ? null : { cycles: windows.cycles, error: percent / 100 };
}

/** The loss of the line (anywhere up to its bound: /√3) and what of the fundamental leaks into it. */
function lineSynchronisation(input: UncertaintyInput, order: number): Contribution[] {
  const synchronism = synchronismOf(input);
  if (synchronism === null) return [];
  const rms = input.lineRms[order - 1]!;
  const leak = input.lineRms[0]! * fundamentalLeakage(order, synchronism);
  return [
    { source: 'synchronisation', standard: (rms * lineLoss(order, synchronism)) / Math.sqrt(3) },
    { source: 'synchronisation', standard: disturbance(rms, leak ** 2) },
  ];
}

function rmsUncertainty(input: UncertaintyInput, rms: number, quantisation: number): Uncertainty | null {
  const { windows, residualRms, sampleCount, fundamental, lineRms, sampleRateHz } = input;
  const scatter = windows === null ? null : quadraticMeanScatter(windows.series.rms, windows.series.flagged);
  const cycles = fundamental === null ? null : (fundamental.frequencyHz * sampleCount) / sampleRateHz;
  const share = rms > 0 && lineRms.length > 0 ? (lineRms[0]! / rms) ** 2 : 0;
  return combineUncertainty([
    ...gainContributions(rms, input.accuracy),
    { source: 'quantisation', standard: quantisation },
    { source: 'noise', standard: scatter ?? whiteNoiseOfFigure(residualRms, sampleCount) },
    // Of unknown phase: arcsine distribution, bound/√2.
    {
      source: 'synchronisation',
      standard: cycles === null ? 0 : (rms * share * brokenCycle(cycles)) / Math.SQRT2,
    },
  ]);
}

function meanUncertainty(input: UncertaintyInput, mean: number, quantisation: number): Uncertainty | null {
  return combineUncertainty([
    ...gainContributions(mean, input.accuracy),
    { source: 'quantisation', standard: quantisation },
    { source: 'noise', standard: whiteNoiseOfFigure(input.residualRms, input.sampleCount) },
  ]);
}

/** In percent. THD_R = T/√(1 + T²) moves (1 + T²)^(−3/2) times as much as THD_F. */
function thdContributions(
  input: UncertaintyInput,
  noise: LineNoise,
  quantisation: number,
): { ofF: Contribution[]; ofR: Contribution[] } {
  const lineRms = input.lineRms.slice(0, input.thdMaxOrder);
  const thd = thdF(lineRms, input.thdMaxOrder);
  if (thd === null) return { ofF: [], ofR: [] };
  const synchronism = synchronismOf(input);
  const plain: Contribution[] = [
    { source: 'noise', standard: thdNoise(input, lineRms, noise) },
    {
      source: 'quantisation',
      standard: thdStandard({
        lineRms,
        inPhase: lineRms.map(() => quantisation),
        power: lineRms.map(() => 2 * quantisation ** 2),
      }),
    },
  ];
  if (synchronism !== null) plain.push(thdSynchronisation(lineRms, synchronism));
  const times = (factor: number): Contribution[] =>
    plain.map(({ source, standard }) => ({ source, standard: factor * standard }));
  return { ofF: times(100), ofR: times(100 * (1 + thd * thd) ** -1.5) };
}

/** The scatter of the windows' own THD where there is one, and the rise by the noise within the lines. */
function thdNoise(input: UncertaintyInput, lineRms: readonly number[], noise: LineNoise): number {
  const { windows } = input;
  const scatter = windows === null ? null : quadraticMeanScatter(windows.series.thd, windows.series.flagged);
  if (scatter === null) {
    const inPhase = noise.power.map((power) => Math.sqrt(power / 2));
    return thdStandard({ lineRms, inPhase, power: noise.power });
  }
  const rise = thdStandard({ lineRms, inPhase: lineRms.map(() => 0), power: noise.power });
  return Math.hypot(scatter / 100, rise);
}
