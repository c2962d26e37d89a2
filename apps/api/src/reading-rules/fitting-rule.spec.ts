import { describe, expect, it } from 'vitest';
import { fittingRule, inOrder } from './fitting-rule.js';

const rule = (id: string, fileNamePattern: string, columnNames: string[] | null = null, day = 1) => ({
  id,
  fileNamePattern,
  columnNames,
  createdAt: new Date(Date.UTC(2026, 0, day)),
  options: {},
});

const ids = (rules: { id: string }[]) => rules.map(({ id }) => id);

describe('the order of reading rules', () => {
  it('is by columns, then by the length of the pattern, then by age', () => {
    const rules = [
      rule('any', '*'),
      rule('older', '*.csv', null, 2),
      rule('newer', '?.csv', null, 3),
      rule('long', 'bench-*.csv'),
      rule('columns', '*', ['t', 'u']),
    ];
    expect(ids(inOrder(rules))).toEqual(['columns', 'long', 'newer', 'older', 'any']);
    expect(ids(rules)[0]).toBe('any');
  });
});

describe('the rule that fits a file', () => {
  const columns = () => Promise.resolve(['t', 'u']);

  it('is the first in order whose pattern and columns fit', async () => {
    const rules = [
      rule('other columns', 'bench-*.csv', ['u', 't']),
      rule('fewer', 'bench-*.csv', ['t']),
      rule('pattern', 'bench-*.csv'),
      rule('columns', '*.csv', ['t', 'u']),
    ];
    const found = async (tried: typeof rules, fileName: string) =>
      (await fittingRule(tried, fileName, columns))?.id;
    expect(await found(rules, 'bench-1.csv')).toBe('columns');
    expect(await found(rules.slice(0, 3), 'bench-1.csv')).toBe('pattern');
    expect(await found(rules, 'bench-1.wav')).toBeUndefined();
  });

  it('looks at the columns as they are under the options of the rule, and only where it must', async () => {
    const asked: object[] = [];
    const options = { delimiter: ';' as const };
    const rules = [{ ...rule('semicolon', '*.csv', ['a', 'b']), options }, rule('name', '*.wav', ['a'])];
    const found = await fittingRule(rules, 'x.csv', (given) => {
      asked.push(given);
      return Promise.resolve(given.delimiter === ';' ? ['a', 'b'] : ['a;b']);
    });
    expect(found?.id).toBe('semicolon');
    expect(asked).toEqual([options]);
  });
});
