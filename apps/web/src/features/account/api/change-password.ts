import type { ChangePassword } from '@overtally/contracts';
import { requestEmpty } from '../../../lib/http.js';

export function changePassword(passwords: ChangePassword): Promise<void> {
  return requestEmpty('/auth/change-password', { method: 'POST', body: passwords });
}
