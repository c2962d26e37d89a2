import { fitsPattern } from '@overtally/contracts';
import { describe, expect, it } from 'vitest';
import { suggestName, suggestPattern } from './file-name-pattern.js';

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
});
