/** Counting the tests of a run: nothing that failed may be lost. */
import { describe, expect, it } from 'vitest';
import { sumTallies, tallyLine, tallyOfReport } from '../src/tally.mjs';

const file = (status: string, ...tests: string[]) => ({
  name: 'a.spec.ts',
  status,
  assertionResults: tests.map((one) => ({ status: one })),
});

describe('tallyOfReport', () => {
  it('counts passed, failed and skipped tests', () => {
    const report = {
      testResults: [file('failed', 'passed', 'failed'), file('passed', 'passed', 'pending', 'skipped')],
    };
    expect(tallyOfReport(report, 1)).toEqual({ passed: 2, failed: 1, skipped: 2 });
  });

  it('counts a file that did not load', () => {
    expect(tallyOfReport({ testResults: [file('failed'), file('passed', 'passed')] }, 1)).toEqual({
      passed: 1,
      failed: 1,
      skipped: 0,
    });
  });

  it('counts a file whose set-up failed after tests that passed', () => {
    expect(tallyOfReport({ testResults: [file('failed', 'passed')] }, 1).failed).toBe(1);
  });

  it('counts a run without a report, and one that ended badly with none failed', () => {
    expect(tallyOfReport(undefined, 0).failed).toBe(1);
    expect(tallyOfReport({ testResults: [file('passed', 'passed')] }, 1)).toEqual({
      passed: 1,
      failed: 1,
      skipped: 0,
    });
  });
});

describe('tallyLine', () => {
  it('mentions skipped tests only when there are any', () => {
    const one = { passed: 3, failed: 1, skipped: 0 };
    expect(tallyLine(one)).toBe('3 passed, 1 failed');
    expect(tallyLine(sumTallies([one, { passed: 1, failed: 0, skipped: 2 }]))).toBe(
      '4 passed, 1 failed, 2 skipped',
    );
  });
});
