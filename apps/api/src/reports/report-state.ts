import {
  reportStatusSchema,
  type ProjectRole,
  type ReportStatus,
  type VerdictResult,
} from '@overtally/contracts';
import { problem } from '../common/problem.js';

/** What can be done with a report in a state. */
export type ReportAction = 'change' | 'delete' | 'submit' | 'withdraw' | 'return' | 'issue' | 'revise';

const possible: Record<ReportStatus, readonly ReportAction[]> = {
  draft: ['change', 'delete', 'submit'],
  'in-review': ['withdraw', 'return', 'issue'],
  issued: ['revise'],
  superseded: [],
};

const statusWords: Record<ReportStatus, string> = {
  draft: 'a draft',
  'in-review': 'in review',
  issued: 'issued',
  superseded: 'superseded',
};

const sentence: Record<ReportStatus, string> = {
  draft: 'it can be changed, deleted or submitted for review',
  'in-review': 'its preparer can withdraw it, a manager can return or issue it',
  issued: 'it can only be read, or replaced by a new revision',
  superseded: 'it can only be read; the revision that replaced it is the one to go on from',
};

/** @throws a 409 problem that says what is possible when the report's state does not allow the action */
export function requireAction(status: ReportStatus, action: ReportAction): void {
  if (possible[status].includes(action)) return;
  const detail = `The report is ${statusWords[status]}: ${sentence[status]}`;
  throw problem(409, 'wrong-state', detail);
}

/** States in which a report is frozen. */
export const settled: readonly ReportStatus[] = ['issued', 'superseded'];

/** States in which a person sees a report: guests read for the customer and see what was issued alone. */
export const visibleStatuses = (role: ProjectRole | null): readonly ReportStatus[] =>
  role === 'guest' ? settled : reportStatusSchema.options;

const severity: readonly VerdictResult[] = [
  'fail',
  'conditional-fail',
  'not-decidable',
  'conditional-pass',
  'pass',
  'not-applicable',
];

/** The worst of the results; one that does not apply counts only when no other is there. */
export function worstResult(results: readonly VerdictResult[]): VerdictResult {
  return severity.find((result) => results.includes(result)) ?? 'not-applicable';
}
