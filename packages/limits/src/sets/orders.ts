import type { LimitEntry } from '@overtally/contracts';

/** Orders from `first` up to `last` in steps. */
export const ordersBetween = (first: number, last: number, step: number): number[] =>
  Array.from({ length: Math.max(0, Math.floor((last - first) / step) + 1) }, (_, i) => first + i * step);

/** Entries of a table that gives one value per order. */
export const listed = (values: Readonly<Record<number, number>>): LimitEntry[] =>
  Object.entries(values).map(([order, limit]) => ({ order: Number(order), limit }));

/** Entries of a range that a table gives by a formula, which is kept for display. */
export const byFormula = (
  orders: readonly number[],
  formula: string,
  limit: (order: number) => number,
): LimitEntry[] => orders.map((order) => ({ order, limit: limit(order), formula }));

/** Entries in rising order. */
export const sorted = (...parts: readonly LimitEntry[][]): LimitEntry[] =>
  parts.flat().sort((one, other) => one.order - other.order);
