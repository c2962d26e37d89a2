import { sentResetLinkSchema, type ForgotPassword, type SentResetLink } from '@overtally/contracts';
import { requestJson } from '../../../lib/http.js';

/** Has a link for a new password sent to the address, if it has an account. */
export function forgotPassword(input: ForgotPassword): Promise<SentResetLink> {
  return requestJson(sentResetLinkSchema, '/auth/forgot-password', { method: 'POST', body: input });
}
