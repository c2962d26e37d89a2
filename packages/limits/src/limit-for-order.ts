import type { LimitEntry, LimitSet, ParameterName, VerdictParameters } from '@overtally/contracts';
import { resolveLimits } from './resolve.js';
import { unitRatio } from './units.js';

export interface LimitContext {
  /** rms of order 1 in the channel's unit; null when none was found. */
  fundamentalRms: number | null;
  parameters: VerdictParameters;
  /** Unit of the channel; the unit that the set itself leads to when absent. */
  unit?: string;
}

const parameterUnits: Readonly<Record<ParameterName, string>> = {
  powerW: 'W',
  powerFactor: '',
  iscOverIl: '',
  ilA: 'A',
  rsce: '',
  irefA: 'A',
  nominalV: 'V',
};

export const parameterNames = Object.keys(parameterUnits) as ParameterName[];

/** Unit that a limit of the set has once it is an amount: that of the set, of its reference, or A. */
export function limitUnit(set: LimitSet): string | null {
  if (set.basis === 'absolute') return set.unit;
  if (set.basis === 'milliampere-per-watt') return 'A';
  if (set.basis === 'percent-of-reference' && set.referenceParameter)
    return parameterUnits[set.referenceParameter];
  return null;
}

/**
 * What 100 % (or 1 mA/W, or 1 unit) of the set's limits amounts to in the channel's unit; null when the
 * fundamental or a parameter that it needs is missing, or when the units do not measure the same thing.
 */
export function limitScale(set: LimitSet, context: LimitContext): number | null {
  if (set.basis === 'percent-of-fundamental') {
    return context.fundamentalRms === null ? null : context.fundamentalRms / 100;
  }
  const unit = limitUnit(set);
  const ratio = unit === null ? null : unitRatio(unit, context.unit ?? unit);
  if (ratio === null) return null;
  if (set.basis === 'absolute') return ratio;
  if (set.basis === 'milliampere-per-watt') {
    return context.parameters.powerW === undefined ? null : (context.parameters.powerW / 1000) * ratio;
  }
  const reference = set.referenceParameter === null ? undefined : context.parameters[set.referenceParameter];
  return reference === undefined ? null : (reference / 100) * ratio;
}

/** The set as one of its entries reads it: an entry may be in a unit or of a basis of its own. */
export const readBy = <Set extends Pick<LimitSet, 'basis' | 'unit' | 'referenceParameter'>>(
  set: Set,
  entry: LimitEntry,
): Set => ({
  ...set,
  basis: entry.basis ?? set.basis,
  unit: entry.unit ?? set.unit,
  referenceParameter: entry.referenceParameter ?? set.referenceParameter,
});

/**
 * Limit of one entry as an rms value in the channel's unit.
 *
 * Percentages are taken of the fundamental or of the reference parameter; mA/W limits are multiplied by
 * `powerW` and held to the entry's cap (IEC 61000-3-2, Table 3); an entry may be multiplied by a parameter, as
 * 30 times the power factor (Table 2 of edition 4). Null when something it needs is missing.
 */
export function amountOf(entry: LimitEntry, set: LimitSet, context: LimitContext): number | null {
  const scale = limitScale(readBy(set, entry), context);
  const factor = entry.timesParameter === undefined ? 1 : context.parameters[entry.timesParameter];
  if (scale === null || factor === undefined) return null;
  const limit = entry.limit * factor * scale;
  if (entry.capA === undefined) return limit;
  const cap = entry.capA * (unitRatio('A', context.unit ?? 'A') ?? 1);
  return Math.min(limit, cap);
}

/**
 * Limit of one order as an rms value in the channel's unit, from the limits that hold for the parameters (the
 * first of alternatives). Null when the set does not limit the order or something it needs is missing.
 */
export function limitForOrder(set: LimitSet, order: number, context: LimitContext): number | null {
  const held = resolveLimits(set, context.parameters).limits?.[0]?.set;
  const entry = held?.orders.find((candidate) => candidate.order === order);
  return held && entry ? amountOf(entry, held, context) : null;
}
