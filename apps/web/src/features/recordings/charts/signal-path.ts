import type { PreviewSignal } from '@overtally/contracts';
import { linearTicks } from '../../../components/charts/si-ticks.js';
import { runs } from './overview-path.js';

/** Cycles of the fundamental that are drawn; without one, everything there is. */
const cyclesShown = 5;

/** A mark on an axis: where it stands, in percent from the left or the top, and its text. */
export interface AxisMark {
  at: number;
  text: string;
}

export interface SignalDrawing {
  /** Line through the values for a box of 1000 by 100, broken where values are missing. */
  path: string;
  xMarks: AxisMark[];
  yMarks: AxisMark[];
  /** Where zero lies, in percent from the top; null: out of the picture. */
  zeroAt: number | null;
  /** Values drawn, and how many of them are missing. */
  count: number;
  missing: number;
}

/** The first cycles of a channel as a line with the marks of its axes; null where there is no value to draw. */
export function drawSignal(signal: PreviewSignal): SignalDrawing | null {
  const values = signal.values.slice(0, countShown(signal));
  const known = values.filter((value): value is number => value !== null);
  if (known.length === 0) return null;
  const lowest = known.reduce((a, b) => Math.min(a, b));
  const highest = known.reduce((a, b) => Math.max(a, b));
  // A constant stands in the middle of a range of its own size.
  const air = highest > lowest ? 0.06 * (highest - lowest) : Math.abs(highest) || 1;
  const low = lowest - air;
  const high = highest + air;
  const lastS = signal.startS + Math.max(1, values.length - 1) * signal.stepS;
  const x = (timeS: number) => (100 * (timeS - signal.startS)) / (lastS - signal.startS);
  const y = (value: number) => (100 * (high - value)) / (high - low);
  const path = runs(values)
    .map((indices) => {
      const points = indices.map((i) => {
        const across = 10 * x(signal.startS + i * signal.stepS);
        return `${across.toFixed(1)} ${y(values[i] ?? 0).toFixed(2)}`;
      });
      // A single value between missing ones is a dot.
      return points.length === 1 ? `M${points[0]}h0` : `M${points.join('L')}`;
    })
    .join('');
  return {
    path,
    xMarks: marks(linearTicks(signal.startS, lastS, 's', 5), x),
    yMarks: marks(linearTicks(low, high, signal.unit, 4), y),
    zeroAt: low < 0 && high > 0 ? y(0) : null,
    count: values.length,
    missing: values.length - known.length,
  };
}

function countShown({ fundamentalHz, stepS, values }: PreviewSignal): number {
  if (fundamentalHz === null) return values.length;
  return Math.min(values.length, Math.max(2, Math.ceil(cyclesShown / (fundamentalHz * stepS)) + 1));
}

const marks = (
  { tickvals, ticktext }: ReturnType<typeof linearTicks>,
  place: (value: number) => number,
): AxisMark[] => tickvals.map((value, i) => ({ at: place(value), text: ticktext[i] ?? '' }));
