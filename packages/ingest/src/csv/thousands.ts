import { refuse } from '../refusal.js';
import type { ImportOptions } from '../types.js';
import type { Dialect } from './dialect.js';

const GROUPED = /^[+-]?[1-9]\d{0,2}(,\d{3})+$/;
const SMALL = /^[+-]?\d{1,3}$/;

/**
 * Looks at decimal commas that may be thousands marks: nothing but groups of three digits behind them, in every cell.
 * Beside numbers below a thousand without a comma they are thousands for sure, which is refused; alone they are read as
 * decimals, as instruments with a fixed count of decimals write them, and doubted.
 * @returns the doubt in words, null where there is none
 */
export function doubtDecimalCommas(
  lines: string[][],
  dialect: Dialect,
  options: ImportOptions,
): string | null {
  if (dialect.decimal !== ',' || options.decimal !== undefined) return null;
  const body = lines.slice(dialect.bodyLine);
  const withComma = body.flat().filter((cell) => /\d,\d/.test(cell));
  if (withComma.length === 0 || !withComma.every((cell) => GROUPED.test(cell))) return null;
  for (let column = 0; column < dialect.columnCount; column += 1) {
    const row = body.findIndex((cells) => GROUPED.test(cells[column] ?? ''));
    if (row < 0 || !body.some((cells) => SMALL.test(cells[column] ?? ''))) continue;
    const line = dialect.bodyLine + row + 1;
    refuse(
      'thousands-separator',
      `Line ${line}, column ${column + 1}: "${body[row]?.[column]}" seems to hold a thousands separator, which cannot be told from a decimal mark with certainty.`,
      'Export the numbers without thousands separators, or state the decimal mark.',
      { line, column: column + 1 },
    );
  }
  return `Every comma stands before three digits, as in "${withComma[0]}"; it was taken as the decimal mark, not for thousands.`;
}
