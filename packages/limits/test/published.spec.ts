import type { LimitSet } from '@overtally/contracts';
import { describe, expect, it } from 'vitest';
import { resolveLimits } from '../src/resolve.js';
import { publishedLimitSets } from '../src/sets/index.js';
import { setOf } from './measured.js';

/** Limits by order that hold for the parameters, in the unit of the set. */
function limitsAt(id: string, parameters: Parameters<typeof resolveLimits>[1] = {}): Record<number, number> {
  const held = resolveLimits(setOf(id), parameters).limits?.[0]?.set;
  return Object.fromEntries(held?.orders.map(({ order, limit }) => [order, limit]) ?? []);
}
const totalsAt = (id: string, parameters: Parameters<typeof resolveLimits>[1]) =>
  Object.fromEntries(
    resolveLimits(setOf(id), parameters).limits?.[0]?.set.totals.map(({ name, limit }) => [name, limit]) ??
      [],
  );
const pick = (limits: Record<number, number>, orders: readonly number[]) =>
  orders.map((order) => limits[order]);

// IEC 61000-3-2, Table 2, as a laboratory EMC report prints it (edition 4); order 3 of edition 5.1 from memory.
describe('class C above 25 W', () => {
  const upper = [5, 7, 9, 11, 13, 15, 17, 19, 21, 23, 25, 27, 29, 31, 33, 35, 37, 39];
  const printed = [10, 7, 5, ...Array.from({ length: 15 }, () => 3)];

  it.each(['iec61000-3-2.classC.gt25W.ed4', 'iec61000-3-2.classC.gt25W.ed5'])(
    '%s limits orders 2, 3 and the odd ones to 39',
    (id) => {
      const limits = limitsAt(id, { powerFactor: 0.9 });
      expect(Object.keys(limits).map(Number)).toEqual([2, 3, ...upper]);
      expect(limits[2]).toBe(2);
      expect(pick(limits, upper)).toEqual(printed);
    },
  );

  it('order 3 is 30 times the power factor in edition 4 and 27 % in edition 5.1', () => {
    const third = setOf('iec61000-3-2.classC.gt25W.ed4').orders.find(({ order }) => order === 3);
    expect(third).toMatchObject({ limit: 30, timesParameter: 'powerFactor' });
    expect(limitsAt('iec61000-3-2.classC.gt25W.ed5')[3]).toBe(27);
  });
});

describe('class C up to 25 W', () => {
  // mA/W column of IEC 61000-3-2, Table 3, as a laboratory EMC report prints it; 3.85/n by hand from 13.
  const perWatt: Record<number, number> = {
    ...{ 3: 3.4, 5: 1.9, 7: 1, 9: 0.5, 11: 0.35, 13: 0.296154, 15: 0.256667, 17: 0.226471, 19: 0.202632 },
    ...{ 21: 0.183333, 23: 0.167391, 25: 0.154, 27: 0.142593, 29: 0.132759, 31: 0.124194, 33: 0.116667 },
    ...{ 35: 0.11, 37: 0.104054, 39: 0.0987179 },
  };

  it.each(['iec61000-3-2.classC.le25W.ed4', 'iec61000-3-2.classC.5to25W.ed5'])(
    '%s has the mA/W column without a cap as its first alternative',
    (id) => {
      const [first] = resolveLimits(setOf(id), { powerW: 10 }).limits ?? [];
      expect(first?.set.basis).toBe('milliampere-per-watt');
      expect(first?.set.orders.map(({ order }) => order)).toEqual(Object.keys(perWatt).map(Number));
      for (const { order, limit, capA } of first?.set.orders ?? []) {
        expect(limit, `order ${order}`).toBeCloseTo(perWatt[order] ?? NaN, 5);
        expect(capA).toBeUndefined();
      }
    },
  );

  // Percentages from memory of 7.3 b) and 7.4.3; the angles as the EMC Society's list quotes them.
  it('has the shape of the current as the second, THD and six orders as the third', () => {
    const [, shape, third] =
      resolveLimits(setOf('iec61000-3-2.classC.5to25W.ed5'), { powerW: 10 }).limits ?? [];
    expect(shape?.set.orders).toEqual([
      { order: 3, limit: 86 },
      { order: 5, limit: 61 },
    ]);
    expect(shape?.waveform).toMatchObject({ startsByDeg: 60, peakByDeg: 65, endsNotBeforeDeg: 90 });
    const entries = third?.set.orders.map(({ order, limit }) => [order, limit]);
    expect(entries).toEqual([
      [2, 5],
      [3, 35],
      [5, 25],
      [7, 30],
      [9, 20],
      [11, 20],
    ]);
    expect(third?.set.totals).toEqual([{ name: 'THD', limit: 70, maxOrder: 40 }]);
  });
});

describe('IEC 61000-3-12', () => {
  // IEC 61000-3-2, Table 1 (class A), amperes: 1.5 times them over 16 A is the row Rsce = 33, printed to one digit.
  it.each([
    ['table2', { 3: 2.3, 5: 1.14, 7: 0.77, 9: 0.4, 11: 0.33, 13: 0.21 }],
    ['table3', { 5: 1.14, 7: 0.77, 11: 0.33, 13: 0.21 }],
    ['table4', { 5: 1.14, 7: 0.77, 11: 0.33, 13: 0.21 }],
    ['table5', { 5: 1.14, 7: 0.77, 11: 0.33, 13: 0.21 }],
  ])('%s at Rsce = 33 is 1.5 times class A over 16 A', (table, classA) => {
    const limits = limitsAt(`iec61000-3-12.${table}`, { rsce: 33, irefA: 20 });
    for (const [order, amperes] of Object.entries(classA)) {
      expect(Math.abs((limits[Number(order)] ?? NaN) - (150 * amperes) / 16), order).toBeLessThan(0.06);
    }
  });

  it('limits even orders up to 12 to 16/n percent in every row', () => {
    for (const table of ['table2', 'table3', 'table4', 'table5']) {
      for (const rsce of [33, 90, 1000]) {
        const limits = limitsAt(`iec61000-3-12.${table}`, { rsce, irefA: 20 });
        expect(pick(limits, [2, 4, 6, 8, 10, 12, 14])).toEqual([8, 4, 16 / 6, 2, 1.6, 16 / 12, undefined]);
      }
    }
  });

  // Tables 2 to 5 of edition 2:2011, from memory: Rsce, individual limits, THC, PWHC.
  const rows: [string, number, number[], number[], number, number][] = [
    ['table2', 66, [3, 5, 7, 9, 11, 13], [24, 13, 8, 5, 4, 3], 26, 26],
    ['table2', 120, [3, 5, 7, 9, 11, 13], [27, 15, 10, 6, 5, 4], 30, 30],
    ['table2', 250, [3, 5, 7, 9, 11, 13], [35, 20, 13, 9, 8, 6], 40, 40],
    ['table2', 350, [3, 5, 7, 9, 11, 13], [41, 24, 15, 12, 10, 8], 47, 47],
    ['table3', 66, [5, 7, 11, 13], [14, 9, 5, 3], 16, 25],
    ['table3', 120, [5, 7, 11, 13], [19, 12, 7, 4], 22, 28],
    ['table3', 250, [5, 7, 11, 13], [31, 20, 12, 7], 37, 38],
    ['table3', 350, [5, 7, 11, 13], [40, 25, 15, 10], 48, 46],
    ['table4', 120, [5, 7, 11, 13], [40, 25, 15, 10], 48, 46],
    ['table5', 33, [17, 19, 23, 25, 29, 31, 35, 37], [2, 1.5, 1.5, 1.5, 1, 1, 1, 1], 13, 22],
    ['table5', 250, [5, 7, 11, 13, 17, 19], [25, 17.3, 12.1, 10.7, 8.4, 7.8], 35, 70],
    ['table5', 250, [23, 25, 29, 31, 35, 37], [6.8, 6.5, 5.4, 5.2, 4.9, 4.7], 35, 70],
  ];
  it.each(rows)('%s has its row of Rsce = %i', (table, rsce, orders, limits, thc, pwhc) => {
    const parameters = { rsce, irefA: 20 };
    expect(pick(limitsAt(`iec61000-3-12.${table}`, parameters), orders)).toEqual(limits);
    expect(totalsAt(`iec61000-3-12.${table}`, parameters)).toEqual({ THC: thc, PWHC: pwhc });
  });
});

describe('IEEE 519', () => {
  // Tables 2 to 4 of IEEE 519-2014 as the sources of the sets print them: Isc/IL, the five bands, TDD.
  const rows: [number, number, number[], number][] = [
    [2, 10, [4, 2, 1.5, 0.6, 0.3], 5],
    [2, 20, [7, 3.5, 2.5, 1, 0.5], 8],
    [2, 50, [10, 4.5, 4, 1.5, 0.7], 12],
    [2, 100, [12, 5.5, 5, 2, 1], 15],
    [2, 1000, [15, 7, 6, 2.5, 1.4], 20],
    [3, 10, [2, 1, 0.75, 0.3, 0.15], 2.5],
    [3, 20, [3.5, 1.75, 1.25, 0.5, 0.25], 4],
    [3, 50, [5, 2.25, 2, 0.75, 0.35], 6],
    [3, 100, [6, 2.75, 2.5, 1, 0.5], 7.5],
    [3, 1000, [7.5, 3.5, 3, 1.25, 0.7], 10],
    [4, 10, [1, 0.5, 0.38, 0.15, 0.1], 1.5],
    [4, 25, [2, 1, 0.75, 0.3, 0.15], 2.5],
    [4, 50, [3, 1.5, 1.15, 0.45, 0.22], 3.75],
  ];
  const bands = [
    [3, 5, 7, 9],
    [11, 13, 15],
    [17, 19, 21],
    [23, 25, 27, 29, 31, 33],
    [35, 37, 39, 41, 43, 45, 47, 49],
  ];
  const evens = bands.map((band) => band.map((order) => order - 1)).flat();
  const shareOfEven = { '2014': () => 0.25, '2022': (order: number) => (order <= 6 ? 0.5 : 1) };
  const bandOf = (order: number) => [11, 17, 23, 35, 51].findIndex((end) => order < end);

  it.each(rows)(
    'Table %i at Isc/IL = %i: odd by band, even by the rule of the edition',
    (table, iscOverIl, limit, tdd) => {
      for (const edition of ['2014', '2022'] as const) {
        const id = `ieee519-${edition}.table${table}`;
        const limits = limitsAt(id, { iscOverIl, ilA: 100 });
        expect(Object.keys(limits)).toHaveLength(49);
        bands.forEach((band, i) => band.forEach((order) => expect(limits[order], `${order}`).toBe(limit[i])));
        for (const order of [...evens, 50]) {
          const expected = shareOfEven[edition](order) * (limit[bandOf(order)] ?? NaN);
          expect(limits[order], `${id} ${order}`).toBeCloseTo(expected, 9);
        }
        expect(totalsAt(id, { iscOverIl, ilA: 100 })).toEqual({ TDD: tdd });
      }
    },
  );

  // IEEE 519-2014 and -2022, Table 1: class boundaries belong to the lower class.
  it.each([
    [480, 5, 8],
    [1000, 5, 8],
    [13_800, 3, 5],
    [69_000, 3, 5],
    [138_000, 1.5, 2.5],
    [161_000, 1.5, 2.5],
    [345_000, 1, 1.5],
  ])('voltage at %i V: %f %% per order, THD %f %%', (nominalV, order, thd) => {
    const limits = limitsAt('ieee519.voltage', { nominalV });
    expect(new Set(Object.values(limits))).toEqual(new Set([order]));
    expect(Object.keys(limits)).toHaveLength(49);
    expect(totalsAt('ieee519.voltage', { nominalV })).toEqual({ THD: thd });
  });
});

describe('compatibility and planning levels', () => {
  it('EN 50160 gives medium voltage the numbers of low voltage', () => {
    expect(limitsAt('en50160.mv', { nominalV: 20_000 })).toEqual(limitsAt('en50160.lv'));
  });

  // IEC 61000-2-4:2002, Tables 2 to 5; class 2 as its sources print it, 1 and 3 from memory. Formulas by hand.
  const classes: [number, Record<number, number>, number][] = [
    [1, { 2: 2, 3: 3, 4: 1, 5: 3, 7: 3, 9: 1.5, 11: 3, 13: 3, 15: 0.3, 17: 2, 21: 0.2, 27: 0.2 }, 5],
    [2, { 2: 2, 3: 5, 4: 1, 5: 6, 7: 5, 9: 1.5, 11: 3.5, 13: 3, 15: 0.4, 17: 2, 21: 0.3, 27: 0.2 }, 8],
    [3, { 2: 3, 3: 6, 4: 1.5, 5: 8, 7: 7, 9: 2.5, 11: 5, 13: 4.5, 15: 2, 17: 4, 21: 1.75, 27: 1 }, 10],
  ];
  it.each(classes)('IEC 61000-2-4 class %i', (number, low, thd) => {
    const id = `iec61000-2-4.class${number}`;
    const high =
      number === 3
        ? { 6: 1, 10: 1, 12: 1, 50: 1, 19: 3.52632, 25: 2.56, 37: 1.56757, 49: 1.06122, 33: 1, 45: 1 }
        : {
            6: 0.5,
            10: 0.5,
            12: 0.458333,
            50: 0.3,
            19: 1.76105,
            25: 1.2736,
            37: 0.772973,
            49: 0.517551,
            33: 0.2,
          };
    const limits = limitsAt(id);
    for (const [order, limit] of Object.entries({ ...low, ...high })) {
      expect(limits[Number(order)], `order ${order}`).toBeCloseTo(limit, 5);
    }
    expect(Object.keys(limits)).toHaveLength(49);
    expect(totalsAt(id, {})).toEqual({ THD: thd });
  });

  // IEC TR 61000-3-6:2008, Table 2, as HarmonicPowerModels.jl prints it for HV; formulas by hand.
  it('IEC TR 61000-3-6 has the levels of medium and high voltage', () => {
    const orders = [2, 3, 5, 7, 9, 11, 13, 15, 17, 21, 25, 27, 50];
    const mv = pick(limitsAt('iec61000-3-6.mv'), orders);
    const hv = pick(limitsAt('iec61000-3-6.hv'), orders);
    [1.8, 4, 5, 4, 1.2, 3, 2.5, 0.3, 1.7, 0.2, 1.092, 0.2, 0.27].forEach((limit, i) =>
      expect(mv[i]).toBeCloseTo(limit, 9),
    );
    [1.4, 2, 2, 2, 1, 1.5, 1.5, 0.3, 1.2, 0.2, 0.816, 0.2, 0.198].forEach((limit, i) =>
      expect(hv[i]).toBeCloseTo(limit, 9),
    );
    expect(totalsAt('iec61000-3-6.mv', {})).toEqual({ THD: 6.5 });
    expect(totalsAt('iec61000-3-6.hv', {})).toEqual({ THD: 3 });
  });
});

describe('what published sets say of themselves', () => {
  const valued = (set: LimitSet) => [set, ...(set.rows ?? [])].flatMap(({ orders }) => orders);
  it('every set has limits, each order once and rising in each row, and rows say how they are taken', () => {
    for (const set of publishedLimitSets) {
      expect(valued(set).length, set.id).toBeGreaterThan(0);
      for (const { orders } of [set, ...(set.rows ?? [])]) {
        const numbers = orders.map(({ order }) => order);
        expect(numbers, set.id).toEqual([...new Set(numbers)].sort((a, b) => a - b));
      }
      expect(set.rows === undefined, set.id).toBe(set.rowChoice === undefined);
    }
  });

  it('a value that rests on memory alone is not called sourced', () => {
    for (const { source, evidence, id } of publishedLimitSets) {
      if (source.every((entry) => entry.startsWith('From memory'))) {
        expect(evidence, id).toMatch(/^memory/);
      }
    }
  });
});
