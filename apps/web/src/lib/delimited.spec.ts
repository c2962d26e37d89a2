import { expect, it } from 'vitest';
import { toCsv, toTsv } from './delimited.js';

it('quotes as RFC 4180, 2.5 to 2.7 says: commas, line breaks, doubled quotes', () => {
  expect(toCsv([['a,b', 'say "so"', 'two\nlines']])).toBe('"a,b","say ""so""","two\nlines"\r\n');
});

it('keeps all digits of numbers and leaves what is absent empty', () => {
  expect(
    toCsv([
      ['order', 'rms (A)'],
      [3, 0.1 + 0.2],
      [5, null],
    ]),
  ).toBe('order,rms (A)\r\n3,0.30000000000000004\r\n5,\r\n');
});

it('does not hand formulas to a spreadsheet, and lets negative numbers be numbers', () => {
  expect(toCsv([['=1+1', -2.5]])).toBe("'=1+1,-2.5\r\n");
});

it('keeps one row on one line on the clipboard', () => {
  expect(
    toTsv([
      ['a\tb', 'c\nd'],
      [1, null],
    ]),
  ).toBe('a b\tc d\n1\t');
});
