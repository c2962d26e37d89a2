import { describe, expect, it } from 'vitest';
import { formatToUncertainty, formatUncertainty, formatWithUncertainty } from './format-uncertainty.js';

/** Spaces and minus as they are read. */
const plain = (text: string) => text.replace(/[\u00a0\u202f]/g, ' ').replace('\u2212', '-');

describe('values with uncertainty (JCGM 100:2008, 7.2.6: two digits, both to the same place)', () => {
  it('matches the example of that clause, 100.021 47 g with 0.35 mg', () => {
    expect(plain(formatWithUncertainty(100.02147, 0.00035, 'g'))).toBe('100.02147 ± 0.00035 g');
  });

  it('does not print decimals of a coarse uncertainty', () => {
    expect(plain(formatWithUncertainty(230.4, 12, 'V'))).toBe('230 ± 12 V');
  });

  it('stand apart in columns, each with the prefix that suits it', () => {
    expect(plain(formatToUncertainty(1.19003, 0.00741, 'A'))).toBe('1.1900 A');
    expect(plain(formatUncertainty(0.00741, 'A'))).toBe('7.4 mA');
    expect(plain(formatToUncertainty(-128.131, 0.042, 'dB'))).toBe('-128.131 dB');
  });

  it('shows no more digits than a reader can use, however small the uncertainty', () => {
    expect(plain(formatToUncertainty(230.41234567, 1e-9, 'V'))).toBe('230.4123 V');
  });

  it('takes four digits and no uncertainty where none is known', () => {
    expect(plain(formatToUncertainty(1.19003, null, 'A'))).toBe('1.190 A');
    expect(plain(formatWithUncertainty(1.19003, 0, 'A'))).toBe('1.190 A');
    expect(formatUncertainty(null, 'A')).toBe('–');
  });
});
