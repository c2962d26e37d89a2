import {
  reportSchema,
  type IssueReport,
  type Report,
  type ReportStep,
  type SubmitReport,
} from '@overtally/contracts';
import { requestJson } from '../../../lib/http.js';

/** What moves a report on, or back to its author, with what is said on it. */
export type Step =
  | { step: 'submit'; input: SubmitReport }
  | { step: 'withdraw' | 'return'; input: ReportStep }
  | { step: 'issue'; input: IssueReport };
export type StepName = Step['step'];

export function stepReport(reportId: string, { step, input }: Step): Promise<Report> {
  return requestJson(reportSchema, `/reports/${reportId}/${step}`, { method: 'POST', body: input });
}
