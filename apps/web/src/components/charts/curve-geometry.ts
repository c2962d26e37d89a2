import type { AxisTicks } from './si-ticks.js';

/** One axis of a plain chart. */
export interface ChartAxis {
  scale: 'linear' | 'log';
  from: number;
  to: number;
  ticks: AxisTicks;
  title?: string;
}

export type Place = (value: number) => number;

/** Place of a value between two ends in px. */
export function placeOn({ scale, from, to }: ChartAxis, start: number, end: number): Place {
  if (scale === 'linear') return (value) => start + ((value - from) / (to - from)) * (end - start);
  const span = Math.log(to / from);
  return (value) => start + (Math.log(value / from) / span) * (end - start);
}

/** Value at a place in px; the inverse of `placeOn`. */
export function valueAtPlace({ scale, from, to }: ChartAxis, start: number, end: number, px: number): number {
  const share = (px - start) / (end - start);
  return scale === 'linear' ? from + share * (to - from) : from * (to / from) ** share;
}

/** How far beyond the frame a curve is drawn, in px: enough to leave it, short enough for any renderer. */
const beyond = 2000;
const kept = (px: number) => Math.max(-beyond, Math.min(beyond, px)).toFixed(1);

const isMissing = (value: number | null | undefined): value is null | undefined =>
  value === null || value === undefined || Number.isNaN(value);

/** SVG path data of a line; what is null, not a number, or has no place on a logarithmic axis breaks it. */
export function linePath(
  x: ArrayLike<number | null>,
  y: ArrayLike<number | null>,
  placeX: Place,
  placeY: Place,
): string {
  let path = '';
  let pen: 'M' | 'L' = 'M';
  for (let i = 0; i < x.length; i++) {
    const [at, value] = [x[i], y[i]];
    const px = isMissing(at) ? Number.NaN : placeX(at);
    const py = isMissing(value) ? Number.NaN : placeY(value);
    if (Number.isNaN(px) || Number.isNaN(py)) pen = 'M';
    else {
      path += `${pen}${kept(px)} ${kept(py)}`;
      pen = 'L';
    }
  }
  return path;
}

/** Closed path between two lines over the same places. */
export function bandPath(
  x: ArrayLike<number>,
  low: ArrayLike<number>,
  high: ArrayLike<number>,
  placeX: Place,
  placeY: Place,
): string {
  const there = Array.from({ length: x.length }, (_, i) => i).filter(
    (i) => Number.isFinite(low[i]) && Number.isFinite(high[i]),
  );
  if (there.length < 2) return '';
  const corner = (i: number, value: number) => `${kept(placeX(x[i]!))} ${kept(placeY(value))}`;
  const top = there.map((i) => corner(i, high[i]!));
  const bottom = there.toReversed().map((i) => corner(i, low[i]!));
  return `M${[...top, ...bottom].join('L')}Z`;
}

/** Index of the place nearest to a value, on the axis' own scale. */
export function nearestIndex(x: ArrayLike<number>, value: number, placeX: Place): number {
  let best = 0;
  let least = Infinity;
  const at = placeX(value);
  for (let i = 0; i < x.length; i++) {
    const distance = Math.abs(placeX(x[i]!) - at);
    if (distance < least) [best, least] = [i, distance];
  }
  return best;
}

/** About the width of a digit or letter on an axis, and the room between two labels, in px. */
const letterPx = 6.6;
const roomPx = 8;

/** Indexes of the labels that can stand beside each other along an axis, from its start. */
export function labelsThatFit({ tickvals, ticktext }: AxisTicks, place: Place): number[] {
  let end = -Infinity;
  return tickvals.flatMap((value, i) => {
    const half = ((ticktext[i] ?? '').length * letterPx) / 2;
    const at = place(value);
    if (at - half < end + roomPx) return [];
    end = at + half;
    return [i];
  });
}
