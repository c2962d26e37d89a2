import type { Flag } from '@overtally/contracts';
import { describe, expect, it } from 'vitest';
import { comparedWords, countWords } from './evidence-words.js';
import { flagsAt } from './flag-words.js';

const plain = (text: string | null) => text?.replaceAll('\u00a0', ' ') ?? null;

describe('evidence of a flag', () => {
  it('says what was compared with what, in the unit of both', () => {
    const words = (value: number | null, limit: number | null, unit: string | null) =>
      plain(comparedWords({ value, limit, unit }));
    expect(words(0.0184, 0.002, 'A')).toBe('18.4 mA against 2.00 mA');
    expect(words(84.2, 90, '%')).toBe('84.2 % against 90.0 %');
    expect(words(14, 3, 'samples')).toBe('14 samples against 3 samples');
    expect(words(7.5, 10, 'cycles')).toBe('7.50 cycles against 10 cycles');
    expect(words(null, 3, 'A')).toBeNull();
  });

  it('counts only what has places in the record', () => {
    expect(countWords({ count: 37, timesS: [1.2] })).toBe('37 times');
    expect(countWords({ count: 1, timesS: [1.2] })).toBe('once');
    expect(countWords({ count: 1, timesS: [] })).toBeNull();
  });
});

describe('flags beside their figures', () => {
  const flag = (code: string) => ({ code }) as Flag;
  const flags = [flag('clipped'), flag('near-nyquist'), flag('frequency-drift'), flag('never-heard-of')];
  const codes = (place: 'waveform' | 'spectrum' | 'windows', hasWindows: boolean) =>
    flagsAt(flags, place, hasWindows).map(({ code }) => code);

  it('stand where what they speak of is drawn; what is not known stands at the waveform', () => {
    expect(codes('waveform', true)).toEqual(['clipped', 'never-heard-of']);
    expect(codes('spectrum', true)).toEqual(['near-nyquist']);
    expect(codes('windows', true)).toEqual(['frequency-drift']);
  });

  it('none is lost where there are no windows', () => {
    expect(codes('waveform', false)).toEqual(['clipped', 'frequency-drift', 'never-heard-of']);
  });
});
