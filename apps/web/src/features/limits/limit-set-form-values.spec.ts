import { describe, expect, it } from 'vitest';
import { emptyLimitSet, limitSetFormSchema, type LimitSetFormValues } from './limit-set-form-values.js';

// Values of EN 50160:2010, Table 1: 5 % at order 3, 6 % at order 5; THD 8 %.
const filled: LimitSetFormValues = {
  ...emptyLimitSet,
  title: 'Site limits',
  quantity: 'voltage',
  basis: 'percent-of-fundamental',
  unit: '',
  orders: [
    { order: '3', limit: '5' },
    { order: '5', limit: '6,0' },
  ],
  totals: [{ name: 'THD', limit: '8', maxOrder: '40' }],
  source: 'Contract 12/2026',
};

function messages(values: LimitSetFormValues): Record<string, string> {
  const parsed = limitSetFormSchema.safeParse(values);
  return Object.fromEntries(parsed.error?.issues.map(({ path, message }) => [path.join('.'), message]) ?? []);
}

describe('form of a custom limit set', () => {
  it('turns what is typed into the numbers of a set', () => {
    expect(limitSetFormSchema.parse(filled)).toMatchObject({
      orders: [
        { order: 3, limit: 5 },
        { order: 5, limit: 6 },
      ],
      totals: [{ name: 'THD', limit: 8, maxOrder: 40 }],
    });
  });

  it('says at the row what is wrong with it', () => {
    const orders = [
      { order: '3', limit: '5' },
      { order: '1', limit: '0' },
      { order: '3', limit: '4' },
    ];
    expect(messages({ ...filled, orders: orders.slice(0, 2) })).toEqual({
      'orders.1.order': 'From 2 to 200',
      'orders.1.limit': 'A number above zero',
    });
    expect(messages({ ...filled, orders: [orders[0]!, orders[2]!] })).toEqual({
      'orders.1.order': 'Order 3 stands in row 1 already',
    });
  });

  it('asks for the unit of absolute limits, the name and the source', () => {
    expect(messages({ ...filled, basis: 'absolute' })).toEqual({
      unit: 'Give the unit of the limits, such as A',
    });
    expect(Object.keys(messages({ ...filled, title: ' ', source: '' }))).toEqual(['title', 'source']);
  });
});
