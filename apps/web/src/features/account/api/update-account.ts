import { ownAccountSchema, type OwnAccount, type UpdateAccount } from '@overtally/contracts';
import { requestJson } from '../../../lib/http.js';

export function updateAccount(change: UpdateAccount): Promise<OwnAccount> {
  return requestJson(ownAccountSchema, '/auth/me', { method: 'PATCH', body: change });
}
