import { reportSchema, type Report } from '@overtally/contracts';
import { requestJson } from '../../../lib/http.js';

/** What moves a report on, or back to its author. */
export type Step = 'submit' | 'return' | 'issue';

export function stepReport(reportId: string, step: Step, comment: string): Promise<Report> {
  return requestJson(reportSchema, `/reports/${reportId}/${step}`, { method: 'POST', body: { comment } });
}
