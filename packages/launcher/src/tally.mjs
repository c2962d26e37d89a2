/** Counts of tests, and how they are read from the report of a test run. */

/** @typedef {{ passed: number, failed: number, skipped: number }} Tally */
/**
 * @typedef {object} VitestReport the part of vitest's JSON report that is counted
 * @property {{ status: string, name: string, assertionResults: { status: string }[] }[]} testResults
 */

/**
 * @param {Tally[]} tallies
 * @returns {Tally}
 */
export function sumTallies(tallies) {
  const sum = { passed: 0, failed: 0, skipped: 0 };
  for (const { passed, failed, skipped } of tallies) {
    sum.passed += passed;
    sum.failed += failed;
    sum.skipped += skipped;
  }
  return sum;
}

/**
 * Counts every test of a run. A file that failed without a failed test (it did not load, or its set-up
 * threw) counts as one failure, and so does a run that ended badly without saying where.
 * @param {VitestReport | undefined} report undefined when the run left none
 * @param {number} exitCode
 * @returns {Tally}
 */
export function tallyOfReport(report, exitCode) {
  const tally = { passed: 0, failed: 0, skipped: 0 };
  for (const file of report?.testResults ?? []) {
    const failedBefore = tally.failed;
    for (const { status } of file.assertionResults) {
      if (status === 'passed') tally.passed += 1;
      else if (status === 'failed') tally.failed += 1;
      else tally.skipped += 1;
    }
    if (file.status === 'failed' && tally.failed === failedBefore) tally.failed += 1;
  }
  if (tally.failed === 0 && (exitCode !== 0 || report === undefined)) tally.failed = 1;
  return tally;
}

/**
 * @param {Tally} tally
 * @returns {string} `N passed, N failed`, with the skipped ones when there are any
 */
export function tallyLine({ passed, failed, skipped }) {
  return `${passed} passed, ${failed} failed${skipped > 0 ? `, ${skipped} skipped` : ''}`;
}
