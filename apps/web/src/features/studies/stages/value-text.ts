import { AnalysisInputError, parseQuantity, type CircuitParameter } from '@overtally/dsp';
import { formatSi } from '../../../lib/format.js';
import { numberOf, numberText } from '../../../lib/number-text.js';

/** A value as it is written in a field: 4.7 mH, 0.7. */
export const valueText = (value: number, unit: string): string =>
  unit === '' || unit === '%' ? numberText(value, 6) : formatSi(value, unit, { digits: 6, trim: true });

export type ReadValue = { value: number | undefined; problem: null } | { value: null; problem: string };

/** A value of a parameter as it was typed; an empty text leaves an optional one out. */
export function readValue(text: string, parameter: CircuitParameter): ReadValue {
  const { unit, range, default: fallback, meaning } = parameter;
  const refuse = (problem: string): ReadValue => ({ value: null, problem });
  if (text.trim() === '') {
    return fallback === undefined ? refuse(`Needed: ${meaning}.`) : { value: undefined, problem: null };
  }
  let value: number;
  if (unit === '') {
    value = numberOf(text) ?? Number.NaN;
    if (!Number.isFinite(value)) return refuse(`“${text}” is no number; write it like 0.7.`);
  } else {
    try {
      value = parseQuantity(text, unit);
    } catch (error) {
      if (error instanceof AnalysisInputError) return refuse(error.message);
      throw error;
    }
  }
  if (range === 'positive' && !(value > 0)) return refuse('Must be greater than 0.');
  if (range === 'not-negative' && !(value >= 0)) return refuse('Must be 0 or more.');
  return { value, problem: null };
}

/** Numbers in a row, as of a polynomial: “1e-6 0.002 1”. */
export function readNumbers(text: string): { values: number[] } | { problem: string } {
  const cells = text.split(/[\s;]+|,\s+/).filter((cell) => cell !== '');
  if (cells.length === 0) return { problem: 'Give at least one number.' };
  const values = cells.map((cell) => numberOf(cell) ?? Number.NaN);
  const wrong = values.findIndex((value) => !Number.isFinite(value));
  return wrong < 0 ? { values } : { problem: `“${cells[wrong]}” is no number; part them by spaces.` };
}

export const numbersText = (values: readonly number[]): string =>
  values.map((value) => numberText(value, 12)).join(' ');

/** Places in the s plane, one a line: “-200”, “-50 + j 314”; a pair may be written once with ±. */
export function readRoots(text: string): { roots: { re: number; im: number }[] } | { problem: string } {
  const roots: { re: number; im: number }[] = [];
  for (const [index, line] of text.split(/\r?\n|;/).entries()) {
    const plain = line.replaceAll(/\s+/g, '').replaceAll('\u2212', '-').replace('i', 'j');
    if (plain === '') continue;
    const match = /^([+-]?[\d.]+(?:e[+-]?\d+)?)?(?:(±|\+-|[+-])?j([\d.]+(?:e[+-]?\d+)?))?$/i.exec(plain);
    const re = match?.[1] === undefined ? 0 : Number(match[1]);
    const im = match?.[3] === undefined ? 0 : Number(match[3]);
    if (!match || !Number.isFinite(re) || !Number.isFinite(im))
      return { problem: `Line ${index + 1}: “${line.trim()}” is not read; write -200 or -50 ± j 314.` };
    const sign = match[2];
    if (sign === '±' || sign === '+-') roots.push({ re, im }, { re, im: -im });
    else roots.push({ re, im: sign === '-' ? -im : im });
  }
  return { roots };
}

export function rootsText(roots: readonly { re: number; im: number }[]): string {
  return roots
    .map(({ re, im }) =>
      im === 0
        ? numberText(re, 12)
        : `${numberText(re, 12)} ${im < 0 ? '-' : '+'} j ${numberText(Math.abs(im), 12)}`,
    )
    .join('\n');
}
