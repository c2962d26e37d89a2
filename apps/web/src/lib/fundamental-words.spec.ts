import type { ChannelAnalysis } from '@overtally/contracts';
import { describe, expect, it } from 'vitest';
import { fundamentalWords } from './fundamental-words.js';

const channel = (frequencyHz: number, frequencyUncertaintyHz: number | null) => ({
  fundamental: { frequencyHz, frequencyUncertaintyHz } as ChannelAnalysis['fundamental'],
});

describe('frequency of the fundamental in words', () => {
  it('states twice the standard deviation, and may break before the sign alone', () => {
    // Expanded uncertainty U = k u with k = 2 (JCGM 100:2008, 6.2.1), two digits at most (7.2.6).
    expect(fundamentalWords(channel(49.981, 0.0001))).toBe('49.98100 ±\u00a00.00020\u00a0Hz');
  });

  it('leaves the uncertainty out where it is unknown or below a millionth of the value', () => {
    expect(fundamentalWords(channel(49.981, 1e-6))).toBe('49.9810\u00a0Hz');
    expect(fundamentalWords(channel(49.981, null))).toBe('49.981\u00a0Hz');
    expect(fundamentalWords({ fundamental: null })).toBe('–');
  });
});
