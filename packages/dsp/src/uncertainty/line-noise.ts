import { disturbance, riseOf } from './disturbance.js';
import { whiteNoiseOfFigure } from './instrument.js';
import { quadraticMeanScatter } from './scatter.js';

/** Rows of window values, one per order or per gap between orders; NaN where a row does not apply. */
export interface WindowRows {
  count: number;
  /** 1 where a window is left out. */
  flagged: ArrayLike<number>;
  /** Single lines of orders 1, 2, … */
  line: Float64Array;
  /** Centred interharmonic subgroups between orders 0 and 1, 1 and 2, … */
  centredSubgroup: Float64Array;
  /** Cycles per window: as many lines lie from one order to the next. */
  cycles: number;
}

/** What noise does to the lines of a figure's orders. */
export interface LineNoise {
  /** Standard uncertainty of the rms of each order, null where it is not known. */
  standard: (number | null)[];
  /** Mean square that noise puts into the line of each order. */
  power: number[];
}

/** Lines of the centred subgroup, k = 2 … N − 2 (IEC 61000-4-7, 5.6). */
const EDGE_LINES = 3;

/**
 * Noise of orders from synchronous windows: the scatter of each line over the windows, and what the noise beside it adds
 * to it in every window alike. That is read from the lines between the orders (centred interharmonic subgroups, per
 * line), so it holds for noise of any colour; real interharmonics count as noise.
 */
export function noiseFromWindows(lineRms: readonly number[], rows: WindowRows): LineNoise {
  const row = (values: Float64Array, i: number): Float64Array =>
    values.subarray(i * rows.count, (i + 1) * rows.count);
  const power = lineRms.map((_, i) => {
    const sides = [beside(row, rows, i), beside(row, rows, i + 1)].filter((side) => side !== null);
    return sides.reduce((sum, side) => sum + side, 0) / Math.max(1, sides.length);
  });
  const standard = lineRms.map((rms, i) => {
    const scatter = quadraticMeanScatter(row(rows.line, i), rows.flagged);
    return scatter === null ? null : Math.hypot(scatter, riseOf(rms, power[i]!));
  });
  return { standard, power };
}

/** Noise of orders from the residual of a fit of all of them to N samples, taken as white. */
export function noiseFromResidual(
  lineRms: readonly number[],
  residualRms: number,
  sampleCount: number,
): LineNoise {
  const power = 2 * whiteNoiseOfFigure(residualRms, sampleCount) ** 2;
  return {
    standard: lineRms.map((rms) => disturbance(rms, power)),
    power: lineRms.map(() => power),
  };
}

/** Mean square of a single line between order `i` and the next, null where none is known. */
function beside(
  row: (values: Float64Array, i: number) => Float64Array,
  { centredSubgroup, cycles, flagged }: WindowRows,
  i: number,
): number | null {
  if (cycles <= EDGE_LINES) return null;
  let sum = 0;
  let count = 0;
  row(centredSubgroup, i).forEach((rms, j) => {
    if (flagged[j] === 1 || Number.isNaN(rms)) return;
    sum += rms ** 2;
    count++;
  });
  return count > 0 ? sum / count / (cycles - EDGE_LINES) : null;
}
