import { formatSi } from '../../lib/format.js';

/** Places and texts of an axis: 1 A, 100 mA, 10 mA. */
export interface AxisTicks {
  tickvals: number[];
  ticktext: string[];
}

const label = (value: number, unit: string, digits = 4) => formatSi(value, unit, { digits, trim: true });

/** Digits that tell neighbouring ticks apart: five for 49.98 and 49.982. */
function digitsFor(farthest: number, step: number): number {
  const places = Math.floor(Math.log10(farthest)) - Math.floor(Math.log10(step)) + 1;
  return Math.max(4, places);
}

/** Step of 1, 2 or 5 times a power of ten that comes nearest to `count` steps over `span`, on a scale of ratios. */
function niceStep(span: number, count: number): number {
  const raw = span / count;
  const power = 10 ** Math.floor(Math.log10(raw));
  const excess = raw / power;
  const factor = excess >= Math.sqrt(50) ? 10 : excess >= Math.sqrt(10) ? 5 : excess >= Math.sqrt(2) ? 2 : 1;
  return factor * power;
}

/** Ticks at round values within [from, to], labelled with SI prefixes; none when the range is empty. */
export function linearTicks(from: number, to: number, unit: string, count = 4): AxisTicks {
  if (!(to > from)) return { tickvals: [], ticktext: [] };
  const step = niceStep(to - from, count);
  const first = Math.ceil(from / step - 1e-9);
  const last = Math.floor(to / step + 1e-9);
  const tickvals = Array.from({ length: last - first + 1 }, (_, i) => (first + i) * step);
  const digits = digitsFor(Math.max(Math.abs(from), Math.abs(to)), step);
  const ticktext = tickvals.map((value) => label(Number(value.toPrecision(12)), unit, digits));
  return { tickvals, ticktext };
}

/** Ticks at whole powers of ten within [from, to]; every second one or fewer where there are many. */
export function decadeTicks(from: number, to: number, unit: string, most = 6): AxisTicks {
  if (!(from > 0 && to > from)) return { tickvals: [], ticktext: [] };
  const first = Math.ceil(Math.log10(from) - 1e-9);
  const last = Math.floor(Math.log10(to) + 1e-9);
  const every = Math.max(1, Math.ceil((last - first + 1) / most));
  const exponents = Array.from({ length: Math.max(0, last - first + 1) }, (_, i) => last - i);
  const tickvals = exponents.filter((_, i) => i % every === 0).map((exponent) => Number(`1e${exponent}`));
  return { tickvals, ticktext: tickvals.map((value) => label(value, unit)) };
}
