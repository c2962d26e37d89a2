import { describe, expect, it } from 'vitest';
import { parseQuantity, type ComponentUnit } from './parse-quantity.js';

describe('parseQuantity', () => {
  it.each<[string, ComponentUnit, number]>([
    // SI Brochure, 9th edition, table 7.
    ['4.7 mH', 'H', 0.0047],
    ['4,7mH', 'H', 0.0047],
    ['100n', 'F', 1e-7],
    ['10 µF', 'F', 1e-5],
    ['10 μF', 'F', 1e-5],
    ['22 uF', 'F', 22e-6],
    ['1e-6 F', 'F', 1e-6],
    ['1.5E3', 'Hz', 1500],
    ['2.2 kΩ', 'Ω', 2200],
    ['2.2\u00a0k\u2126', 'Ω', 2200],
    ['3 MOhm', 'Ω', 3e6],
    ['50 kvar', 'var', 50_000],
    ['.5', 's', 0.5],
    ['\u22123 V', 'V', -3],
    ['4 %', '%', 4],
    // IEC 60062:2016, tables of letters that replace the decimal mark.
    ['R33', 'Ω', 0.33],
    ['3R3', 'Ω', 3.3],
    ['33R2', 'Ω', 33.2],
    ['1K5', 'Ω', 1500],
    ['2k2', 'Ω', 2200],
    ['3M32', 'Ω', 3.32e6],
    ['1L5', 'Ω', 0.0015],
    ['p33', 'F', 0.33e-12],
    ['3n32', 'F', 3.32e-9],
    ['4m7', 'F', 4.7e-3],
    ['1µ5 F', 'F', 1.5e-6],
  ])('reads %s as %s', (text, unit, value) => {
    expect(parseQuantity(text, unit)).toBe(value);
  });

  it.each<[string, ComponentUnit, RegExp]>([
    ['', 'H', /empty; write it like 4\.7 mH/],
    ['about 3', 'H', /does not begin with a number/],
    ['10 µF', 'H', /unit F at character 4, but H is expected/],
    ['3 xH', 'H', /"xH" in "3 xH" at character 3 is no prefix/],
    ['4m7', 'H', /letter for the decimal mark at character 2.*resistance and capacitance only/],
    ['1.000.000', 'Hz', /at character 6: leave out separators of thousands/],
    ['1 000', 'Hz', /at character 3: leave out separators/],
    ['4,700 mH', 'H', /two ways; write 4700 or 4\.700/],
    ['5 k', '%', /k/],
    ['NaN', 'F', /does not begin with a number/],
  ])('refuses %s for %s with place and cure', (text, unit, message) => {
    expect(() => parseQuantity(text, unit)).toThrow(message);
  });
});
