import type { LimitEntry, ParameterName } from '@overtally/contracts';

type Reading = Pick<LimitEntry, 'basis' | 'unit' | 'referenceParameter'>;

const references: Readonly<Record<string, ParameterName>> = {
  il: 'ilA',
  ila: 'ilA',
  iref: 'irefA',
  irefa: 'irefA',
  un: 'nominalV',
  nominal: 'nominalV',
  nominalv: 'nominalV',
};
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
  const referenceParameter = references[of];
  return referenceParameter ? { basis: 'percent-of-reference', referenceParameter } : null;
}
