import { reportSchema, type CreateReport, type Report, type UpdateReport } from '@overtally/contracts';
import { requestEmpty, requestJson } from '../../../lib/http.js';

export function createReport(projectId: string, input: CreateReport): Promise<Report> {
  return requestJson(reportSchema, `/projects/${projectId}/reports`, { method: 'POST', body: input });
}

/** Changes a draft; the server refuses it in any other state. */
export function updateReport(reportId: string, input: UpdateReport): Promise<Report> {
  return requestJson(reportSchema, `/reports/${reportId}`, { method: 'PATCH', body: input });
}

/** Deletes a draft; the server refuses it in any other state. */
export function deleteReport(reportId: string): Promise<void> {
  return requestEmpty(`/reports/${reportId}`, { method: 'DELETE' });
}
