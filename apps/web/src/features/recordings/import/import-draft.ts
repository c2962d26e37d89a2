import type { ImportOptions, ImportPreview, Quantity } from '@overtally/contracts';

/** What a person has set for one column; what is absent stays as detected. */
export interface ColumnDraft {
  keep: boolean;
  name: string;
  quantity: Quantity | '';
  unit: string;
  gain: string;
  offset: string;
}

/** The import form as it is filled in; empty text means "as detected". */
export interface ImportDraft {
  sampleRateHz: string;
  delimiter: string;
  decimal: string;
  headerRows: string;
  /** Empty: detected; `none`: there is none; else the index of the column. */
  timeColumn: string;
  timeUnit: string;
  columns: Readonly<Record<number, ColumnDraft>>;
}

export const untouchedColumn: ColumnDraft = {
  keep: true,
  name: '',
  quantity: '',
  unit: '',
  gain: '',
  offset: '',
};

type Columns = NonNullable<ImportOptions['channels']>;

/** The form filled with the options a file was read with before. */
export function draftOf(options: ImportOptions): ImportDraft {
  const { timeColumn } = options;
  const columns: Record<number, ColumnDraft> = {};
  for (const channel of options.channels ?? []) {
    if (typeof channel.column !== 'number') continue;
    columns[channel.column] = {
      keep: true,
      name: channel.name ?? '',
      quantity: channel.quantity ?? '',
      unit: channel.unit ?? '',
      gain: text(channel.gain),
      offset: text(channel.offset),
    };
  }
  return {
    sampleRateHz: text(options.sampleRateHz),
    delimiter: options.delimiter ?? '',
    decimal: options.decimal ?? '',
    headerRows: text(options.headerRows),
    timeColumn: timeColumn === null ? 'none' : timeColumn === undefined ? '' : String(timeColumn),
    timeUnit: options.timeUnit ?? '',
    columns,
  };
}

const text = (value: number | undefined) => (value === undefined ? '' : String(value));

/** A number as people write it, with point or comma; null when it is none. */
export function parseNumber(written: string): number | null {
  const trimmed = written.trim().replace(',', '.');
  if (trimmed === '') return null;
  const value = Number(trimmed);
  return Number.isFinite(value) ? value : null;
}

/** Faults of the form by field, in words. */
export function faultsOf(
  draft: ImportDraft,
): Partial<Record<'sampleRateHz' | 'headerRows' | 'columns', string>> {
  const faults: ReturnType<typeof faultsOf> = {};
  const rate = parseNumber(draft.sampleRateHz);
  if (draft.sampleRateHz.trim() !== '' && (rate === null || rate <= 0)) {
    faults.sampleRateHz = 'Give samples per second, more than 0';
  }
  const rows = parseNumber(draft.headerRows);
  if (draft.headerRows.trim() !== '' && (rows === null || rows < 0 || !Number.isInteger(rows))) {
    faults.headerRows = 'Give a whole number from 0';
  }
  for (const column of Object.values(draft.columns)) {
    const wrong = [column.gain, column.offset].find(
      (written) => written.trim() !== '' && parseNumber(written) === null,
    );
    if (wrong !== undefined) faults.columns = `“${wrong}” is not a number`;
  }
  return faults;
}

/** Columns that hold values: all but the time column. */
export function valueColumns(draft: ImportDraft, preview: ImportPreview): ImportPreview['columns'] {
  const time = draft.timeColumn === 'none' ? null : (parseNumber(draft.timeColumn) ?? preview.timeColumn);
  return preview.columns.filter((column) => column.index !== time);
}

/** The options that the form stands for. Columns are named only once one of them was touched. */
export function optionsOf(draft: ImportDraft, preview: ImportPreview | null): ImportOptions {
  const sampleRateHz = parseNumber(draft.sampleRateHz);
  const headerRows = parseNumber(draft.headerRows);
  const timeColumn = draft.timeColumn === 'none' ? null : parseNumber(draft.timeColumn);
  const touched = Object.keys(draft.columns).length > 0 && preview !== null;
  const channels = touched ? channelsOf(draft, valueColumns(draft, preview)) : [];
  return {
    ...(sampleRateHz === null ? {} : { sampleRateHz }),
    ...(draft.delimiter ? { delimiter: draft.delimiter as NonNullable<ImportOptions['delimiter']> } : {}),
    ...(draft.decimal ? { decimal: draft.decimal as NonNullable<ImportOptions['decimal']> } : {}),
    ...(headerRows === null ? {} : { headerRows }),
    ...(draft.timeColumn === '' ? {} : { timeColumn }),
    ...(draft.timeUnit ? { timeUnit: draft.timeUnit as NonNullable<ImportOptions['timeUnit']> } : {}),
    ...(channels.length > 0 ? { channels } : {}),
  };
}

function channelsOf(draft: ImportDraft, columns: ImportPreview['columns']): Columns {
  return columns.flatMap(({ index }) => {
    const { keep, name, quantity, unit, gain, offset } = draft.columns[index] ?? untouchedColumn;
    if (!keep) return [];
    const gainValue = parseNumber(gain);
    const offsetValue = parseNumber(offset);
    return {
      column: index,
      ...(name.trim() ? { name: name.trim() } : {}),
      ...(quantity ? { quantity } : {}),
      ...(unit.trim() ? { unit: unit.trim() } : {}),
      ...(gainValue === null ? {} : { gain: gainValue }),
      ...(offsetValue === null ? {} : { offset: offsetValue }),
    };
  });
}
