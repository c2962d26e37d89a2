import { statistics } from '../figures/statistics.js';
import { smooth, smoothingAlpha } from '../groups/smooth.js';
import type {
  BandResult,
  DistortionStatistics,
  HarmonicResult,
  InterharmonicResult,
  WindowSeries,
} from '../types.js';

/**
 * Puts the figures of the synchronous windows into the list of orders: root mean square over all windows of the single
 * line, the group and the subgroup; mean and maximum of the smoothed group (IEC 61000-4-7, 5.5.1; IEC 61000-3-2, 6.2);
 * statistics over the windows that are not flagged.
 */
export function withWindowFigures(
  harmonics: readonly HarmonicResult[],
  series: WindowSeries,
  periodic: boolean,
): HarmonicResult[] {
  const { intervalS, flagged } = series;
  const lines = harmonics.map((harmonic, i) => quadraticMean(row(series, 'line', i)) ?? harmonic.rms);
  return harmonics.map((harmonic, i) => {
    const group = row(series, 'group', i);
    const subgroup = row(series, 'subgroup', i);
    const smoothed = group.some(Number.isNaN) ? null : smooth(group, smoothingAlpha(intervalS));
    return {
      ...harmonic,
      rms: lines[i]!,
      percentOfFundamental: periodic && lines[0]! > 0 ? (100 * lines[i]!) / lines[0]! : null,
      groupRms: quadraticMean(group),
      subgroupRms: quadraticMean(subgroup),
      smoothedMeanRms: smoothed && smoothed.reduce((sum, x) => sum + x, 0) / smoothed.length,
      smoothedMaxRms: smoothed && smoothed.reduce((max, x) => Math.max(max, x), 0),
      groupStatistics: statistics(group, flagged),
      subgroupStatistics: statistics(subgroup, flagged),
    };
  });
}

/** Interharmonic groups and centred subgroups, root mean square over the windows, from "between 0 and 1" upwards. */
export function interharmonicResults(series: WindowSeries): InterharmonicResult[] {
  return Array.from({ length: series.orders + 1 }, (_, order): InterharmonicResult => ({
    betweenOrders: [order, order + 1],
    groupRms: quadraticMean(row(series, 'interharmonicGroup', order)),
    centredSubgroupRms: quadraticMean(row(series, 'centredSubgroup', order)),
  })).filter((result) => result.groupRms !== null);
}

/** The 200 Hz bands over the windows that are not flagged; none when all are. */
export function bandResults(series: WindowSeries): BandResult[] {
  return Array.from(series.bandCentresHz).flatMap((centreHz, i) => {
    const kept = row(series, 'band', i).filter((_, j) => series.flagged[j] !== 1);
    const rms = quadraticMean(kept);
    return rms === null ? [] : [{ centreHz, rms, maxRms: kept.reduce((max, x) => Math.max(max, x), 0) }];
  });
}

/** Distortion over the windows that are not flagged; null when all are, or without a fundamental. */
export function distortionStatistics({
  thd,
  thdg,
  thds,
  pwhd,
  flagged,
}: WindowSeries): DistortionStatistics | null {
  const ofLines = statistics(thd, flagged);
  return (
    ofLines && {
      thd: ofLines,
      thdg: statistics(thdg, flagged),
      thds: statistics(thds, flagged),
      pwhd: statistics(pwhd, flagged),
    }
  );
}

type TwoDimensional =
  'line' | 'group' | 'subgroup' | 'phaseDeg' | 'interharmonicGroup' | 'centredSubgroup' | 'band';

function row(series: WindowSeries, name: TwoDimensional, index: number): Float64Array {
  return series[name].subarray(index * series.count, (index + 1) * series.count);
}

/** null when there is no value, or one is no number. */
function quadraticMean(values: Float64Array): number | null {
  let sum = 0;
  for (const value of values) sum += value * value;
  return values.length > 0 && !Number.isNaN(sum) ? Math.sqrt(sum / values.length) : null;
}
