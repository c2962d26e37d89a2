import { matchesGlob } from 'node:path';
import { describe, expect, it } from 'vitest';
import { fitsPattern, literalLength } from './file-name-pattern.js';

describe('a file name pattern', () => {
  it.each([
    ['bench-*.csv', 'bench-07.csv', true],
    ['bench-*.csv', 'BENCH-.CSV', true],
    ['bench-*.csv', 'bench-07.csv.bak', false],
    ['run?.wav', 'run7.wav', true],
    ['run?.wav', 'run.wav', false],
    ['run?.wav', 'run10.wav', false],
    ['*', '', true],
    ['?', '\u{1F50C}', true],
    ['(a|b)+[0-9].csv', '(A|B)+[0-9].csv', true],
    ['(a|b)+[0-9].csv', 'a1.csv', false],
    ['.*', 'x.csv', false],
    ['motor*.csv', 'day 1/motor 2.csv', true],
    ['motor*.csv', 'day 1\\motor 2.csv', true],
    ['day*.csv', 'day 1/motor.csv', false],
  ])('%s on %s: %s', (pattern, fileName, fits) => {
    expect(fitsPattern(pattern, fileName)).toBe(fits);
  });

  // Node.js has a matcher of its own, whose other signs these names and patterns do not hold.
  it('agrees with the matcher of Node.js on every short pattern and name', () => {
    const texts = (signs: string[]) =>
      [1, 2, 3, 4].reduce<string[]>(
        (all, _) => [...new Set([...all, ...all.flatMap((text) => signs.map((sign) => text + sign))])],
        ['x'],
      );
    const names = texts(['a', 'b']);
    const patterns = texts(['a', '?', '*']).filter((pattern) => !pattern.includes('**'));
    const differing = patterns.flatMap((pattern) =>
      names.filter((name) => fitsPattern(pattern, name) !== matchesGlob(name, pattern)),
    );
    expect(patterns.length * names.length).toBeGreaterThan(1000);
    expect(differing).toEqual([]);
  });

  it('answers at once however many stars there are', () => {
    const began = performance.now();
    expect(fitsPattern(`${'*a'.repeat(99)}b`, 'a'.repeat(255))).toBe(false);
    expect(performance.now() - began).toBeLessThan(100);
  });

  it('counts the characters that stand for themselves', () => {
    expect(literalLength('a*b?.csv')).toBe(6);
  });
});
