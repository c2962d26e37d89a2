import { describe, expect, it } from 'vitest';
import {
  formatCount,
  formatFigure,
  formatList,
  formatMoment,
  formatPercent,
  formatQuantity,
  formatShare,
  formatTick,
  noteLetter,
} from './format.js';

/** No-break spaces stand between number and unit; plain ones read better in the expectations. */
const spaced = (text: string): string => text.replaceAll('\u00a0', ' ');

/** Prefixes and their spelling: SI Brochure, 9th edition, table 7; digit groups: ISO 80000-1:2022, 7.3.1. */
describe('figures in a report', () => {
  it.each([
    [0.17, 'A', '170.0 mA'],
    [2.3, 'A', '2.300 A'],
    [229.8671, 'V', '229.9 V'],
    [1.23e-6, 'A', '1.230 µA'],
    [50_000, 'Hz', '50.00 kHz'],
    [999.96, 'V', '1.000 kV'],
    [0.9999996, 'A', '1.000 A'],
    [1000, 'W', '1.000 kW'],
    [-0.0125, 'V', '−12.50 mV'],
    [12.5, 'mV', '12.50 mV'],
    [-3, 'dB', '−3.000 dB'],
    [0, 'A', '0 A'],
    [0.5, '', '0.5000'],
    [1.5e-15, 'A', '0.001500 pA'],
    [null, 'A', '–'],
  ])('prints %s %s as %s', (value, unit, expected) => {
    expect(spaced(formatQuantity(value, unit))).toBe(expected);
  });

  it('drops empty decimals on an axis only', () => {
    expect([1, 0.1, 0.025, 1000, 10].map((value) => spaced(formatTick(value, 'A')))).toEqual([
      '1 A',
      '100 mA',
      '25 mA',
      '1 kA',
      '10 A',
    ]);
  });

  it('never rounds a share that is over a limit down to the limit', () => {
    expect([113.42, 100.004, 99.96, 100, null].map((value) => spaced(formatShare(value)))).toEqual([
      '113.4 %',
      '100.004 %',
      '99.96 %',
      '100.0 %',
      '–',
    ]);
  });

  it('says below the last place instead of printing zero', () => {
    expect([0.0012, 0, 53.741, null].map((value) => spaced(formatPercent(value)))).toEqual([
      '< 0.01 %',
      '0.00 %',
      '53.74 %',
      '–',
    ]);
  });

  it('groups counts, names moments in UTC and letters notes', () => {
    expect(spaced(formatCount(1_500_000))).toBe('1 500 000');
    expect(formatFigure(null)).toBe('–');
    expect(formatMoment('2026-11-26T14:20:31.000Z')).toBe('26 Nov 2026, 14:20 UTC');
    expect(formatMoment('2026-11-26T23:30:00+02:00')).toBe('26 Nov 2026, 21:30 UTC');
    expect([0, 25, 26, 27, 52].map(noteLetter)).toEqual(['a', 'z', 'aa', 'ab', 'ba']);
    expect(formatList([15, 19, 21, 23], 3)).toBe('15, 19, 21 and 1 more');
    expect(formatList([15, 19])).toBe('15 and 19');
  });
});
