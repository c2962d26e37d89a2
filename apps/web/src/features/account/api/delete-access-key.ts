import { requestEmpty } from '../../../lib/http.js';

export function deleteAccessKey(keyId: string): Promise<void> {
  return requestEmpty(`/auth/keys/${keyId}`, { method: 'DELETE' });
}
