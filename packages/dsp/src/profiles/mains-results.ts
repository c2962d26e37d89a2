import type { FrequencyTrack } from '../fundamental/frequency-track.js';
import {
  centredSubgroups,
  harmonicGroups,
  harmonicSubgroups,
  interharmonicGroups,
} from '../groups/grouping.js';
import { smooth, smoothingAlpha } from '../groups/smooth.js';
import { synchronousWindows, type SynchronousWindows } from '../groups/synchronous-windows.js';
import { windowBoundaries } from '../groups/window-boundaries.js';
import type { HarmonicResult, InterharmonicResult } from '../types.js';

type Grouping = (lineRms: Float64Array, cycles: number, maxOrder: number) => (number | null)[];

export interface MainsResults {
  harmonics: HarmonicResult[];
  interharmonics: InterharmonicResult[];
  windows: { cycles: number; count: number; samplesPerWindow: number };
}

export interface MainsOptions {
  sampleRateHz: number;
  frequencyHz: number;
  cycles: number;
  track: FrequencyTrack | null;
  onWindow?: (fraction: number) => void;
}

/**
 * The mains profile: whole-record orders completed by the figures of the synchronous windows.
 *
 * @returns null when the record holds no whole window; the whole-record figures then stand alone
 */
export function mainsResults(
  samples: Float64Array,
  fitted: HarmonicResult[],
  { sampleRateHz, frequencyHz, cycles, track, onWindow }: MainsOptions,
): MainsResults | null {
  const boundaries = windowBoundaries(samples.length, sampleRateHz, frequencyHz, cycles, track);
  const count = boundaries.length - 1;
  if (count === 0) return null;
  const windows = synchronousWindows(samples, boundaries, cycles, fitted.length, { onWindow });
  const samplesPerWindow = boundaries[count]! / count;
  return {
    harmonics: withWindowFigures(fitted, windows, samplesPerWindow / sampleRateHz),
    interharmonics: interharmonicResults(windows, fitted.length),
    windows: { cycles, count, samplesPerWindow },
  };
}

/**
 * Puts the figures of the synchronous windows into the list of orders: root mean square over the windows of the single
 * line, the group and the subgroup; mean and maximum of the smoothed group (IEC 61000-4-7, 5.5.1; IEC 61000-3-2, 6.2).
 */
function withWindowFigures(
  harmonics: HarmonicResult[],
  windows: SynchronousWindows,
  windowS: number,
): HarmonicResult[] {
  const { cycles, lineRms } = windows;
  const count = harmonics.length;
  const groups = perOrder(windows, count, harmonicGroups);
  const subgroups = perOrder(windows, count, harmonicSubgroups);
  const lines = harmonics.map(({ order }) =>
    quadraticMean(lineRms.map((line) => line[cycles * order] ?? null)),
  );
  const fundamentalRms = lines[0] ?? harmonics[0]?.rms ?? 0;
  return harmonics.map((harmonic, i) => {
    const rms = lines[i] ?? harmonic.rms;
    const smoothed = smoothedSeries(groups[i]!, smoothingAlpha(windowS));
    return {
      ...harmonic,
      rms,
      percentOfFundamental: fundamentalRms > 0 ? (100 * rms) / fundamentalRms : null,
      groupRms: quadraticMean(groups[i]!),
      subgroupRms: quadraticMean(subgroups[i]!),
      smoothedMeanRms: smoothed && smoothed.reduce((sum, x) => sum + x, 0) / smoothed.length,
      smoothedMaxRms: smoothed && smoothed.reduce((max, x) => Math.max(max, x), 0),
    };
  });
}

/** Interharmonic groups and centred subgroups, root mean square over the windows, from "between 0 and 1" upwards. */
function interharmonicResults(windows: SynchronousWindows, maxOrder: number): InterharmonicResult[] {
  const groups = perOrder(windows, maxOrder, interharmonicGroups);
  const centred = perOrder(windows, maxOrder, centredSubgroups);
  return groups
    .map((values, order): InterharmonicResult => ({
      betweenOrders: [order, order + 1],
      groupRms: quadraticMean(values),
      centredSubgroupRms: quadraticMean(centred[order]!),
    }))
    .filter((result) => result.groupRms !== null);
}

/** Values per order, each over all windows. */
function perOrder(windows: SynchronousWindows, maxOrder: number, grouping: Grouping): (number | null)[][] {
  const perWindow = windows.lineRms.map((line) => grouping(line, windows.cycles, maxOrder));
  return (perWindow[0] ?? []).map((_, i) => perWindow.map((values) => values[i] ?? null));
}

function smoothedSeries(values: (number | null)[], alpha: number): Float64Array | null {
  return values.every((x) => x !== null) && values.length > 0 ? smooth(values, alpha) : null;
}

function quadraticMean(values: (number | null)[]): number | null {
  let sum = 0;
  for (const value of values) {
    if (value === null) return null;
    sum += value * value;
  }
  return values.length > 0 ? Math.sqrt(sum / values.length) : null;
}
