import type { ReactNode } from 'react';
import type { Cell } from '../lib/delimited.js';

export interface TableColumn<Row> {
  key: string;
  header: ReactNode;
  /** Heading in files, with the unit of `value`: "rms (A)". */
  fileHeader: string;
  /** Numbers stand at the right, in mono. */
  align?: 'left' | 'right';
  /** Sorted, copied and downloaded; numbers in base units with all their digits. */
  value: (row: Row) => Cell;
  /** Shown; `value` when absent. */
  show?: (row: Row) => ReactNode;
  tone?: (row: Row) => 'over' | 'near' | 'within' | 'inkSoft' | undefined;
}

const collator = new Intl.Collator(undefined, { numeric: true, sensitivity: 'base' });

/** Order of two cells; what is absent stands last either way. */
export function compareCells(a: Cell, b: Cell, descending: boolean): number {
  if (a === null || b === null) return a === b ? 0 : a === null ? 1 : -1;
  const ascending =
    typeof a === 'number' && typeof b === 'number' ? a - b : collator.compare(String(a), String(b));
  return descending ? -ascending : ascending;
}

/** Heading and rows as cells, for files and the clipboard. */
export function tableRows<Row>(columns: readonly TableColumn<Row>[], rows: readonly Row[]): Cell[][] {
  return [
    columns.map((column) => column.fileHeader),
    ...rows.map((row) => columns.map((column) => column.value(row))),
  ];
}
