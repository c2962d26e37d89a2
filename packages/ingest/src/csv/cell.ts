import type { DecimalMark } from '../types.js';
import { parseStamp } from './time-stamp.js';

/** What a cell holds. `grouped`: a number with thousands separators; `other-mark`: one with the other decimal mark. */
export type CellKind = 'number' | 'blank' | 'missing' | 'grouped' | 'other-mark' | 'stamp' | 'date' | 'word';

const POINT_NUMBER = /^[+-]?(\d+\.?\d*|\.\d+)([eEdD][+-]?\d+)?$/;
const COMMA_NUMBER = /^[+-]?(\d+|\d*,\d+)([eEdD][+-]?\d+)?$/;
const POINT_GROUPED = /^[+-]?\d{1,3}([,'’ \u00a0\u202f]\d{3})+(\.\d*)?$/;
const COMMA_GROUPED = /^[+-]?\d{1,3}([.'’ \u00a0\u202f]\d{3})+(,\d*)?$/;
const DATE = /^\d{1,4}([-/.])\d{1,2}\1\d{1,4}$/;
const MISSING =
  /^(n\/?a|#n\/a|#?nan|nan\(.*\)|[+-]?inf(inity)?|null|none|nil|-+|\?+|\*+|[+-]?\d\.#\w+|#\w+[!?]?)$/i;

/** Cell text without surrounding blanks and quotes. */
export function bareCell(text: string): string {
  const trimmed = text.trim();
  return trimmed.length >= 2 && trimmed.startsWith('"') && trimmed.endsWith('"')
    ? trimmed.slice(1, -1).replaceAll('""', '"').trim()
    : trimmed;
}

/** Kind of a bare cell under a decimal mark. */
export function cellKind(cell: string, decimal: DecimalMark): CellKind {
  if (cell === '') return 'blank';
  const point = decimal === '.';
  if ((point ? POINT_NUMBER : COMMA_NUMBER).test(cell)) return 'number';
  if ((point ? POINT_GROUPED : COMMA_GROUPED).test(cell)) return 'grouped';
  if ((point ? COMMA_NUMBER : POINT_NUMBER).test(cell)) return 'other-mark';
  if ((point ? COMMA_GROUPED : POINT_GROUPED).test(cell)) return 'other-mark';
  if (MISSING.test(cell)) return 'missing';
  if (DATE.test(cell)) return 'date';
  return parseStamp(cell) === null ? 'word' : 'stamp';
}

/** Value of a bare cell of kind `number`. */
export function cellNumber(cell: string, decimal: DecimalMark): number {
  const text = decimal === ',' ? cell.replace(',', '.') : cell;
  return Number(text.replace(/d/i, 'e'));
}
