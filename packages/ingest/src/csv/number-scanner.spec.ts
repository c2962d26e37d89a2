import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { NOT_PLAIN, NumberScanner, SCANNED } from './number-scanner.js';

const bytes = (text: string) => new TextEncoder().encode(text);

function scan(text: string, decimal = '.'): number | null {
  const scanner = new NumberScanner(decimal.charCodeAt(0));
  const input = bytes(text);
  return scanner.scan(input, 0, input.length) === SCANNED && scanner.next === input.length
    ? scanner.value
    : null;
}

// Independent reference: Number(), whose result ECMA-262 defines as the correctly rounded value.
describe('number scanner', () => {
  it.each([
    '0',
    '-0',
    '+1',
    '007',
    '.5',
    '5.',
    '-12.3456789',
    '1e3',
    '1E-3',
    '2.5e+10',
    '9007199254740991',
    '1e22',
  ])('reads %s as Number does', (text) => {
    expect(scan(text)).toBe(Number(text));
  });

  it('gives exactly the double nearest to any plain decimal', () => {
    const decimals = fc.tuple(
      fc.maxSafeInteger(),
      fc.integer({ min: 0, max: 20 }),
      fc.integer({ min: -40, max: 40 }),
    );
    fc.assert(
      fc.property(decimals, ([mantissa, point, exponent]) => {
        const digits = String(Math.abs(mantissa)).padStart(point + 1, '0');
        const text = `${mantissa < 0 ? '-' : ''}${digits.slice(0, digits.length - point)}.${digits.slice(digits.length - point)}e${exponent}`;
        const value = scan(text);
        return value === null || Object.is(value, Number(text));
      }),
      { seed: 1, numRuns: 3000 },
    );
  });

  it.each(['', '-', '.', 'e5', '1e', '1e+', '12345678901234567890', '1e23', '1e-400', 'NaN'])(
    'leaves "%s" to the caller',
    (text) => {
      const input = bytes(text);
      expect(new NumberScanner(46).scan(input, 0, input.length)).toBe(NOT_PLAIN);
    },
  );

  it('reads a decimal comma, but not a comma without digits behind it', () => {
    expect(scan('-2,434269', ',')).toBe(-2.434269);
    expect(scan('2,', ',')).toBeNull();
    expect(scan('2.5', ',')).toBeNull();
  });
});
