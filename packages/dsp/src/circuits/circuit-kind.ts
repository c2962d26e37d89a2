import { AnalysisInputError } from '../errors.js';
import type { TransferFunction } from '../transfer/transfer-function.js';
import type { ComponentUnit } from './parse-quantity.js';

/** One value that a kind of stage needs. */
export interface CircuitParameter {
  /** Key of the value, with its unit, such as `inductanceH`. */
  name: string;
  /** As in formulas, such as `L`. */
  symbol: string;
  /** Empty for a plain number. */
  unit: ComponentUnit | '';
  /** In plain words. */
  meaning: string;
  range: 'positive' | 'not-negative' | 'any';
  /** A value that may be left out; null: the element is then not there. */
  default?: number | null;
}

/** Values by the names of the parameters, in base units. */
export type CircuitValues = Readonly<Record<string, number | undefined>>;

/** A kind of stage that follows from values of components or from a standard form. */
export interface CircuitKind {
  parameters: readonly CircuitParameter[];
  /** What the output is over what input, in plain words. */
  meaning: string;
  transfer: (values: CheckedValues) => TransferFunction;
}

/** Checked values: `of` gives one that is there, `maybe` one that may be absent. */
export interface CheckedValues {
  of: (name: string) => number;
  maybe: (name: string) => number | undefined;
}

/** @throws AnalysisInputError that names the value and what it must be */
export function checkValues(
  { parameters }: CircuitKind,
  values: CircuitValues,
  where: string,
): CheckedValues {
  const unknown = Object.keys(values).find((key) => !parameters.some(({ name }) => name === key));
  if (unknown !== undefined) {
    throw new AnalysisInputError(
      `${where} has no value "${unknown}"; it takes ${parameters.map(({ name }) => name).join(', ')}.`,
      unknown,
    );
  }
  const checked = new Map<string, number | undefined>();
  for (const parameter of parameters) {
    const value = values[parameter.name] ?? parameter.default;
    if (value === undefined) {
      throw new AnalysisInputError(`${where} lacks ${parameter.name}: ${parameter.meaning}.`, parameter.name);
    }
    if (value !== null) checkRange(parameter, value, where);
    checked.set(parameter.name, value ?? undefined);
  }
  const maybe = (name: string) => checked.get(name);
  return {
    maybe,
    of: (name) => {
      const value = maybe(name);
      if (value === undefined) throw new AnalysisInputError(`${where} lacks ${name}.`);
      return value;
    },
  };
}

function checkRange({ name, unit, range }: CircuitParameter, value: number, where: string): void {
  const isRight =
    Number.isFinite(value) && (range === 'any' || (range === 'positive' ? value > 0 : value >= 0));
  if (isRight) return;
  const wanted = { positive: 'greater than 0', 'not-negative': '0 or more', any: 'a finite number' }[range];
  throw new AnalysisInputError(
    `${where}: ${name} is ${value}${unit === '' ? '' : ` ${unit}`}; it must be ${wanted}.`,
    name,
  );
}

type Extra = Pick<CircuitParameter, 'range' | 'default'>;

const positive = (extra: Partial<Extra>): Extra => ({ range: 'positive', ...extra });

/** Short forms for the tables of the kinds. */
export const parameter = {
  resistance: (
    name: string,
    symbol: string,
    meaning: string,
    extra: Partial<Extra> = {},
  ): CircuitParameter => ({
    ...{ name, symbol, unit: 'Ω', meaning },
    ...positive(extra),
  }),
  inductance: (
    name: string,
    symbol: string,
    meaning: string,
    extra: Partial<Extra> = {},
  ): CircuitParameter => ({
    ...{ name, symbol, unit: 'H', meaning },
    ...positive(extra),
  }),
  capacitance: (
    name: string,
    symbol: string,
    meaning: string,
    extra: Partial<Extra> = {},
  ): CircuitParameter => ({
    ...{ name, symbol, unit: 'F', meaning },
    ...positive(extra),
  }),
  frequency: (name: string, symbol: string, meaning: string): CircuitParameter => ({
    ...{ name, symbol, unit: 'Hz', meaning, range: 'positive' },
  }),
  time: (name: string, symbol: string, meaning: string, extra: Partial<Extra> = {}): CircuitParameter => ({
    ...{ name, symbol, unit: 's', meaning },
    ...positive(extra),
  }),
  plain: (name: string, symbol: string, meaning: string, extra: Partial<Extra> = {}): CircuitParameter => ({
    ...{ name, symbol, unit: '', meaning },
    ...positive(extra),
  }),
  of: (
    name: string,
    symbol: string,
    unit: ComponentUnit,
    meaning: string,
    extra: Partial<Extra> = {},
  ): CircuitParameter => ({ ...{ name, symbol, unit, meaning }, ...positive(extra) }),
};

/** An element that may be missing. */
export const ABSENT = { default: null } as const;
/** A value that may be 0 and is 0 when not given. */
export const NONE = { range: 'not-negative', default: 0 } as const;
/** A gain that may be left out and is then 1. */
export const UNITY = { range: 'any', default: 1 } as const;
