import { decadeTicks, linearTicks, type AxisTicks } from './si-ticks.js';

export type Scale = 'log' | 'linear';

/** Range of an axis of amplitudes, in the unit of the values. */
export interface AmplitudeRange {
  scale: Scale;
  bottom: number;
  top: number;
}

/** Decades shown below the highest value when nothing else says where to end. */
const decadesShown = 4;
/** Room above the highest bar or limit. */
const headroom = { log: 1.6, linear: 1.12 };

/**
 * Range for `values` under `limits`. A logarithmic one ends one decade below the lowest limit, where what counts
 * has been seen, or four decades below the highest value. Values that are null, zero or not finite are left out.
 */
export function amplitudeRange(
  values: readonly (number | null)[],
  limits: readonly number[],
  scale: Scale,
): AmplitudeRange {
  const positive = [...values, ...limits].filter((value): value is number => value !== null && value > 0);
  const highest = positive.length > 0 ? Math.max(...positive.filter(Number.isFinite)) : 1;
  const top = highest * headroom[scale];
  if (scale === 'linear') return { scale, bottom: 0, top };
  const lowestLimit = Math.min(...limits.filter((limit) => limit > 0));
  const bottom = Number.isFinite(lowestLimit)
    ? Math.max(lowestLimit / 10, highest * 1e-6)
    : highest * 10 ** -decadesShown;
  return { scale, bottom, top };
}

/** Axis entries of a Plotly layout for the range. */
export function amplitudeAxis({ scale, bottom, top }: AmplitudeRange, unit: string): Record<string, unknown> {
  const ticks: AxisTicks = scale === 'log' ? decadeTicks(bottom, top, unit) : linearTicks(bottom, top, unit);
  return {
    type: scale,
    range: scale === 'log' ? [Math.log10(bottom), Math.log10(top)] : [bottom, top],
    fixedrange: true,
    tickmode: 'array',
    ...ticks,
    ticklabelstandoff: 6,
  };
}

/** Value that stands `px` above `value` on a plot area `heightPx` high, kept below the top. */
export function raised(value: number, px: number, heightPx: number, range: AmplitudeRange): number {
  const { scale, bottom, top } = range;
  const share = px / heightPx;
  const ceiling = 1 - 10 / heightPx;
  if (scale === 'linear') {
    return Math.min(Math.max(value, bottom) + share * (top - bottom), bottom + ceiling * (top - bottom));
  }
  const span = Math.log10(top / bottom);
  const place = Math.log10(Math.max(value, bottom) / bottom) / span + share;
  return bottom * 10 ** (Math.min(place, ceiling) * span);
}
