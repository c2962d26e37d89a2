import type { Report } from '@overtally/contracts';

interface Issuer {
  personId: string;
  /** The rule of the project. */
  preparerMayIssue: boolean;
}

/** Why this manager cannot issue the report, with the cure; null where nothing hinders. */
export function issueHindrance(
  { preparedBy, submittedBy, cautions }: Pick<Report, 'preparedBy' | 'submittedBy' | 'cautions'>,
  { personId, preparerMayIssue }: Issuer,
): string | null {
  const outdated = cautions.find(({ code }) => code === 'verdict-outdated');
  if (outdated) return `${outdated.message}: return the report for that.`;
  if (preparerMayIssue) return null;
  const cure =
    'so another manager issues it. The project settings can let one person prepare and issue a report.';
  if (preparedBy.id === personId) return `You prepared this report, ${cure}`;
  if (submittedBy?.id === personId) return `You submitted this report, ${cure}`;
  return null;
}
