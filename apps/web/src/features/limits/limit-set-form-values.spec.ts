import { createLimitSetSchema } from '@overtally/contracts';
import { findPublishedLimitSet, publishedLimitSets } from '@overtally/limits';
import { describe, expect, it } from 'vitest';
import { sampleLimitSet } from '../../testing/samples.js';
import {
  emptyLimitSet,
  emptyRow,
  formValuesOf,
  limitSetFormSchema,
  limitSetFrom,
  tableFromText,
  type LimitRowValues,
  type LimitSetFormValues,
} from './limit-set-form-values.js';

const row = (orders: string, limit: string, rest: Partial<LimitRowValues> = {}): LimitRowValues => ({
  ...{ ...emptyRow, orders, limit },
  ...rest,
});
const withRows = (values: LimitSetFormValues, rows: LimitRowValues[]): LimitSetFormValues => ({
  ...values,
  tables: [{ label: '', rows, totals: values.tables[0]!.totals }],
});

// Values of EN 50160:2010, Table 1: 5 % at order 3, 6 % at order 5; THD 8 %.
const filled: LimitSetFormValues = {
  ...emptyLimitSet,
  title: 'Site limits',
  quantity: 'voltage',
  basis: 'percent-of-fundamental',
  unit: '',
  tables: [
    {
      label: '',
      rows: [row('3', '5'), row('5', '6,0')],
      totals: [{ name: 'THD', limit: '8', unit: '', maxOrder: '40' }],
    },
  ],
  source: 'Contract 12/2026',
};

function messages(values: LimitSetFormValues): Record<string, string> {
  const parsed = limitSetFormSchema.safeParse(values);
  return Object.fromEntries(parsed.error?.issues.map(({ path, message }) => [path.join('.'), message]) ?? []);
}

describe('form of a custom limit set', () => {
  it('turns what is typed into the numbers of a set', () => {
    expect(messages(filled)).toEqual({});
    expect(limitSetFrom(filled)).toMatchObject({
      ...{ unit: '%', basis: 'percent-of-fundamental' },
      orders: [
        { order: 3, limit: 5 },
        { order: 5, limit: 6 },
      ],
      totals: [{ name: 'THD', limit: 8, maxOrder: 40 }],
    });
  });

  it('reads ranges, formulas and units of single rows', () => {
    const rows = [
      row('15-19 odd', '0.15*15/n', { unit: 'A' }),
      row('5', '3.4', { unit: 'mA/W', cap: '2.3' }),
    ];
    const { orders } = limitSetFrom(withRows(filled, rows));
    expect(orders.map(({ order }) => order)).toEqual([5, 15, 17, 19]);
    expect(orders[0]).toEqual({ order: 5, limit: 3.4, capA: 2.3, basis: 'milliampere-per-watt' });
    expect(orders[1]).toMatchObject({ limit: 0.15, unit: 'A', formula: '0.15*15/n' });
  });

  it('says at the field what is wrong with it', () => {
    const found = messages(
      withRows(filled, [row('3', '5'), row('1', '0'), row('3', '4'), row('7', '1', { unit: 'yd' })]),
    );
    expect(found['tables.0.rows.1.orders']).toBe('Orders are from 2 to 200');
    expect(found['tables.0.rows.2.orders']).toMatch(/Order 3 stands in line 1 already/);
    expect(found['tables.0.rows.3.unit']).toMatch(/not a unit of limits; give A/);
    const total = { name: 'THC', limit: '', unit: '', maxOrder: '1' } as const;
    const tables = [{ ...filled.tables[0]!, totals: [total] }];
    expect(Object.keys(messages({ ...filled, tables }))).toEqual(['tables.0.totals.0.limit']);
  });

  it('asks for the unit of absolute limits, the name and the source', () => {
    expect(messages({ ...filled, basis: 'absolute' })).toEqual({
      unit: 'Give the unit of the limits, such as A',
    });
    expect(Object.keys(messages({ ...filled, title: ' ', source: '' }))).toEqual(['title', 'source']);
  });

  it('shows a set and leads back to its limits, rows and conditions, whichever set it is', () => {
    for (const published of publishedLimitSets) {
      const values = formValuesOf(published);
      expect(messages({ ...values, title: values.title.slice(0, 160) }), published.id).toEqual({});
      const made = createLimitSetSchema.parse(limitSetFrom(values, published));
      const limitsOf = ({ orders, totals }: Pick<typeof made, 'orders' | 'totals'>) => ({
        orders: orders.map(({ formula: _formula, ...entry }) => entry),
        totals,
      });
      expect(limitsOf(made), published.id).toEqual(limitsOf(published));
      expect(made.rows?.map(limitsOf), published.id).toEqual(published.rows?.map(limitsOf));
      expect(made).toMatchObject({ procedure: published.procedure, basis: published.basis });
    }
  });

  it('shows equal limits as ranges and leaves out the unit that the set has', () => {
    const [table] = formValuesOf(findPublishedLimitSet('iec61000-3-2.classA')!).tables;
    expect(table?.rows.find(({ orders }) => orders === '15-39 odd')).toEqual(row('15-39 odd', '0.15*15/n'));
    const house = sampleLimitSet({ orders: [{ order: 3, limit: 20, basis: 'absolute', unit: 'mA' }] });
    expect(formValuesOf(house).tables[0]?.rows).toEqual([row('3', '20', { unit: 'mA' })]);
  });
});

describe('limits pasted or dropped', () => {
  // IEC 61000-3-2, Table 1: 2.30 A at order 3, 1.14 A at order 5.
  it.each([
    ['tabs, as spreadsheets copy', '3\t2.30\tA\n5\t1.14\tA\n'],
    ['a heading and Windows line ends', 'Order\tLimit\tUnit\r\n3\t2.30\tA\r\n5\t1.14\tA'],
    ['semicolons and decimal commas', '3;2,30;A\n5;1,14;A'],
    ['commas between columns', '3,2.30,A\n5,1.14,A'],
  ])('understands %s', (_, text) => {
    const read = tableFromText(text);
    expect(read.table?.rows).toEqual([row('3', '2.30'), row('5', '1.14')]);
    expect(read).toMatchObject({ count: 2, reading: { basis: 'absolute', unit: 'A' } });
  });

  it('names line and column of every problem and takes nothing then', () => {
    const read = tableFromText('3\t2.3\nfive\t1.14\n7\tnone');
    expect(read.table).toBeNull();
    expect(read.problems?.map(({ line, column }) => [line, column])).toEqual([
      [2, 1],
      [3, 4],
    ]);
  });
});
