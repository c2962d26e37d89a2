/*
 * Grouping of IEC 61000-4-7:2002 + A1:2008, 5.5 to 5.7 and annex A. `lineRms[k]` is the rms value Y_C,k of spectral
 * line k of a window of `cycles` periods (N), so that order h is line N·h. A group whose lines are not all there
 * (the record ends below it in frequency) is null. Orders are listed from 1, interharmonic groups from "between 0
 * and 1".
 */

type Lines = ArrayLike<number>;

/** A group of one order. */
export type Group = (lineRms: Lines, cycles: number, order: number) => number | null;

/** Y_g,h: the lines around order h up to half-way to its neighbours, those half-way with half their square. */
export const harmonicGroup: Group = (lineRms, cycles, order) => {
  const half = cycles / 2;
  const centre = cycles * order;
  const inner = sumOfSquares(lineRms, centre - Math.ceil(half) + 1, centre + Math.ceil(half) - 1);
  if (inner === null || centre + Math.floor(half) >= lineRms.length) return null;
  const edges = cycles % 2 === 0 ? (lineRms[centre - half]! ** 2 + lineRms[centre + half]! ** 2) / 2 : 0;
  return Math.sqrt(inner + edges);
};

/** Y_sg,h: order h and one line to each side. */
export const harmonicSubgroup: Group = (lineRms, cycles, order) =>
  root(sumOfSquares(lineRms, cycles * order - 1, cycles * order + 1));

/** Y_ig,h: all lines between orders h and h + 1. */
export const interharmonicGroup: Group = (lineRms, cycles, order) =>
  root(sumOfSquares(lineRms, cycles * order + 1, cycles * (order + 1) - 1));

/** Y_isg,h: the lines between orders h and h + 1 without those next to the orders. */
export const centredSubgroup: Group = (lineRms, cycles, order) =>
  root(sumOfSquares(lineRms, cycles * order + 2, cycles * (order + 1) - 2));

/** Y_g,h of the orders 1..maxOrder. */
export function harmonicGroups(lineRms: Lines, cycles: number, maxOrder: number): (number | null)[] {
  return orders(1, maxOrder, (h) => harmonicGroup(lineRms, cycles, h));
}

/** Y_sg,h of the orders 1..maxOrder. */
export function harmonicSubgroups(lineRms: Lines, cycles: number, maxOrder: number): (number | null)[] {
  return orders(1, maxOrder, (h) => harmonicSubgroup(lineRms, cycles, h));
}

/** Y_ig,h, h = 0..maxOrder. */
export function interharmonicGroups(lineRms: Lines, cycles: number, maxOrder: number): (number | null)[] {
  return orders(0, maxOrder, (h) => interharmonicGroup(lineRms, cycles, h));
}

/** Y_isg,h, h = 0..maxOrder. */
export function centredSubgroups(lineRms: Lines, cycles: number, maxOrder: number): (number | null)[] {
  return orders(0, maxOrder, (h) => centredSubgroup(lineRms, cycles, h));
}

function orders(first: number, last: number, value: (order: number) => number | null): (number | null)[] {
  return Array.from({ length: last - first + 1 }, (_, i) => value(first + i));
}

function sumOfSquares(lines: Lines, from: number, to: number): number | null {
  if (to >= lines.length) return null;
  let sum = 0;
  for (let k = from; k <= to; k++) sum += lines[k]! ** 2;
  return sum;
}

function root(value: number | null): number | null {
  return value === null ? null : Math.sqrt(value);
}
