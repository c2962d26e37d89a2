import { describe, expect, it } from 'vitest';
import { fitsPattern, suggestName, suggestPattern } from './file-name-pattern.js';

describe('pattern of file names', () => {
  it.each([
    ['bench-07.csv', 'bench-*.csv'],
    ['2026-11-26 scope 12.csv', '* scope *.csv'],
    ['mains400_001_ref.wav', 'mains*_ref.wav'],
    ['bench-square.csv', 'bench-*.csv'],
    ['capture.csv', 'capture*.csv'],
    ['no-ending', 'no-*'],
  ])('suggests for %s %s, which fits it', (fileName, pattern) => {
    expect(suggestPattern(fileName)).toBe(pattern);
    expect(fitsPattern(pattern, fileName)).toBe(true);
  });

  it('names a rule after it', () => {
    expect(suggestName('bench-*.csv')).toBe('bench, CSV');
    expect(suggestName('*.wav')).toBe('WAV');
  });

  it('takes * for any text, ? for one character, all else as it stands', () => {
    expect(fitsPattern('BENCH-?.csv', 'bench-7.CSV')).toBe(true);
    expect(fitsPattern('bench-?.csv', 'bench-07.csv')).toBe(false);
    expect(fitsPattern('a.csv', 'abcsv')).toBe(false);
    expect(fitsPattern('u(1)*.csv', 'u(1) b.csv')).toBe(true);
  });
});
