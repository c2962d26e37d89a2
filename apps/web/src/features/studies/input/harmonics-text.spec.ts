import { describe, expect, it } from 'vitest';
import { harmonicsText, readHarmonics } from './harmonics-text.js';

const read = (text: string, change: Partial<Parameters<typeof readHarmonics>[0]> = {}) =>
  readHarmonics({ text, amounts: 'rms', frequencyHz: 50, fundamentalRms: 10, ...change });

describe('harmonics as they are typed', () => {
  it('reads order, amount and phase by spaces, tabs, semicolons and commas, with either decimal mark', () => {
    const expected = [
      { order: 1, rms: 10, phaseDeg: null },
      { order: 5, rms: 2.5, phaseDeg: -120 },
    ];
    for (const text of [
      '1 10\n5 2.5 -120',
      '1\t10\n5\t2,5\t−120',
      '1;10;\n5;2,5;-120°',
      '1, 10\n5, 2.5, -120',
      'Order Amount Phase\n# bridge\n\n5 2,5 -120\n1 10',
    ]) {
      expect(read(text).series?.components, text).toEqual(expected);
    }
  });

  it('takes percent of order 1, and order 0 as DC with its sign', () => {
    const { series } = read('0 -1\n1 100\n3 30 %', { amounts: 'percent' });
    expect(series?.dc).toBeCloseTo(-0.1, 12);
    expect(series?.components.map(({ rms }) => rms)).toEqual([10, 3]);
  });

  it.each([
    ['1 10\n5 x', /Line 2: “x” is no number/],
    ['1 10\n5 1\n5 2', /Line 3: order 5 stands in line 2 too/],
    ['1.5 10', /Line 1: the order is “1.5”/],
    ['1 10\n7', /Line 2: order 7 has no amount/],
    ['1 -10', /amount of order 1 is negative; turn its phase by 180°/],
    ['1 2 3 4', /has 4 columns/],
    ['# nothing', /at least one order/],
  ])('refuses %j and names the place', (text, problem) => {
    expect(read(text).problem).toMatch(problem);
  });

  it('refuses percent without an order 1 to refer to', () => {
    expect(read('1 100', { amounts: 'percent', fundamentalRms: 0 }).problem).toMatch(/rms of order 1/);
  });

  it('writes text that reads back', () => {
    const { series } = read('0 0.25\n1 10 -90\n5 2.123456\n49 0.001 179.5');
    expect(read(harmonicsText(series!)).series).toEqual(series);
  });
});
