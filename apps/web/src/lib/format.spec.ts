import { describe, expect, it } from 'vitest';
import {
  formatBytes,
  formatCount,
  formatDb,
  formatDuration,
  formatFixed,
  formatHz,
  formatPercent,
  formatSha256,
  formatSi,
} from './format.js';

/** Spaces as they are read; the no-break kinds are checked on their own below. */
const plain = (text: string) => text.replace(/[\u00a0\u202f]/g, ' ').replace('\u2212', '-');

describe('quantities with SI prefixes (SI brochure, 9th ed., table 7)', () => {
  it.each([
    [2.644, 'A', undefined, '2.644 A'],
    [0.3967, 'A', undefined, '396.7 mA'],
    [50_000, 'Hz', { trim: true }, '50 kHz'],
    [44_100, 'Hz', { trim: true }, '44.1 kHz'],
    [-0.00000215, 'V', { digits: 3 }, '-2.15 µV'],
    [1.3e-7, 'V/√Hz', { digits: 2 }, '130 nV/√Hz'],
    [4.7e-12, 'F', { digits: 2 }, '4.7 pF'],
    [0, 'A', undefined, '0 A'],
    [0.99996, 'A', undefined, '1.000 A'],
    [999.96, 'A', undefined, '1.000 kA'],
    [100, 'Hz', { trim: true }, '100 Hz'],
  ])('%s %s', (value, unit, options, shown) => {
    expect(plain(formatSi(value, unit, options))).toBe(shown);
  });

  it('puts no second prefix before a unit that has one, nor before % and dB', () => {
    expect(plain(formatSi(1500, 'mV'))).toBe('1500 mV');
    expect(plain(formatSi(0.0412, '%'))).toBe('0.04120 %');
  });

  it('keeps number and unit on one line and writes a true minus', () => {
    expect(formatSi(-1, 'A', { digits: 2 })).toBe('\u22121.0\u00a0A');
  });
});

describe('figures that do not apply', () => {
  it.each([
    formatSi(null, 'A'),
    formatPercent(null),
    formatDb(undefined),
    formatHz(Number.NaN),
    formatCount(null),
  ])('are a dash, never 0', (shown) => expect(shown).toBe('–'));
});

describe('fixed decimals', () => {
  it('shows percent, decibels, hertz and degrees', () => {
    expect(plain(formatPercent(53.742))).toBe('53.7 %');
    expect(plain(formatDb(-60.25, 2))).toBe('-60.25 dB');
    expect(plain(formatHz(49.98123))).toBe('49.981 Hz');
    expect(plain(formatFixed(-128.13, 1, '°'))).toBe('-128.1°');
  });

  it('has no minus before a rounded zero', () => {
    expect(formatFixed(-0.001, 1, '°')).toBe('0.0°');
  });
});

describe('counts, times, sizes', () => {
  it('groups digits in threes from five digits on', () => {
    expect(formatCount(1500)).toBe('1500');
    expect(formatCount(1_500_000)).toBe('1\u202f500\u202f000');
  });

  it.each([
    [0.08, '80.0 ms'],
    [30, '30.0 s'],
    [725, '12 min 05 s'],
    [7500, '2 h 05 min'],
  ])('%s s', (value, shown) => {
    expect(plain(formatDuration(value))).toBe(shown);
  });

  it.each([
    [812, '812 B'],
    [96_000_000, '96.0 MB'],
    [1_240, '1.24 kB'],
  ])('%s bytes', (value, shown) => {
    expect(plain(formatBytes(value))).toBe(shown);
  });

  it('shortens a SHA-256 (of the empty message, FIPS 180-4 example data)', () => {
    const sha256 = 'e3b0c44298fc1c149afbf4c8996fb92427ae41e4649b934ca495991b7852b855';
    expect(formatSha256(sha256)).toBe('e3b0 c442 … b855');
  });
});
