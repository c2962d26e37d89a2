import type {
  LimitEntry,
  LimitRow,
  LimitSet,
  ParameterName,
  TotalLimit,
  VerdictParameters,
  WaveformCondition,
} from '@overtally/contracts';
import { brokenCondition, isWithin } from './ranges.js';

/** A set with the limits that hold for given parameters: `orders` and `totals` are those to be compared with. */
export interface ResolvedLimits {
  set: LimitSet;
  /** The row the limits come from, in words; null for a set without rows. */
  label: string | null;
  waveform: WaveformCondition | null;
}

/** Why a set gives no limits for these parameters. */
export interface LimitGap {
  result: 'not-applicable' | 'not-decidable';
  reason: string;
}

export type Resolution = { limits: ResolvedLimits[]; gap: null } | { limits: null; gap: LimitGap };

const gap = (result: LimitGap['result'], reason: string): Resolution => ({
  limits: null,
  gap: { result, reason },
});

const ofBasis = (basis: LimitRow['basis']): ParameterName | undefined =>
  basis === 'milliampere-per-watt' ? 'powerW' : undefined;

/** Parameters that a verdict by this set cannot do without, in the order they are asked. */
export function neededParameters(set: Omit<LimitSet, 'id' | 'projectId'>): ParameterName[] {
  const rows: Pick<LimitRow, 'basis' | 'selector' | 'orders' | 'totals'>[] = [set, ...(set.rows ?? [])];
  const named = rows.flatMap(({ basis, selector, orders, totals }) => [
    ofBasis(basis),
    selector?.parameter,
    ...orders.flatMap((entry) => [entry.timesParameter, entry.referenceParameter, ofBasis(entry.basis)]),
    ...totals.flatMap((total) => [total.name === 'TDD' ? ('ilA' as const) : undefined, ofBasis(total.basis)]),
  ]);
  const all = [...set.parameters, set.referenceParameter, ...named];
  return [...new Set(all.filter((name) => name !== undefined && name !== null))];
}

/** Parameters that decide whether the set applies and may be left out: they are checked when given. */
export function optionalParameters(set: LimitSet): ParameterName[] {
  const needed = neededParameters(set);
  const checked = (set.applicability ?? []).map(({ parameter }) => parameter);
  return [...new Set(checked)].filter((name) => !needed.includes(name));
}

/** The set with the limits of one row in place of its own. */
function withRow(set: LimitSet, row: LimitRow): ResolvedLimits {
  const { rows, rowChoice, ...rest } = set;
  return {
    set: {
      ...rest,
      basis: row.basis ?? set.basis,
      unit: row.unit ?? set.unit,
      orders: row.orders,
      totals: row.totals,
    },
    label: row.label,
    waveform: row.waveform ?? null,
  };
}

const between = (low: number, high: number, share: number): number => low + share * (high - low);

/** Row between two others; an order or total that only one of them limits is left out. */
function interpolated(low: LimitRow, high: LimitRow, share: number, label: string): LimitRow {
  const orders = low.orders.flatMap((entry): LimitEntry[] => {
    const other = high.orders.find(({ order }) => order === entry.order);
    return other ? [{ ...entry, limit: between(entry.limit, other.limit, share) }] : [];
  });
  const totals = low.totals.flatMap((total): TotalLimit[] => {
    const other = high.totals.find(({ name }) => name === total.name);
    return other ? [{ ...total, limit: between(total.limit, other.limit, share) }] : [];
  });
  return { ...low, label, orders, totals };
}

/** Linear interpolation between rows that begin at `from`; above the last one that one holds. */
function interpolate(set: LimitSet, rows: readonly LimitRow[], value: number): ResolvedLimits | null {
  const starts = rows
    .map((row) => ({ row, from: row.selector?.from ?? -Infinity }))
    .sort((one, other) => one.from - other.from);
  const next = starts.findIndex(({ from }) => from > value);
  const low = next === -1 ? starts.at(-1) : starts[next - 1];
  if (low === undefined) return null;
  const high = starts[next];
  if (high === undefined || low.from === value) return withRow(set, low.row);
  const share = (value - low.from) / (high.from - low.from);
  const label = `${value} by linear interpolation between ${low.row.label} and ${high.row.label}`;
  return withRow(set, interpolated(low.row, high.row, share, label));
}

function chooseRow(set: LimitSet, rows: readonly LimitRow[], parameters: VerdictParameters): Resolution {
  if (set.rowChoice === 'alternative') return { limits: rows.map((row) => withRow(set, row)), gap: null };
  const parameter = rows.find(({ selector }) => selector)?.selector?.parameter;
  const value = parameter === undefined ? undefined : parameters[parameter];
  if (parameter === undefined || value === undefined) {
    return gap('not-decidable', `The set needs ${parameter ?? 'a parameter to choose its row'}`);
  }
  const chosen =
    set.rowChoice === 'interpolate'
      ? interpolate(set, rows, value)
      : rows
          .filter(({ selector }) => selector && isWithin(selector, value))
          .map((row) => withRow(set, row))[0];
  return chosen
    ? { limits: [chosen], gap: null }
    : gap('not-applicable', `The set has no limits for ${parameter} = ${value}`);
}

/**
 * The limits of a set for given parameters.
 *
 * A set without rows gives its own limits. Of rows chosen by a parameter it gives the one whose range holds the
 * value, or the linear interpolation between two (IEC 61000-3-12 allows it for successive Rsce); alternatives are
 * all given, and one met is enough. A gap says why there are none: a condition of use is broken
 * (`not-applicable`) or a parameter that limits depend on is missing (`not-decidable`).
 */
export function resolveLimits(set: LimitSet, parameters: VerdictParameters): Resolution {
  const broken = brokenCondition(set, parameters);
  if (broken !== null) return gap('not-applicable', broken.otherwise);
  const missing = neededParameters(set).filter((name) => parameters[name] === undefined);
  if (missing.length > 0) return gap('not-decidable', `The set needs ${missing.join(', ')}`);
  if (set.rows === undefined || set.rows.length === 0) {
    return { limits: [{ set, label: null, waveform: null }], gap: null };
  }
  return chooseRow(set, set.rows, parameters);
}

/** Every row of a set as limits of its own, to list them; empty for a set without rows. */
export const limitRows = (set: LimitSet): ResolvedLimits[] =>
  (set.rows ?? []).map((row) => withRow(set, row));

/**
 * The set with the limits to draw or list for given parameters: those that hold, the first of alternatives. Where
 * none hold, those of the set itself, and of the first row of a set with rows.
 */
export function shownLimits(set: LimitSet, parameters: VerdictParameters = {}): LimitSet {
  const resolution = resolveLimits(set, parameters);
  const held = resolution.limits?.[0]?.set;
  if (held) return held;
  const [first] = set.rows ?? [];
  return first ? withRow(set, first).set : set;
}
