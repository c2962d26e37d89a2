import { describe, expect, it } from 'vitest';
import { parsePastedLimits, pasteWords } from './paste-limits.js';

const pairs = (text: string) => parsePastedLimits(text).rows.map(({ order, limit }) => [order, limit]);

describe('limits pasted from a spreadsheet', () => {
  // IEC 61000-3-2, Table 1: 2.30 A at order 3, 1.14 A at order 5.
  it.each([
    ['tabs, as spreadsheets copy', '3\t2.30\n5\t1.14\n'],
    ['a heading and Windows line ends', 'Order\tLimit (A)\r\n3\t2.30\r\n5\t1.14'],
    ['semicolons and decimal commas', '3;2,30\n5;1,14'],
    ['spaces and decimal commas', '3 2,30\n5   1,14'],
    ['commas between columns', '3,2.30\n5,1.14'],
  ])('understands %s', (_, text) => {
    expect(pairs(text)).toEqual([
      ['3', '2.30'],
      ['5', '1.14'],
    ]);
  });

  it('spreads a range over its orders', () => {
    expect(pairs('15-17\t0.5')).toEqual([
      ['15', '0.5'],
      ['16', '0.5'],
      ['17', '0.5'],
    ]);
    expect(pairs('2 to 3\t1')).toEqual([
      ['2', '1'],
      ['3', '1'],
    ]);
  });

  it('names the line that it does not understand and keeps the others', () => {
    const { rows, problems } = parsePastedLimits('3\t2.3\nfive\t1.14\n7\tnone');
    expect(rows).toEqual([{ order: '3', limit: '2.3' }]);
    expect(problems).toEqual([
      { line: 2, message: '“five” is not an order' },
      { line: 3, message: '“none” is not a limit' },
    ]);
  });

  it('finds nothing in empty text', () => {
    expect(parsePastedLimits(' \n')).toEqual({ rows: [], problems: [] });
  });

  it('say how many lines are left out', () => {
    const words = (text: string) => pasteWords(parsePastedLimits(text));
    expect(words('')).toBe('Use these orders');
    expect(words('3\t2.30\n5\t1.14')).toBe('Use 2 orders in place of the rows');
    expect(words('3\t2.30\n5\tmuch\nseven\t1')).toBe('Use 1 order, leave out 2 lines');
  });
});
