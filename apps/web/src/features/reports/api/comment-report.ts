import { reportSchema, type Report } from '@overtally/contracts';
import { requestJson } from '../../../lib/http.js';

/** Puts words beside a report, in whatever state it is. */
export function commentReport(reportId: string, comment: string): Promise<Report> {
  return requestJson(reportSchema, `/reports/${reportId}/comments`, { method: 'POST', body: { comment } });
}
