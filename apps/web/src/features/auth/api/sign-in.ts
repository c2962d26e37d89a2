import { accountSchema, type Account, type SignIn } from '@overtally/contracts';
import { requestJson } from '../../../lib/http.js';

export function signIn(credentials: SignIn): Promise<Account> {
  return requestJson(accountSchema, '/auth/sign-in', { method: 'POST', body: credentials });
}
