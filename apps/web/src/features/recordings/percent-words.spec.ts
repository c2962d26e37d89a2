import { describe, expect, it } from 'vitest';
import { percentWords } from './percent-words.js';

describe('percentages of the sheet', () => {
  it('keep significant digits below a tenth of a percent', () => {
    expect(percentWords(0.005123)).toBe('0.00512\u00a0%');
    expect(percentWords(0.0512, 2)).toBe('0.0512\u00a0%');
  });

  it('name a bound below one part in a million', () => {
    expect(percentWords(2e-14, 2)).toBe('<\u00a00.0001\u00a0%');
  });

  it('keep their decimals elsewhere', () => {
    expect(percentWords(0.1234, 2)).toBe('0.12\u00a0%');
    expect(percentWords(53.742)).toBe('53.7\u00a0%');
    expect(percentWords(0, 2)).toBe('0.00\u00a0%');
    expect(percentWords(null)).toBe('–');
  });
});
