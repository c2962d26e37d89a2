import { userSchema, type CreateUser, type User } from '@overtally/contracts';
import { requestJson } from '../../../lib/http.js';

export function createUser(user: CreateUser): Promise<User> {
  return requestJson(userSchema, '/users', { method: 'POST', body: user });
}
