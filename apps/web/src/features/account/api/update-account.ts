import { accountSchema, type Account, type UpdateAccount } from '@overtally/contracts';
import { requestJson } from '../../../lib/http.js';

export function updateAccount(change: UpdateAccount): Promise<Account> {
  return requestJson(accountSchema, '/auth/me', { method: 'PATCH', body: change });
}
