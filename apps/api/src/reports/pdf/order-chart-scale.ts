import type { Harmonic, ReportSection } from '@overtally/contracts';
import { isOver } from './words.js';

export interface ChartBar {
  order: number;
  /** In the unit of the channel; null where the order was not measured. */
  value: number | null;
  limit: number | null;
  kind: 'fundamental' | 'plain' | 'over';
}

export interface ChartScale {
  low: number;
  high: number;
  /** Powers of ten inside the scale. */
  ticks: number[];
}

const mostDecades = 5;
const highestUnjudged = 40;

/** The bars of a section's chart: the fundamental and each order judged. */
export function chartBars({ verdict, analysis }: ReportSection): ChartBar[] {
  const fundamental = analysis.channel.fundamental;
  const first: ChartBar[] =
    fundamental === null || verdict.orders.some((entry) => entry.order === 1)
      ? []
      : [{ order: 1, value: fundamental.rms, limit: null, kind: 'fundamental' }];
  const judged = verdict.orders.map((entry): ChartBar => ({
    order: entry.order,
    value: entry.mean,
    limit: entry.limit,
    kind: isOver(entry.result) ? 'over' : 'plain',
  }));
  if (judged.length === 0) return [...first, ...unjudgedBars(analysis.channel.harmonics)];
  return [...first, ...judged].sort((one, other) => one.order - other.order);
}

/** What was measured, for a verdict that says nothing about single orders. */
function unjudgedBars(harmonics: readonly Harmonic[]): ChartBar[] {
  return harmonics
    .filter(({ order }) => order > 1 && order <= highestUnjudged)
    .map(({ order, rms }) => ({ order, value: rms, limit: null, kind: 'plain' }));
}

/** A logarithmic scale that holds the largest bar and limit and goes well below the lowest limit. */
export function chartScale(bars: readonly ChartBar[]): ChartScale | null {
  const values = bars.flatMap((bar) => [bar.value, bar.limit]).filter((value) => value !== null && value > 0);
  if (values.length === 0) return null;
  const positive = values as number[];
  const limits = bars.flatMap((bar) => (bar.limit === null ? [] : [bar.limit]));
  const high = Math.max(...positive) * 1.8;
  const wanted = (limits.length > 0 ? Math.min(...limits) : Math.min(...positive)) / 8;
  const low = Math.max(wanted, high / 10 ** mostDecades);
  const ticks: number[] = [];
  for (let power = Math.ceil(Math.log10(low)); power <= Math.floor(Math.log10(high)); power += 1) {
    ticks.push(Number(`1e${power}`));
  }
  return { low, high, ticks };
}

/** Height over the foot of the scale, from 0 to 1. */
export function heightOn(scale: ChartScale, value: number): number {
  const part = Math.log10(value / scale.low) / Math.log10(scale.high / scale.low);
  return Math.min(Math.max(part, 0), 1);
}
