import { describe, expect, it } from 'vitest';
import { sampleReport } from '../../testing/sample-verdicts.js';
import { sampleId } from '../../testing/samples.js';
import { issueHindrance } from './issue-hindrance.js';

const report = sampleReport('in-review', { submittedBy: { id: sampleId(3), name: 'Ole Moe' } });
const by = (personId: string, preparerMayIssue = false) => ({ personId, preparerMayIssue });

describe('why a manager cannot issue a report', () => {
  it('names who prepared and who submitted it, unless the project lets them', () => {
    expect(issueHindrance(report, by(report.preparedBy.id))).toMatch(/^You prepared .*another manager/);
    expect(issueHindrance(report, by(sampleId(3)))).toMatch(/^You submitted/);
    expect(issueHindrance(report, by(sampleId(3), true))).toBeNull();
    expect(issueHindrance(report, by(sampleId(4)))).toBeNull();
  });

  it('names a verdict that is outdated', () => {
    const message = 'R-0147 was read or scaled anew since this verdict; judge its newest analysis';
    const outdated = { code: 'verdict-outdated' as const, section: 0, message };
    expect(issueHindrance({ ...report, cautions: [outdated] }, by(sampleId(4), true))).toContain(message);
  });
});
