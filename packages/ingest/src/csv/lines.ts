import Papa from 'papaparse';
import type { Delimiter } from '../types.js';
import { bareCell } from './cell.js';

/** Lines of a text, ended by LF, CRLF or CR. The last one may be unfinished. */
export function splitLines(text: string): string[] {
  return text.split(/\r\n|\n|\r/);
}

/** Cells of one line without their quotes and blanks; runs of blanks count as one delimiter when it is the blank. */
export function splitCells(line: string, delimiter: Delimiter): string[] {
  const text = delimiter === ' ' ? line.trim().replace(/[\t ]+/g, ' ') : line;
  if (!text.includes('"')) return text.split(delimiter).map((cell) => cell.trim());
  // A quote counts only directly after the delimiter, so blanks before it go.
  const tidy = delimiter === ' ' ? text : text.replace(/(^|[,;|\t]) +"/g, '$1"');
  const cells = Papa.parse<string[]>(tidy, { delimiter, newline: '\n' }).data[0] ?? [];
  return cells.map(bareCell);
}
