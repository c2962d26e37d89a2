import type { LayoutColumn, Quantity } from './types.js';
import { unitMeaning } from './units.js';

const NAMED: [RegExp, Quantity][] = [
  [/^(volt|spannung|tension)/i, 'voltage'],
  [/^(current|strom|courant|amp(s|ere|erage)?\b)/i, 'current'],
  [/^(power|leistung|puissance)/i, 'power'],
  [/^(sound.?pressure|schalldruck|microphone|mic\b)/i, 'sound_pressure'],
  [/^(acc(el|eleration)?([^a-z]|$)|beschleunigung)/i, 'acceleration'],
  [/^(codes?|counts?|adc|raw)(?![a-z])/i, 'dimensionless'],
  [/^(velocity|vibration.?velocity|schwinggeschwindigkeit)/i, 'velocity'],
  [/^[uv](l?\d{1,2}|[abcn]|ab|bc|ca|an|bn|cn|rms)?(?![a-z\d])/i, 'voltage'],
  [/^i(l?\d{1,2}|[abcn]|rms)?(?![a-z\d])/i, 'current'],
];

/** Quantity that a channel name suggests (u, v: voltage; i: current; or the word), null when it suggests none. */
export function quantityFromName(name: string): Quantity | null {
  return NAMED.find(([pattern]) => pattern.test(name.trim()))?.[1] ?? null;
}

interface NamedUnit {
  name: string;
  unit: string;
}

function splitUnit(cell: string, siblings: string[]): NamedUnit {
  const bracketed = /^(.*?)\s*[[({]\s*([^\])}]*?)\s*[\])}]\s*$/.exec(cell);
  if (bracketed !== null && (bracketed[1] !== '' || unitMeaning(bracketed[2] ?? '') !== null)) {
    return { name: bracketed[1] ?? '', unit: bracketed[2] ?? '' };
  }
  const separated = /^(.+?)\s*[,/]\s*([^,]+)$/.exec(cell);
  if (separated !== null && unitMeaning(separated[2] ?? '') !== null) {
    return { name: separated[1] ?? '', unit: separated[2] ?? '' };
  }
  return splitSuffix(cell, siblings) ?? { name: cell, unit: '' };
}

/** `u_V` is a voltage in volts; but `u_A` beside `u_B` is phase A, and so is `phase_A`. */
function splitSuffix(cell: string, siblings: string[]): NamedUnit | null {
  const match = /^(.+)_(m_s2|[^_\s]+)$/.exec(cell);
  if (match === null) return null;
  const [, name = '', unit = ''] = match;
  const meaning = unitMeaning(unit);
  if (meaning === null || /^\d/.test(unit)) return null;
  const suggested = quantityFromName(name);
  if (suggested !== null && meaning.quantity !== suggested) return null;
  const isPhase = siblings.includes(`${name}_B`) || /^(phase|line|ch|channel)$/i.test(name);
  return unit === 'A' && isPhase ? null : { name, unit };
}

/**
 * Names, units and quantities of the columns from their header cells and, where there is one, the units row.
 * Names are made unique; a blank cell becomes `column N`, counting from 1.
 */
export function describeColumns(header: string[], units: string[] | null, count: number): LayoutColumn[] {
  const seen = new Set<string>();
  return Array.from({ length: count }, (_, index) => {
    const cell = (header[index] ?? '').trim();
    const fromRow = (units?.[index] ?? '').trim().replace(/^[[({]\s*(.*?)\s*[\])}]$/, '$1');
    const split = fromRow === '' ? splitUnit(cell, header) : { name: cell, unit: fromRow };
    let name = split.name === '' ? `column ${index + 1}` : split.name;
    if (seen.has(name)) name = seen.has(cell) || cell === '' ? `${name} (${index + 1})` : cell;
    seen.add(name);
    const quantity = unitMeaning(split.unit)?.quantity ?? quantityFromName(name) ?? 'other';
    return { index, name, unit: split.unit, quantity };
  });
}
