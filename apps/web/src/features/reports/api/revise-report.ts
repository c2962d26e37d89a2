import { reportSchema, type Report } from '@overtally/contracts';
import { requestJson } from '../../../lib/http.js';

/** Makes the draft of the next revision of an issued report. */
export function reviseReport(reportId: string): Promise<Report> {
  return requestJson(reportSchema, `/reports/${reportId}/revise`, { method: 'POST' });
}
