import { createLimitSetSchema, type LimitSet } from '@overtally/contracts';
import { describe, expect, it } from 'vitest';
import { parseExpression } from '../src/custom/arithmetic.js';
import { cloneLimitSet } from '../src/custom/clone-limit-set.js';
import { commonReading, readByOwn, readingOf } from '../src/custom/common-reading.js';
import { limitTableRows, limitTableText } from '../src/custom/limit-table-text.js';
import { parseLimitRows, parseLimitTable } from '../src/custom/parse-limit-table.js';
import { limitForOrder } from '../src/limit-for-order.js';
import { limitRows, neededParameters } from '../src/resolve.js';
import { publishedLimitSets } from '../src/sets/index.js';
import { classA, classD, judge, measured, orderOf, setOf } from './measured.js';

describe('arithmetic of an order', () => {
  it.each([
    ['0.15*15/n', 15, 0.15],
    ['2.27*(17/h)-0.27', 17, 2],
    ['1 + 2 * 3', 2, 7],
    ['-(2-n)*.5', 8, 3],
    ['8/4/2', 2, 1],
    ['10-4-3', 2, 3],
    ['1e-3*n', 5, 0.005],
  ])('%s at %i is %f', (text, n, value) => {
    expect(parseExpression(text)(n)).toBeCloseTo(value, 12);
  });

  it.each([
    '',
    '1+',
    '(1',
    '1)',
    'n n',
    '2**3',
    'process',
    'constructor',
    '1;2',
    'n[0]',
    '=1+1',
    '(((('.repeat(40),
  ])('refuses %s', (text) => expect(() => parseExpression(text)).toThrow());
});

const good = (text: string) => {
  const table = parseLimitTable(text);
  if (table.problems !== null) throw new Error(JSON.stringify(table.problems));
  return table;
};
const problemsOf = (text: string) => parseLimitTable(text).problems;

describe('a table of limits as text', () => {
  // IEC 61000-3-2, Table 1 (class A) written as ranges gives the published set, order by order.
  it('expands class A from its printed form', () => {
    const { orders } = good(
      [
        'order;limit;unit',
        '3;2,30;A',
        '5;1,14;A',
        '7;0,77;A',
        '9;0,40;A',
        '11;0,33;A',
        '13;0,21;A',
        '15-39 odd: 0.15*15/n;A',
        '2;1,08;A',
        '4;0,43;A',
        '6;0,30;A',
        '8-40 even: 0.23*8/n;A',
      ].join('\r\n'),
    );
    expect(orders.map(({ order }) => order)).toEqual(classA.orders.map(({ order }) => order));
    orders.forEach(({ limit, formula }, i) => {
      expect(limit).toBeCloseTo(classA.orders[i]?.limit ?? NaN, 9);
      expect(formula).toBe(classA.orders[i]?.formula);
    });
  });

  it('reads mA/W with a cap, percentages and totals', () => {
    const { orders, totals } = good(
      'order,limit,unit,cap\n3,3.4,mA/W,2.30\n15-39 odd,3.85/n,mA/W,0.15*15/n\n5,10,% of fundamental\n7,4,% IL\n9,250,mA\n11,"2,5",%\nTHD,8,%,40\nTDD,5',
    );
    const entry = (order: number) => orders.find((each) => each.order === order);
    expect(entry(3)).toEqual({ order: 3, limit: 3.4, capA: 2.3, basis: 'milliampere-per-watt' });
    expect(entry(17)?.limit).toBeCloseTo(0.226471, 6);
    expect(entry(17)?.capA).toBeCloseTo(0.132353, 6);
    expect(entry(5)).toEqual({ order: 5, limit: 10, basis: 'percent-of-fundamental' });
    expect(entry(7)).toMatchObject({ basis: 'percent-of-reference', referenceParameter: 'ilA' });
    expect(entry(9)).toMatchObject({ limit: 250, basis: 'absolute', unit: 'mA' });
    expect(entry(11)?.limit).toBe(2.5);
    expect(totals).toEqual([
      { name: 'THD', limit: 8, maxOrder: 40 },
      { name: 'TDD', limit: 5, maxOrder: 40 },
    ]);
  });

  it.each([
    ['3;1;A\n5;x;A', 2, 3, /not understood/],
    ['3;1;A\n15-39 odd: 0.15*;A', 2, 17, /missing at the end/],
    ['3;1;furlong', 1, 5, /not a unit of limits/],
    ['3;1;A\n2-4;2;A', 2, 1, /Order 3 stands in line 1 already/],
    ['3;0;A', 1, 3, /not a number above zero/],
    ['15-39 odd;20-n;A', 1, 11, /above zero at order 21/],
    ['1;2;A', 1, 1, /from 2 to 200/],
    ['9-3;2;A', 1, 1, /backwards/],
    ['4-4 odd;2;A', 1, 1, /no odd order/],
    ['3;1;A;2', 1, 7, /Only limits in mA\/W/],
    ['3', 1, 1, /limit is missing/],
    ['THD;8;%;1', 1, 9, /from 2 to 200/],
    ['words only', 1, 1, /no order with a limit/],
  ])('%j is refused in line %i, column %i', (text, line, column, message) => {
    const [problem] = problemsOf(text) ?? [];
    expect(problem).toMatchObject({ line, column });
    expect(problem?.message).toMatch(message);
  });

  it('lists every problem and takes nothing then', () => {
    const table = parseLimitTable('3;1;A\n5;x;A\n7;y;A');
    expect(table.problems?.map(({ line }) => line)).toEqual([2, 3]);
    expect(table.orders).toBeNull();
  });
});

// RFC 4180 for the form of the text; what is read back must be what was written.
describe('a table written out', () => {
  const tables = publishedLimitSets.flatMap((set) => {
    const rows = limitRows(set);
    return rows.length === 0 ? [set] : rows.map((row) => row.set);
  });

  it('of every published set reads back to the same orders, formulas, caps and totals', () => {
    expect(tables.length).toBeGreaterThan(publishedLimitSets.length);
    for (const set of tables) {
      const { orders, totals } = readByOwn(good(limitTableText(set)), readingOf(set));
      // Where the formula is a sentence ("25 % of …"), the number is written in its place.
      const kept = set.orders.map(({ formula, ...entry }) =>
        formula === undefined || formula.includes(' of ') ? entry : { ...entry, formula },
      );
      expect({ orders, totals }, set.title).toEqual({ orders: kept, totals: set.totals });
    }
  });

  it('names its set, edition and source, and puts equal limits into ranges', () => {
    const lines = limitTableText(classA).split('\r\n');
    expect(lines[0]).toBe('# IEC 61000-3-2, class A, version 1');
    expect(lines.filter((line) => line.startsWith('# Source: ')).length).toBe(classA.source.length);
    expect(lines.slice(-8)).toEqual([
      ...['6,0.3,A,', '7,0.77,A,', '8-40 even,0.23*8/n,A,', '9,0.4,A,', '11,0.33,A,', '13,0.21,A,'],
      ...['15-39 odd,0.15*15/n,A,', ''],
    ]);
  });

  it('keeps units of single entries, and drops those that the set says', () => {
    const text = '3;10;%\n5;4;% IL\n7;250;mA\n9;3;%\n11;2;%\nTHC;5;%';
    const { orders, totals } = good(text);
    const reading = commonReading(orders);
    expect(reading).toEqual({ basis: 'percent-of-fundamental', unit: '%', referenceParameter: null });
    const own = readByOwn({ orders, totals }, reading!);
    expect(own.orders.map(({ basis }) => basis)).toEqual([
      ...[undefined, 'percent-of-reference', 'absolute', undefined, undefined],
    ]);
    expect(own.totals).toEqual([{ name: 'THC', limit: 5, maxOrder: 40 }]);
    const again = parseLimitRows(limitTableRows({ ...reading!, ...own }));
    expect(readByOwn(again.problems === null ? again : own, reading!)).toMatchObject(own);
  });

  it('reads a power factor that multiplies a limit (edition 4 of class C: 30 times lambda)', () => {
    expect(good('3;30*lambda;%').orders).toEqual([
      {
        ...{ order: 3, limit: 30, timesParameter: 'powerFactor', basis: 'percent-of-fundamental' },
        formula: '30*lambda',
      },
    ]);
  });

  it('names row and cell of rows that were typed', () => {
    const { problems } = parseLimitRows([
      ['3', '2,30', 'A', ''],
      ['x', '1', '', ''],
      ['5', '', '', ''],
    ]);
    expect(problems).toMatchObject([
      { line: 2, cell: 0, message: expect.stringMatching(/not an order; give 3/) },
      { line: 3, cell: 1, message: expect.stringMatching(/missing: give a number/) },
    ]);
  });
});

describe('a custom set of mixed limits', () => {
  const { orders } = good('3;10;%\n5;4;% IL\n7;250;mA\n9;1;mA/W;0.05');
  const set: LimitSet = { ...classA, id: 'x', procedure: 'plain', applicability: [], orders };

  it('needs the parameters of its entries', () => {
    expect(neededParameters(set)).toEqual(['ilA', 'powerW']);
  });

  it('gives each order its own reference: I1 = 2 A, IL = 5 A, 100 W', () => {
    const evaluation = judge(set, measured({ 1: 2 }), { ilA: 5, powerW: 100 });
    const limits = [3, 5, 7, 9].map((order) => orderOf(evaluation, order).limit ?? NaN);
    [0.2, 0.2, 0.25, 0.05].forEach((limit, i) => expect(limits[i]).toBeCloseTo(limit, 12));
  });
});

describe('a clone of a published set', () => {
  const asSet = (source: LimitSet): LimitSet => {
    const { source: from, ...input } = createLimitSetSchema.parse(cloneLimitSet(source));
    return {
      ...{ ...source, referenceParameter: null },
      ...{ ...input, id: 'clone', source: [from], procedure: input.procedure ?? 'plain' },
    };
  };

  it('of every set can be created and keeps what it judges by', () => {
    for (const set of publishedLimitSets) {
      const { id, source, title, ...kept } = set;
      expect(asSet(set), id).toMatchObject({ ...kept, edition: kept.edition.slice(0, 80) });
      expect(asSet(set).source[0]).toContain(id);
    }
  });

  it('judges as the original does', () => {
    const lamp = setOf('iec61000-3-2.classC.5to25W.ed5');
    const channel = measured({ 1: 0.2, 3: 0.035 });
    expect(judge(asSet(lamp), channel, { powerW: 10 })).toEqual(judge(lamp, channel, { powerW: 10 }));
    const context = { fundamentalRms: 1, parameters: { powerW: 600 } };
    expect(limitForOrder(asSet(classD), 5, context)).toBeCloseTo(1.14, 9);
  });
});
