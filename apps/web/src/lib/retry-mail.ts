import { mailSchema, type Mail } from '@overtally/contracts';
import { requestJson } from './http.js';

/** Has a message that waits or failed sent at once. */
export function retryMail(mailId: string): Promise<Mail> {
  return requestJson(mailSchema, `/mails/${mailId}/retry`, { method: 'POST' });
}
