import type { LimitEntry, LimitSet, ParameterName } from '@overtally/contracts';
import { parameterNames } from '../limit-for-order.js';

type Reading = Pick<LimitEntry, 'basis' | 'unit' | 'referenceParameter'>;

/** Symbols of parameters, the usual one of each first. */
const symbols: readonly (readonly [symbol: string, parameter: ParameterName])[] = [
  ['IL', 'ilA'],
  ['Iref', 'irefA'],
  ['Un', 'nominalV'],
  ['nominal', 'nominalV'],
  ['lambda', 'powerFactor'],
];

/** The parameter of a symbol such as `IL` or `lambda`, or of its own name; undefined when it is none. */
export function parameterOf(text: string): ParameterName | undefined {
  const name = text.trim().toLowerCase();
  const [, ofSymbol] = symbols.find(([symbol]) => symbol.toLowerCase() === name) ?? [];
  return ofSymbol ?? parameterNames.find((parameter) => parameter.toLowerCase() === name);
}

/** The usual symbol of a parameter, its name where it has none. */
export const symbolOf = (parameter: ParameterName): string =>
  symbols.find(([, of]) => of === parameter)?.[0] ?? parameter;
const fundamentals = ['', 'i1', 'u1', 'v1', 'h1', 'f', 'fundamental', 'of fundamental', 'of the fundamental'];
const absolute = /^[pnuµμmkMG]?(?:A|V|W|Pa)$|^m\/s²?$|^m\/s\^?2$/;

/**
 * What a limit refers to, from the cell of its unit: an amount such as `A` or `mV`; `%` of the fundamental;
 * `% IL`, `% Iref`, `% Un` of a parameter; `mA/W`. Null when it is none of them; empty means as the set says.
 */
export function readUnitCell(cell: string): Reading | null {
  const text = cell.trim();
  if (text === '') return {};
  if (/^mA\/W$/i.test(text)) return { basis: 'milliampere-per-watt' };
  if (absolute.test(text)) return { basis: 'absolute', unit: text };
  const percent = /^(?:%|percent)\s*(?:of\s+)?(.*)$/i.exec(text);
  if (percent === null) return null;
  const of = (percent[1] ?? '').trim().toLowerCase();
  if (fundamentals.includes(of)) return { basis: 'percent-of-fundamental' };
  const referenceParameter = parameterOf(of);
  return referenceParameter ? { basis: 'percent-of-reference', referenceParameter } : null;
}

/** The cell that `readUnitCell` reads back; empty for a unit that it does not know. */
export function unitCell({
  basis,
  unit,
  referenceParameter,
}: Pick<LimitSet, 'basis' | 'unit' | 'referenceParameter'>): string {
  switch (basis) {
    case 'absolute':
      return absolute.test(unit) ? unit : '';
    case 'percent-of-fundamental':
      return '%';
    case 'milliampere-per-watt':
      return 'mA/W';
    case 'percent-of-reference':
      return referenceParameter === null ? '%' : `% ${symbolOf(referenceParameter)}`;
  }
}
