import { AnalysisInputError } from '../errors.js';

/** Units of components that the parser knows, with the words and signs they are written by. */
export type ComponentUnit = 'Ω' | 'H' | 'F' | 'Hz' | 's' | 'V' | 'A' | 'VA' | 'var' | 'W' | '%';

const UNIT_SPELLINGS: Record<ComponentUnit, readonly string[]> = {
  // U+2126 OHM SIGN beside the Greek letter.
  Ω: ['Ω', '\u2126', 'ohms', 'ohm', 'Ohms', 'Ohm', 'OHM'],
  H: ['H'],
  F: ['F'],
  Hz: ['Hz'],
  s: ['s'],
  V: ['V'],
  A: ['A'],
  VA: ['VA'],
  var: ['var', 'VAr', 'VAR'],
  W: ['W'],
  '%': ['%'],
};

/** SI prefixes (SI Brochure, 9th edition, table 7) that occur with components; K is common for kilo in front of Ω. */
const PREFIXES: Record<string, number> = {
  ...{ f: -15, p: -12, n: -9, u: -6, µ: -6, μ: -6, m: -3 },
  ...{ k: 3, K: 3, M: 6, G: 9, T: 12 },
};

/** Letters that stand for the decimal mark by IEC 60062:2016, 4.2 and 4.3: resistance and capacitance alone. */
const CODE_LETTERS: Partial<Record<ComponentUnit, Record<string, number>>> = {
  Ω: { L: -3, R: 0, K: 3, k: 3, M: 6, G: 9, T: 12 },
  F: { p: -12, n: -9, µ: -6, μ: -6, u: -6, m: -3, F: 0 },
};

const NUMBER = /^[+-]?(?:\d+(?:[.,]\d*)?|[.,]\d+)(?:[eE][+-]?\d+)?/;

/**
 * The value of a component as people write it, in the base unit: `4.7 mH`, `4,7mH`, `100n`, `1e-6 F`, `0.5 Ω`; for resistance
 * and capacitance also the code of IEC 60062 with a letter in place of the decimal mark (`2k2`, `4R7`, `R47`, `4n7`). Letters
 * of prefixes count as written: m is milli, M is mega. A comma is a decimal mark; one that could also separate thousands is
 * refused. A value without prefix and unit is in the base unit.
 *
 * @param unit what is expected; a text that names another unit is refused
 * @throws AnalysisInputError that names the place in the text and the cure
 */
export function parseQuantity(text: string, unit: ComponentUnit): number {
  // No-break and thin spaces come along when values are copied from documents; a minus sign may be typographic.
  const written = text
    .replace(/[\u00a0\u2009\u202f]/g, ' ')
    .replace(/\u2212/g, '-')
    .trim();
  if (written === '') throw new AnalysisInputError(`The value is empty; write it like ${example(unit)}.`);
  const coded = byLetterCode(written, unit);
  if (coded !== null) return coded;
  const number = NUMBER.exec(written)?.[0];
  if (number === undefined) {
    throw new AnalysisInputError(`"${text}" does not begin with a number; write it like ${example(unit)}.`);
  }
  // Whether 4,700 is 4.7 or 4700 depends on the country.
  if (/^[+-]?[1-9]\d{0,2},\d{3}$/.test(number)) {
    throw new AnalysisInputError(
      `"${number}" in "${text}" can be read in two ways; write ${number.replace(',', '')} or ${number.replace(',', '.')}.`,
    );
  }
  const rest = written.slice(number.length);
  const exponent = exponentOf(rest.trim(), unit);
  if (exponent === null) throw new AnalysisInputError(whatIsWrong(text, number, rest, unit));
  return scaled(number.replace(',', '.'), exponent);
}

/** The power of ten that prefix and unit stand for; null where they cannot be read. */
function exponentOf(suffix: string, unit: ComponentUnit): number | null {
  const spelling = UNIT_SPELLINGS[unit].find((word) => suffix.endsWith(word));
  // A bare prefix, as in 100n, goes before a unit of one letter that looks alike: none of the units here is a prefix.
  const prefix = spelling === undefined ? suffix : suffix.slice(0, suffix.length - spelling.length).trim();
  if (prefix === '') return 0;
  return unit === '%' ? null : (PREFIXES[prefix] ?? null);
}

function byLetterCode(written: string, unit: ComponentUnit): number | null {
  const letters = CODE_LETTERS[unit];
  if (letters === undefined) return null;
  const match = /^(\d*)(\D)(\d+)\s*(.*)$/u.exec(written);
  if (!match) return null;
  const [, whole, letter, fraction, after] = match as unknown as [string, string, string, string, string];
  const exponent = letters[letter];
  if (exponent === undefined || (after !== '' && !UNIT_SPELLINGS[unit].includes(after))) return null;
  return scaled(`${whole || '0'}.${fraction}`, exponent);
}

/** Decimal digits and power of ten read as one number, so that 4.7 with milli is the double next to 0.0047. */
function scaled(digits: string, exponent: number): number {
  const [mantissa, own = '0'] = digits.toLowerCase().split('e') as [string, string?];
  return Number(`${mantissa}e${Number(own) + exponent}`);
}

function whatIsWrong(text: string, number: string, rest: string, unit: ComponentUnit): string {
  const place = `at character ${text.indexOf(number) + number.length + 1 + (rest.length - rest.trimStart().length)}`;
  const suffix = rest.trim();
  const other = (Object.keys(UNIT_SPELLINGS) as ComponentUnit[]).find(
    (candidate) => candidate !== unit && exponentOf(suffix, candidate) !== null,
  );
  if (/^[.,]?\d/.test(suffix) || /^[.,]/.test(suffix)) {
    return `"${text}" goes on with "${suffix}" ${place}: leave out separators of thousands and write one decimal mark, like ${example(unit)}.`;
  }
  if (/^[a-zA-Zµμ]\d/u.test(suffix)) {
    return `"${text}" has a letter for the decimal mark ${place}, which IEC 60062 knows for resistance and capacitance only; write it like ${example(unit)}.`;
  }
  if (other !== undefined) {
    return `"${text}" names the unit ${other} ${place}, but ${unit} is expected; write it like ${example(unit)}.`;
  }
  return `"${suffix}" in "${text}" ${place} is no prefix with the unit ${unit}; prefixes are f p n u µ m k M G T, as in ${example(unit)}.`;
}

function example(unit: ComponentUnit): string {
  const examples: Record<ComponentUnit, string> = {
    ...{
      Ω: '2.2 kΩ or 2k2',
      H: '4.7 mH',
      F: '100 nF or 100n',
      Hz: '2.5 kHz',
      s: '20 ms',
      V: '400 V',
      A: '16 A',
    },
    ...{ VA: '630 kVA', var: '50 kvar', W: '2 kW', '%': '4 %' },
  };
  return examples[unit];
}
