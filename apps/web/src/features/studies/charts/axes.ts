import type { ChartAxis } from '../../../components/charts/curve-geometry.js';
import { decadeTicks, linearTicks } from '../../../components/charts/si-ticks.js';
import { formatSi } from '../../../lib/format.js';

/** Smallest and largest of the finite values; 0 and 1 without any. */
export function extent(...lists: readonly ArrayLike<number | null>[]): [number, number] {
  let [low, high] = [Infinity, -Infinity];
  for (const list of lists) {
    for (let i = 0; i < list.length; i++) {
      const value = list[i];
      if (value === null || value === undefined || !Number.isFinite(value)) continue;
      if (value < low) low = value;
      if (value > high) high = value;
    }
  }
  return low <= high ? [low, high] : [0, 1];
}

/** A linear axis about values, with some room at both ends. */
export function linearAxis([low, high]: [number, number], unit: string, room = 0.06): ChartAxis {
  const span = high - low || Math.abs(high) || 1;
  const [from, to] = [low - room * span, high + room * span];
  return { scale: 'linear', from, to, ticks: linearTicks(from, to, unit) };
}

/** A logarithmic axis of frequencies: decades, and 2 and 5 between them where there are few. */
export function frequencyAxis(from: number, to: number): ChartAxis {
  const decades = Math.log10(to / from);
  if (decades > 3) return { scale: 'log', from, to, ticks: decadeTicks(from, to, 'Hz') };
  const tickvals: number[] = [];
  for (let power = Math.floor(Math.log10(from)); power <= Math.log10(to); power++) {
    for (const factor of [1, 2, 5]) {
      const value = Number(`${factor}e${power}`);
      if (value >= from && value <= to) tickvals.push(value);
    }
  }
  const ticktext = tickvals.map((value) => formatSi(value, 'Hz', { trim: true }));
  return { scale: 'log', from, to, ticks: { tickvals, ticktext } };
}

/** An axis of orders; odd ones are labelled, fewer where there are many. */
export function orderAxis(last: number): ChartAxis {
  const step = last > 60 ? 10 : last > 26 ? 4 : 2;
  const tickvals = Array.from({ length: last }, (_, i) => i + 1).filter((order) => (order - 1) % step === 0);
  return {
    scale: 'linear',
    from: 0.3,
    to: last + 0.7,
    ticks: { tickvals, ticktext: tickvals.map(String) },
    title: 'Order',
  };
}
