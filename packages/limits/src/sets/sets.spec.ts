import { limitSetSchema, type LimitSet } from '@overtally/contracts';
import { describe, expect, it } from 'vitest';
import { findPublishedLimitSet, publishedLimitSets } from './index.js';

function published(id: string): LimitSet {
  const set = findPublishedLimitSet(id);
  if (set === undefined) throw new Error(`No set ${id}`);
  return set;
}
const limitsOf = (id: string): Record<number, number> =>
  Object.fromEntries(published(id).orders.map(({ order, limit }) => [order, limit]));
const expectTable = (actual: Record<number, number>, expected: Record<number, number>) => {
  expect(Object.keys(actual)).toEqual(Object.keys(expected));
  for (const [order, limit] of Object.entries(expected)) {
    expect(actual[Number(order)], `order ${order}`).toBeCloseTo(limit, 4);
  }
};

// Laboratory EMC report 1402CE13-01, page 34: class A of EN 61000-3-2 as printed; from 15 (odd) and 8 (even)
// the printed formulas 0.15 x 15/n and 0.23 x 8/n worked out by hand to five decimals.
const classA: Record<number, number> = {
  2: 1.08,
  3: 2.3,
  4: 0.43,
  5: 1.14,
  6: 0.3,
  7: 0.77,
  8: 0.23,
  9: 0.4,
  10: 0.184,
  11: 0.33,
  12: 0.15333,
  13: 0.21,
  14: 0.13143,
  15: 0.15,
  16: 0.115,
  17: 0.13235,
  18: 0.10222,
  19: 0.11842,
  20: 0.092,
  21: 0.10714,
  22: 0.08364,
  23: 0.09783,
  24: 0.07667,
  25: 0.09,
  26: 0.07077,
  27: 0.08333,
  28: 0.06571,
  29: 0.07759,
  30: 0.06133,
  31: 0.07258,
  32: 0.0575,
  33: 0.06818,
  34: 0.05412,
  35: 0.06429,
  36: 0.05111,
  37: 0.06081,
  38: 0.04842,
  39: 0.05769,
  40: 0.046,
};

describe('IEC 61000-3-2', () => {
  it('class A has the printed amperes of Table 1, order by order', () => {
    expectTable(limitsOf('iec61000-3-2.classA'), classA);
  });

  it('class B is class A times 1.5 (the same page)', () => {
    const expected = Object.fromEntries(Object.entries(classA).map(([n, limit]) => [n, 1.5 * limit]));
    expectTable(limitsOf('iec61000-3-2.classB'), expected);
  });

  it('class D has the printed mA/W and caps of Table 3 (the same page), odd orders only', () => {
    expectTable(limitsOf('iec61000-3-2.classD'), {
      3: 3.4,
      5: 1.9,
      7: 1,
      9: 0.5,
      11: 0.35,
      13: 0.29615,
      15: 0.25667,
      17: 0.22647,
      19: 0.20263,
      21: 0.18333,
      23: 0.16739,
      25: 0.154,
      27: 0.14259,
      29: 0.13276,
      31: 0.12419,
      33: 0.11667,
      35: 0.11,
      37: 0.10405,
      39: 0.09872,
    });
    for (const { order, capA } of published('iec61000-3-2.classD').orders) {
      expect(capA, `cap of ${order}`).toBeCloseTo(classA[order] ?? NaN, 4);
    }
  });
});

describe('voltage sets', () => {
  it('EN 50160 has the values of Table 228 of publication 1426-UM001J-EN-P', () => {
    expectTable(limitsOf('en50160.lv'), {
      2: 2,
      3: 5,
      4: 1,
      5: 6,
      6: 0.5,
      7: 5,
      8: 0.5,
      9: 1.5,
      10: 0.5,
      11: 3.5,
      12: 0.5,
      13: 3,
      14: 0.5,
      15: 0.5,
      16: 0.5,
      17: 2,
      18: 0.5,
      19: 1.5,
      20: 0.5,
      21: 0.5,
      22: 0.5,
      23: 1.5,
      24: 0.5,
      25: 1.5,
    });
    expect(published('en50160.lv').totals).toEqual([{ name: 'THD', limit: 8, maxOrder: 40 }]);
  });

  it('IEC 61000-2-2 has its low orders and, at checked orders, the values of its formulas', () => {
    // Low orders as in IEC 61000-2-4 class 2, which is printed publicly; formulas worked out by hand:
    // 2.27 x (17/h) - 0.27 for odd orders that 3 does not divide, 0.25 x (10/h) + 0.25 for even orders.
    const limits = limitsOf('iec61000-2-2.lv');
    const expected = {
      ...{ 2: 2, 3: 5, 4: 1, 5: 6, 6: 0.5, 7: 5, 8: 0.5, 9: 1.5, 10: 0.5, 11: 3.5, 13: 3, 15: 0.4, 17: 2 },
      ...{ 19: 1.76105, 21: 0.3, 23: 1.40783, 25: 1.2736, 27: 0.2, 29: 1.06069, 33: 0.2, 39: 0.2, 45: 0.2 },
      ...{ 31: 0.97484, 35: 0.83257, 37: 0.77297, 41: 0.67122, 43: 0.62744, 47: 0.55106, 49: 0.51755 },
      ...{ 12: 0.45833, 14: 0.42857, 20: 0.375, 30: 0.33333, 40: 0.3125, 50: 0.3 },
    };
    for (const [order, limit] of Object.entries(expected)) {
      expect(limits[Number(order)], `order ${order}`).toBeCloseTo(limit, 4);
    }
    expect(Object.keys(limits)).toHaveLength(49);
    expect(published('iec61000-2-2.lv').totals).toEqual([{ name: 'THD', limit: 8, maxOrder: 50 }]);
  });
});

describe('published sets', () => {
  it('fit the contract, have their own id each and state where they come from', () => {
    const ids = publishedLimitSets.map(({ id }) => id);
    expect(new Set(ids).size).toBe(ids.length);
    for (const set of publishedLimitSets) {
      expect(limitSetSchema.parse(set)).toEqual(set);
      expect(set.source.length, set.id).toBeGreaterThan(0);
      expect(set.notes.join(' '), set.id).toMatch(/your own copy of the edition/);
    }
  });

  it('voltage sets say that a short record is only a comparison', () => {
    for (const id of ['en50160.lv', 'iec61000-2-2.lv']) {
      expect(published(id).notes.join(' ')).toMatch(/95 % of the 10 min .* one week.*comparison/);
    }
  });

  it('gives nothing for an unknown id', () => {
    expect(findPublishedLimitSet('iec61000-3-2.classE')).toBeUndefined();
  });
});
