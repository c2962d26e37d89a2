import { decadeTicks, linearTicks, type AxisTicks } from './si-ticks.js';

export type Scale = 'log' | 'linear';

/** Range of an axis of amplitudes, in the unit of the values. */
export interface AmplitudeRange {
  scale: Scale;
  bottom: number;
  top: number;
}

/** A logarithmic axis without limits spans between three and eight decades. */
const fewestDecades = 3;
const mostDecades = 8;
/** Room above the highest bar or limit. */
const headroom = { log: 1.6, linear: 1.12 };

/**
 * Range for `values` under `limits`; what is null, zero or not finite is left out. A logarithmic one ends a decade
 * below the lowest limit, and below `faintest`, a value that should still be seen (a weak harmonic, the noise); without
 * either four decades below the highest. It never spans more than `decades`.
 */
export function amplitudeRange(
  values: readonly (number | null)[],
  limits: readonly number[],
  scale: Scale,
  faintest: number | null = null,
  decades = mostDecades,
): AmplitudeRange {
  const highest = [...values, ...limits].reduce<number>(
    (most, value) => (value !== null && Number.isFinite(value) ? Math.max(most, value) : most),
    0,
  );
  const reference = highest > 0 ? highest : 1;
  const top = reference * headroom[scale];
  if (scale === 'linear') return { scale, bottom: 0, top };
  const deepest = reference * 10 ** -decades;
  const lowestLimit = Math.min(...limits.filter((limit) => limit > 0));
  const seen = faintest === null ? reference * 1e-4 : faintest / 3;
  if (Number.isFinite(lowestLimit)) {
    const wanted = Math.min(lowestLimit / 10, faintest === null ? Infinity : seen);
    return { scale, bottom: Math.max(wanted, deepest), top };
  }
  const bottom = Math.min(Math.max(seen, deepest), reference * 10 ** -fewestDecades);
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
