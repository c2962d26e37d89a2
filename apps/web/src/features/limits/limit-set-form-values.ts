import {
  createLimitSetSchema,
  parameterNameSchema,
  quantitySchema,
  type CreateLimitSet,
  type LimitSet,
  type ParameterName,
  type Quantity,
} from '@overtally/contracts';
import {
  cloneLimitSet,
  commonReading,
  limitRows,
  limitTableLines,
  limitTableRows,
  parseLimitRows,
  parseLimitTable,
  readByOwn,
  readingOf,
  unitCell,
  type TableProblem,
} from '@overtally/limits';
import { z } from 'zod';

/** Limits of one or several orders as they are typed; what is empty follows from the set. */
export interface LimitRowValues {
  orders: string;
  limit: string;
  unit: string;
  cap: string;
}
export interface TotalValues {
  name: TotalName;
  limit: string;
  unit: string;
  maxOrder: string;
}

/** One table of limits; a set whose limits depend on a parameter has several. */
export interface TableValues {
  label: string;
  rows: LimitRowValues[];
  totals: TotalValues[];
}

/** The form of a custom set: what is typed. */
export interface LimitSetFormValues {
  title: string;
  standard: string;
  edition: string;
  appliesWhen: string;
  quantity: Quantity;
  unit: string;
  basis: CreateLimitSet['basis'];
  referenceParameter: ParameterName;
  tables: TableValues[];
  source: string;
}

export type TotalName = CreateLimitSet['totals'][number]['name'];
type Reading = Pick<LimitSet, 'basis' | 'unit' | 'referenceParameter'>;

const { shape } = createLimitSetSchema;
const cells = z.string();
const tableSchema = z.object({
  label: z.string(),
  rows: z
    .array(z.object({ orders: cells, limit: cells, unit: cells, cap: cells }))
    .min(1, 'Give at least one order')
    .max(199),
  totals: z
    .array(
      z.object({
        name: shape.totals.unwrap().element.shape.name,
        limit: cells,
        unit: cells,
        maxOrder: cells,
      }),
    )
    .max(5),
});

const rowFields = ['orders', 'limit', 'unit', 'cap'] as const;
const totalFields = ['name', 'limit', 'unit', 'maxOrder'] as const;

/** The cells of a table, its totals last. */
const cellsOf = ({ rows, totals }: TableValues): string[][] => [
  ...rows.map((row) => rowFields.map((field) => row[field])),
  ...totals.map((total) => totalFields.map((field) => total[field])),
];

/** The field that a problem speaks of. */
function fieldOf({ line, cell }: TableProblem, { rows }: TableValues): (string | number)[] {
  const index = line - 1;
  return index < rows.length
    ? ['rows', index, rowFields[cell] ?? 'limit']
    : ['totals', index - rows.length, totalFields[cell] ?? 'limit'];
}

/** What is typed, checked as the server checks it; messages stand at their fields. */
export const limitSetFormSchema = z
  .object({
    title: shape.title,
    standard: shape.standard.unwrap(),
    edition: shape.edition.unwrap(),
    appliesWhen: shape.appliesWhen.unwrap(),
    quantity: quantitySchema,
    unit: shape.unit,
    basis: shape.basis,
    referenceParameter: parameterNameSchema,
    tables: z.array(tableSchema).min(1),
    source: shape.source,
  })
  .superRefine((set, context) => {
    if (set.basis === 'absolute' && set.unit.trim() === '') {
      context.addIssue({ code: 'custom', path: ['unit'], message: 'Give the unit of the limits, such as A' });
    }
    set.tables.forEach((table, index) => {
      for (const problem of parseLimitRows(cellsOf(table)).problems ?? []) {
        const path = ['tables', index, ...fieldOf(problem, table)];
        context.addIssue({ code: 'custom', path, message: problem.message });
      }
    });
  });

const readingOfForm = ({ basis, unit, referenceParameter }: LimitSetFormValues): Reading =>
  readingOf({ basis, unit: unit.trim(), referenceParameter });

/** The limits of a table that was checked. */
function limitsOf(table: TableValues, reading: Reading): Pick<LimitSet, 'orders' | 'totals'> {
  const read = parseLimitRows(cellsOf(table));
  return read.problems === null ? readByOwn(read, reading) : { orders: [], totals: [] };
}

/**
 * The set to create from what was typed and checked.
 * @param base the set that it is a new version of: its procedure, conditions and choice of row are kept
 */
export function limitSetFrom(values: LimitSetFormValues, base?: LimitSet): CreateLimitSet {
  const { tables, referenceParameter, ...words } = values;
  const reading = readingOfForm(values);
  const [first] = tables as [TableValues, ...TableValues[]];
  const kept = base ? cloneLimitSet(base) : {};
  const own = {
    ...kept,
    ...words,
    ...reading,
    referenceParameter: values.basis === 'percent-of-reference' ? referenceParameter : undefined,
  };
  if (!base?.rows?.length) return { ...own, ...limitsOf(first, reading) };
  const rows = base.rows.map((row, index) => {
    const table = tables[index] ?? first;
    const { orders, totals } = limitsOf(table, { ...reading, ...readingOf({ ...reading, ...row }) });
    return { ...row, orders, totals };
  });
  return { ...own, orders: [], totals: [], rows };
}

/** Rows of a table as they are typed; a unit that the set has is left out. */
const tableOf = (set: Pick<LimitSet, 'orders' | 'totals'> & Reading, label = ''): TableValues =>
  tableOfRows(limitTableRows(set), unitCell(set), label);

function tableOfRows(rows: readonly (readonly string[])[], ownUnit: string, label = ''): TableValues {
  const table: TableValues = { label, rows: [], totals: [] };
  for (const [first = '', limit = '', unit = '', last = ''] of rows) {
    const name = shape.totals.unwrap().element.shape.name.safeParse(first.toUpperCase());
    if (name.success) table.totals.push({ name: name.data, limit, unit, maxOrder: last });
    else table.rows.push({ orders: first, limit, unit: unit === ownUnit ? '' : unit, cap: last });
  }
  return table;
}

/** What stands in the form to begin with: a set as it is now. */
export function formValuesOf(set: LimitSet): LimitSetFormValues {
  const rows = limitRows(set);
  const { title, standard, edition, appliesWhen, quantity, unit, basis, referenceParameter } = set;
  return {
    ...{ title, standard, edition, appliesWhen, quantity, unit, basis },
    referenceParameter: referenceParameter ?? emptyLimitSet.referenceParameter,
    tables:
      rows.length === 0
        ? [tableOf(set)]
        : rows.map(({ set: ofRow, label }) => tableOf(ofRow, label ?? undefined)),
    source: set.source.join('; ').slice(0, 500),
  };
}

export type ReadText =
  | { table: TableValues; reading: Reading | null; count: number; problems: null }
  | { table: null; problems: TableProblem[] };

/** A table out of pasted or dropped text, with what most of its limits refer to. */
export function tableFromText(text: string): ReadText {
  const read = parseLimitTable(text);
  if (read.problems !== null) return { table: null, problems: read.problems };
  const reading = commonReading(read.orders);
  const rows = limitTableLines(text).map(({ cells: [first, limit, unit, last] }) =>
    [first, limit, unit, last].map((cell) => cell?.text ?? ''),
  );
  const ownUnit = reading ? unitCell(reading) : '';
  return { table: tableOfRows(rows, ownUnit), reading, count: read.orders.length, problems: null };
}

export const emptyRow: LimitRowValues = { orders: '', limit: '', unit: '', cap: '' };

export const emptyLimitSet: LimitSetFormValues = {
  title: '',
  standard: '',
  edition: '',
  appliesWhen: '',
  quantity: 'current',
  unit: 'A',
  basis: 'absolute',
  referenceParameter: 'ilA',
  tables: [
    { label: '', rows: [3, 5, 7, 9].map((each) => ({ ...emptyRow, orders: String(each) })), totals: [] },
  ],
  source: '',
};

/** Unit that limits of a quantity usually have; empty where there is none to suggest. */
export const usualUnit: Record<Quantity, string> = {
  voltage: 'V',
  current: 'A',
  power: 'W',
  sound_pressure: 'Pa',
  acceleration: 'm/s²',
  velocity: 'm/s',
  dimensionless: '',
  other: '',
};

/** Totals that make sense for what the limits refer to: THD and TDD are percentages, the others amounts. */
export const totalWords: Record<TotalName, string> = {
  THD: 'THD, % of the fundamental',
  TDD: 'TDD, % of the demand current IL',
  THC: 'THC, all harmonics',
  POHC: 'POHC, odd orders from 21',
  PWHC: 'PWHC, orders from 14 weighted by order',
};
