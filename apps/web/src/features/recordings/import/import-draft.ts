import type { ImportOptions, ImportPreview } from '@overtally/contracts';
import { numberOf, numberText } from '../../../lib/number-text.js';
import {
  channelOf,
  columnFaults,
  columnOf,
  untouchedColumn,
  type ColumnDraft,
  type ColumnFaults,
} from './column-draft.js';

/** The import form as it is filled in; empty text means "as detected". */
export interface ImportDraft {
  sampleRateHz: string;
  delimiter: string;
  decimal: string;
  headerRows: string;
  /** Empty: detected; `none`: there is none; else the key of the column. */
  timeColumn: string;
  timeUnit: string;
  missingValues: string;
  unevenTime: string;
  /** Columns that were touched, by their key. */
  columns: Readonly<Record<string, ColumnDraft>>;
  /** True when the columns that are read were listed: any other one is left out. */
  listed: boolean;
}

type Column = ImportPreview['columns'][number];

/** Key of a column that options name by its index from 0 or by its name. */
export const columnKey = (column: number | string): string =>
  typeof column === 'number' ? `#${column}` : `=${column.trim().toLowerCase()}`;

const text = (value: number | undefined) => (value === undefined ? '' : numberText(value, 15));

/** The form filled with the options a file was read with before. */
export function draftOf(options: ImportOptions): ImportDraft {
  const { timeColumn } = options;
  return {
    sampleRateHz: text(options.sampleRateHz),
    delimiter: options.delimiter ?? '',
    decimal: options.decimal ?? '',
    headerRows: text(options.headerRows),
    timeColumn: timeColumn === null ? 'none' : timeColumn === undefined ? '' : columnKey(timeColumn),
    timeUnit: options.timeUnit ?? '',
    missingValues: options.missingValues ?? '',
    unevenTime: options.unevenTime ?? '',
    columns: Object.fromEntries(
      (options.channels ?? []).map((channel) => [columnKey(channel.column), columnOf(channel)]),
    ),
    listed: options.channels !== undefined,
  };
}

export interface ImportFaults {
  sampleRateHz?: string;
  headerRows?: string;
  /** By key of the column; only columns with a fault. */
  columns: Readonly<Record<string, ColumnFaults>>;
}

/** Faults of the form by field, in words. */
export function faultsOf(draft: ImportDraft): ImportFaults {
  const rate = numberOf(draft.sampleRateHz);
  const rows = numberOf(draft.headerRows);
  const columns = Object.entries(draft.columns).flatMap(([key, column]): [string, ColumnFaults][] => {
    const faults = column.keep ? columnFaults(column) : {};
    return Object.keys(faults).length > 0 ? [[key, faults]] : [];
  });
  return {
    ...(rate === undefined || (rate >= 1e-3 && rate <= 1e10)
      ? {}
      : { sampleRateHz: 'Give samples per second, from 0.001 to 10 000 000 000' }),
    ...(rows === undefined || (rows >= 0 && rows <= 1000 && Number.isInteger(rows))
      ? {}
      : { headerRows: 'Give a whole number from 0 to 1000' }),
    columns: Object.fromEntries(columns),
  };
}

export const hasFaults = ({ columns, ...fields }: ImportFaults): boolean =>
  Object.keys(columns).length > 0 || Object.keys(fields).length > 0;

/** Index of the column that tells the time, as the form has it; null: none. */
export function timeIndex({ timeColumn }: ImportDraft, preview: ImportPreview): number | null {
  if (timeColumn === 'none') return null;
  const chosen = preview.columns.find(
    ({ index, name }) => timeColumn === columnKey(index) || timeColumn === columnKey(name),
  );
  return chosen?.index ?? preview.timeColumn;
}

/** True for a column that is read where nothing else is said: it holds numbers and does not tell the time. */
function isReadUnasked({ index }: Column, preview: ImportPreview): boolean {
  if (preview.clockColumns.includes(index)) return false;
  return preview.rows.length === 0 || preview.rows.some((row) => typeof row[index] === 'number');
}

/** The fields of a column: as it was touched, else as it is read without. */
export function fieldsOf(draft: ImportDraft, column: Column, preview: ImportPreview): ColumnDraft {
  const { index, name, unit } = column;
  const keys = [index, name, `${name} (${unit})`, `${name} [${unit}]`].map(columnKey);
  const touched = keys.map((key) => draft.columns[key]).find((fields) => fields !== undefined);
  if (touched) return touched;
  return { ...untouchedColumn, keep: !draft.listed && isReadUnasked(column, preview) };
}

/** The columns that become channels, with their fields. */
export function keptColumns(
  draft: ImportDraft,
  preview: ImportPreview,
): { column: Column; draft: ColumnDraft }[] {
  const time = timeIndex(draft, preview);
  return preview.columns
    .filter(({ index }) => index !== time)
    .map((column) => ({ column, draft: fieldsOf(draft, column, preview) }))
    .filter((kept) => kept.draft.keep);
}

/** The options that the form stands for. Columns are named only once one of them was touched. */
export function optionsOf(draft: ImportDraft, preview: ImportPreview | null): ImportOptions {
  const sampleRateHz = numberOf(draft.sampleRateHz);
  const headerRows = numberOf(draft.headerRows);
  const isTouched = draft.listed || Object.keys(draft.columns).length > 0;
  const kept = isTouched && preview ? keptColumns(draft, preview) : [];
  const chosen = {
    delimiter: draft.delimiter,
    decimal: draft.decimal,
    timeUnit: draft.timeUnit,
    missingValues: draft.missingValues,
    unevenTime: draft.unevenTime,
  };
  return {
    ...(sampleRateHz === undefined ? {} : { sampleRateHz }),
    ...(headerRows === undefined ? {} : { headerRows }),
    ...(draft.timeColumn === '' ? {} : { timeColumn: columnOfKey(draft.timeColumn) }),
    ...(Object.fromEntries(Object.entries(chosen).filter(([, value]) => value !== '')) as ImportOptions),
    ...(kept.length > 0
      ? { channels: kept.map(({ column, draft: fields }) => channelOf(column.index, fields)) }
      : {}),
  };
}

function columnOfKey(key: string): number | string | null {
  if (key === 'none') return null;
  return key.startsWith('#') ? Number(key.slice(1)) : key.slice(1);
}
