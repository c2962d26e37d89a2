import type { ResetPassword } from '@overtally/contracts';
import { requestEmpty } from '../../../lib/http.js';

export function resetPassword(input: ResetPassword): Promise<void> {
  return requestEmpty('/auth/reset-password', { method: 'POST', body: input });
}
