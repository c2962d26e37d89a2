import { describe, expect, it } from 'vitest';
import { better, classify, describeDecision, worst } from './decision.js';

describe('classify', () => {
  // ILAC-G8:09/2019, figures 3 to 5: limit TL = 10, expanded uncertainty U = 10 % of the value, w = U.
  // A value v passes with guard when 1.1 v <= 10 (v <= 9.0909) and fails for certain when 0.9 v > 10 (v > 11.111).
  const limit = 10;
  const cases = [
    { value: 5, simple: 'pass', guarded: 'pass', nonBinary: 'pass' },
    { value: 9.09, simple: 'pass', guarded: 'pass', nonBinary: 'pass' },
    { value: 9.1, simple: 'pass', guarded: 'fail', nonBinary: 'conditional-pass' },
    { value: 10, simple: 'pass', guarded: 'fail', nonBinary: 'conditional-pass' },
    { value: 10.01, simple: 'fail', guarded: 'fail', nonBinary: 'conditional-fail' },
    { value: 11.11, simple: 'fail', guarded: 'fail', nonBinary: 'conditional-fail' },
    { value: 11.12, simple: 'fail', guarded: 'fail', nonBinary: 'fail' },
  ] as const;

  it.each(cases)('puts $value against 10 in the zone that the rule gives', (expected) => {
    const by = (rule: 'simple-acceptance' | 'guarded-acceptance' | 'non-binary') =>
      classify(expected.value, limit, { rule, uncertaintyPercent: 10 });
    expect(by('simple-acceptance')).toBe(expected.simple);
    expect(by('guarded-acceptance')).toBe(expected.guarded);
    expect(by('non-binary')).toBe(expected.nonBinary);
  });

  it('passes a value exactly at its limit in spite of binary rounding: 0.1 + 0.2 against 0.3', () => {
    expect(classify(0.1 + 0.2, 0.3, { rule: 'simple-acceptance', uncertaintyPercent: null })).toBe('pass');
  });

  it('with an uncertainty of zero guarded acceptance is simple acceptance', () => {
    const exact = { rule: 'guarded-acceptance', uncertaintyPercent: 0 } as const;
    expect(classify(10, 10, exact)).toBe('pass');
    expect(classify(10.01, 10, exact)).toBe('fail');
  });

  it.each(['guarded-acceptance', 'non-binary'] as const)(
    '%s is not decidable without uncertainty',
    (rule) => {
      expect(classify(1, 10, { rule, uncertaintyPercent: null })).toBe('not-decidable');
    },
  );
});

describe('worst and better', () => {
  it('rank fail, conditional-fail, not-decidable, conditional-pass, pass', () => {
    expect(worst(['pass', 'conditional-pass', 'not-decidable', 'conditional-fail', 'fail'])).toBe('fail');
    expect(worst(['pass', 'conditional-pass', 'not-decidable', 'conditional-fail'])).toBe('conditional-fail');
    expect(worst(['pass', 'conditional-pass', 'not-decidable'])).toBe('not-decidable');
    expect(worst(['pass', 'conditional-pass'])).toBe('conditional-pass');
    expect(better('fail', 'not-decidable')).toBe('not-decidable');
  });

  it('leave disregarded and not-applicable out', () => {
    expect(worst(['disregarded', 'not-applicable'])).toBe('pass');
  });
});

describe('describeDecision', () => {
  it('names the clause and the uncertainty', () => {
    const text = describeDecision({ rule: 'guarded-acceptance', uncertaintyPercent: 2.5 });
    expect(text).toContain('ILAC-G8:09/2019, 4.2.2');
    expect(text).toContain('2.5 % of the value');
    expect(describeDecision({ rule: 'non-binary', uncertaintyPercent: null })).toContain('was not stated');
  });
});
