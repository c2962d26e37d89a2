import { mailSchema, type Mail, type SendReport } from '@overtally/contracts';
import { requestJson } from '../../../lib/http.js';

/** Sends an issued report to one more recipient. */
export function sendReport(reportId: string, recipient: SendReport): Promise<Mail> {
  return requestJson(mailSchema, `/reports/${reportId}/deliveries`, { method: 'POST', body: recipient });
}
