import { cellKind, cellNumber } from './cell.js';
import type { TimeColumnInput } from './time-column.js';
import { isTimeName } from './time-column.js';
import { secondsPerUnit } from '../units.js';

/** Rows that must agree before a column is taken for a clock. */
const LEAST_ROWS = 8;

function numberIn(cell: string | undefined, input: TimeColumnInput): number | null {
  const { decimal } = input.dialect;
  return cell !== undefined && cellKind(cell, decimal) === 'number' ? cellNumber(cell, decimal) : null;
}

/** Pairs of reference and value in the first rows; the reference is the row number where the time is a calendar stamp. */
function pairsOf(input: TimeColumnInput, time: number, index: number, stamped: boolean): [number, number][] {
  return input.body.flatMap((row, i): [number, number][] => {
    const reference = stamped ? i : numberIn(row[time], input);
    const value = numberIn(row[index], input);
    return reference === null || value === null ? [] : [[reference, value]];
  });
}

/** Rise of the values per unit of the reference when both go up row by row in step, to half a step; else null. */
function slopeInStep(pairs: [number, number][]): number | null {
  const first = pairs[0];
  const last = pairs.at(-1);
  if (pairs.length < LEAST_ROWS || first === undefined || last === undefined) return null;
  const slope = (last[1] - first[1]) / (last[0] - first[0]);
  if (!(slope > 0) || !Number.isFinite(slope)) return null;
  const tolerance = (0.5 * (last[1] - first[1])) / (pairs.length - 1);
  const inStep = pairs.every(([reference, value], i) => {
    const before = pairs[i - 1];
    const rises = before === undefined || value > before[1];
    return rises && Math.abs(value - first[1] - slope * (reference - first[0])) <= tolerance;
  });
  return inStep ? slope : null;
}

function isPowerOfThousand(slope: number): boolean {
  const power = Math.round(Math.log10(slope) / 3);
  return Math.abs(slope / 10 ** (3 * power) - 1) <= 1e-3;
}

/**
 * Columns that are clocks beside the time column: they rise in step with it and either say by name or unit that they
 * are times, or have no unit and run at exactly its pace, seconds against milliseconds and the like included.
 * @param time the time column @param stamped whether it holds calendar or clock stamps
 */
export function findSecondClocks(input: TimeColumnInput, time: number, stamped: boolean): number[] {
  const clocks = input.columns.filter((column) => {
    if (column.index === time || column.quantity !== 'other') return false;
    const inSeconds = secondsPerUnit(column.unit) !== null;
    if (!inSeconds && column.unit !== '') return false;
    const slope = slopeInStep(pairsOf(input, time, column.index, stamped));
    if (slope === null) return false;
    return inSeconds || isTimeName(column.name) || (!stamped && isPowerOfThousand(slope));
  });
  return clocks.map(({ index }) => index);
}
