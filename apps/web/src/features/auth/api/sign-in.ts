import { ownAccountSchema, type OwnAccount, type SignIn } from '@overtally/contracts';
import { requestJson } from '../../../lib/http.js';

export function signIn(credentials: SignIn): Promise<OwnAccount> {
  return requestJson(ownAccountSchema, '/auth/sign-in', { method: 'POST', body: credentials });
}
