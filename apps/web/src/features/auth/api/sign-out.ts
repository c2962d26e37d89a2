import { requestEmpty } from '../../../lib/http.js';

export function signOut(): Promise<void> {
  return requestEmpty('/auth/sign-out', { method: 'POST' });
}
